/** Advice from the catalogue and the rules in force. A body mass is private: nothing is stored unless the rider asks for it. */
import { createHash, randomUUID } from 'node:crypto'
import type { Transaction } from 'sequelize'
import type { Advice, AdviceChanges, RiderAnswers } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { influence, tippingPoints } from '#core/what-changes.ts'
import type { Deps } from '../../deps.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'
import { adviceInputs } from './inputs.ts'

/** @param transaction reads on its connection */
export async function giveAdvice(
  deps: Pick<Deps, 'db' | 'clock'>,
  answers: RiderAnswers,
  transaction?: Transaction,
): Promise<Advice> {
  const { catalogue, rules, rulesVersion } = await adviceInputs(deps, transaction)
  return advise(answers, catalogue, rules, rulesVersion)
}

/** The nearest values at which the advice turns, and the answers in the order in which they matter for this rider. */
export async function whatChanges(deps: Pick<Deps, 'db' | 'clock'>, answers: RiderAnswers): Promise<AdviceChanges> {
  const { catalogue, rules, rulesVersion } = await adviceInputs(deps)
  return {
    rulesVersion,
    tippingPoints: tippingPoints(answers, catalogue, rules, rulesVersion),
    influence: influence(answers, catalogue, rules, rulesVersion),
  }
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
