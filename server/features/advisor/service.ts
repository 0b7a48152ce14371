/** Advice from the catalogue and the rules in force. A body mass is private: nothing is stored unless the rider asks for it. */
import { createHash, randomUUID } from 'node:crypto'
import { Op, type Transaction } from 'sequelize'
import type { Advice, RiderAnswers } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { rulesFrom, type Rules } from '#core/rules.ts'
import type { Deps } from '../../deps.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'
import { RuleTable } from '../../models/rule-table.ts'
import { readCatalogue, type StoredWheelset } from '../catalogue/read.ts'

/** The rule tables in force now, newest of each name. */
async function readRules(
  { clock }: Pick<Deps, 'clock'>,
  transaction?: Transaction,
): Promise<{ rules: Rules; version: string }> {
  const rows = await RuleTable.findAll({
    where: { state: ['seconded', 'in-force'], inForceFrom: { [Op.lte]: clock() } },
    order: [['name', 'ASC'], ['inForceFrom', 'ASC'], ['id', 'ASC']], // prettier-ignore
    raw: true,
    ...(transaction ? { transaction } : {}),
  })
  const newest = [...new Map(rows.map((row) => [row.name, row])).values()]
  const version =
    newest
      .map((row) => row.version)
      .sort()
      .at(-1) ?? 'none'
  return { rules: rulesFrom(newest), version }
}

/**
 * Names everything the reply depends on besides the rider's answers: the rules' own version, then a digest of rules and
 * catalogue together. Two replies with the same version and the same answers are the same bytes.
 */
function versionOf(version: string, rules: Rules, catalogue: readonly StoredWheelset[]): string {
  // Words, prices and stock do not enter the advice.
  const facts = catalogue.map(
    ({ tagline: _t, description: _d, prices: _p, available: _a, version: _v, ...rest }) => rest,
  )
  const digest = createHash('sha256')
    .update(JSON.stringify([rules, facts]))
    .digest('hex')
    .slice(0, 10)
  return `${version}+${digest}`
}

/** @param transaction reads on its connection */
export async function giveAdvice(
  deps: Pick<Deps, 'db' | 'clock'>,
  answers: RiderAnswers,
  transaction?: Transaction,
): Promise<Advice> {
  const [catalogue, { rules, version }] = await Promise.all([
    readCatalogue(deps, 'en', false, transaction),
    readRules(deps, transaction),
  ])
  return advise(answers, catalogue, rules, versionOf(version, rules, catalogue))
}

/** Keeps answers and advice, because the rider chose a wheelset on the strength of them or asked to have them kept. */
export async function keepAdvice(deps: Pick<Deps, 'db' | 'clock'>, answers: RiderAnswers, userId: number | null) {
  const advice = await giveAdvice(deps, answers)
  const sha256 = createHash('sha256').update(JSON.stringify({ answers, advice })).digest('hex')
  const id = randomUUID()
  await AdviceSnapshot.create({
    id,
    userId,
    answers: { ...answers },
    advice: { ...advice },
    rulesVersion: advice.rulesVersion,
    sha256,
  })
  return { adviceId: id, sha256, advice }
}
