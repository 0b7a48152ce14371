/**
 * What advice is worked out from besides the rider's answers: the range and the rules in force. Kept in memory for as long as the database says that
 * nothing of it was written and no dated version has come into force. This process's own writes count from the next call on; a write from
 * elsewhere within a quarter of a second. What is decided (basket, order) is read afresh inside its transaction.
 */
import { createHash } from 'node:crypto'
import { Op, QueryTypes, type Sequelize, type Transaction } from 'sequelize'
import { rulesFrom, type Rules } from '#core/rules.ts'
import type { Deps } from '../../deps.ts'
import { RuleTable } from '../../models/rule-table.ts'
import { readCatalogue, type StoredWheelset } from '../catalogue/read.ts'

type Reach = Pick<Deps, 'db' | 'clock'>

export interface AdviceInputs {
  catalogue: StoredWheelset[]
  rules: Rules
  rulesVersion: string
}

interface Kept extends AdviceInputs {
  mark: string | null
  /** From when to when, ms: outside it another dated version may be in force. */
  from: number
  until: number
}

/** How long a mark is believed without asking again, ms. */
const BELIEVED_MS = 250

const keptBy = new WeakMap<Sequelize, Kept>()
const asked = new WeakMap<Sequelize, { mark: Promise<string | null>; at: number }>()

/** @param transaction reads afresh on its connection: what is decided inside a transaction is decided on what that transaction sees */
export async function adviceInputs(deps: Reach, transaction?: Transaction): Promise<AdviceInputs> {
  if (transaction) return read(deps, transaction)
  const kept = keptBy.get(deps.db)
  const now = deps.clock().getTime()
  const mark = await presentMark(deps.db)
  if (kept && mark !== null && kept.mark === mark && now >= kept.from && now < kept.until) return kept
  // The mark was read before the rest: a write in between makes the next call read again.
  const [inputs, until] = await Promise.all([read(deps), nextVersionAt(deps)])
  keptBy.set(deps.db, { ...inputs, mark, from: now, until })
  return inputs
}

function presentMark(db: Sequelize): Promise<string | null> {
  const known = asked.get(db)
  // Not the shop's clock: this is about how long ago a question was asked, also while a test moves that clock.
  const at = performance.now()
  if (known && at - known.at < BELIEVED_MS) return known.mark
  const mark = db
    .query<{ mark: string }>('SELECT mark FROM advice_inputs WHERE id = 1', { type: QueryTypes.SELECT })
    .then(([row]) => row?.mark ?? null)
  mark.catch(() => asked.delete(db))
  asked.set(db, { mark, at })
  return mark
}

/** Forgets the mark whenever this process writes a row through a model, once the write is there for others to see. */
export function watchAdviceInputs(db: Sequelize): void {
  const forget = ({ transaction }: { transaction?: Transaction | null }) => {
    if (!transaction) asked.delete(db)
    else
      transaction.afterCommit(() => {
        asked.delete(db)
      })
  }
  const afterRow = (_row: unknown, options: object) => {
    forget(options)
  }
  db.addHook('afterSave', afterRow)
  db.addHook('afterDestroy', afterRow)
  db.addHook('afterBulkCreate', afterRow)
  db.addHook('afterBulkUpdate', forget)
  db.addHook('afterBulkDestroy', forget)
}

/** When the next seconded limit or table comes into force, ms. */
async function nextVersionAt({ db, clock }: Reach): Promise<number> {
  const [row] = await db.query<{ next: Date | null }>(
    `SELECT MIN(in_force_from) AS next FROM (
       SELECT in_force_from FROM limit_versions WHERE state IN ('seconded', 'in-force')
       UNION ALL SELECT in_force_from FROM rule_tables WHERE state IN ('seconded', 'in-force')) AS versions
     WHERE in_force_from > :now`,
    { replacements: { now: clock() }, type: QueryTypes.SELECT },
  )
  return row?.next ? new Date(row.next).getTime() : Infinity
}

async function read(deps: Reach, transaction?: Transaction): Promise<AdviceInputs> {
  const [catalogue, { rules, version }] = await Promise.all([
    readCatalogue(deps, 'en', false, transaction),
    readRules(deps, transaction),
  ])
  return { catalogue, rules, rulesVersion: versionOf(version, rules, catalogue) }
}

/** The rule tables in force now, newest of each name. */
async function readRules({ clock }: Reach, transaction?: Transaction): Promise<{ rules: Rules; version: string }> {
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
      .sort((a, b) => a.localeCompare(b, 'en', { numeric: true })) // 2026-12.10 follows 2026-12.9
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
