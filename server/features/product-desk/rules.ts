/** The tables that the sums go by, as dated versions: drafted by one person, seconded by another, in force from their time on. One line of versions: each is written over the newest one before it. */
import { isDeepStrictEqual } from 'node:util'
import type { Transaction } from 'sequelize'
import { rides } from '#contract/advisor.ts'
import type {
  RuleDraft,
  RuleTableRow,
  RuleTableView,
  RuleVersionHead,
  RuleVersionView,
} from '#contract/product-desk-rules.ts'
import { advise } from '#core/advise.ts'
import { cellOf, checkTable } from '#core/rule-check.ts'
import { rulesFrom, tableNames, type TableName } from '#core/rules.ts'
import { recordAudit } from '../../audit/record.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, badField, notFound } from '../../http/errors.ts'
import type { SignedIn } from '../../http/session.ts'
import { RuleTable } from '../../models/rule-table.ts'
import { User } from '../../models/user.ts'
import { readCatalogue } from '../catalogue/read.ts'

type Reach = Pick<Deps, 'db' | 'clock'>

/** A time typed a moment ago is still "now". */
const PAST_GRACE_MS = 5 * 60_000
/** Riders whose advice is worked out under a draft, kg: light, usual, heavy. */
const TRIED_KG = [45, 75, 120]

const agreed = ({ state }: RuleTable) => state === 'seconded' || state === 'in-force'
const since = ({ inForceFrom }: RuleTable) => inForceFrom?.getTime() ?? 0
const newestFirst = (a: RuleTable, b: RuleTable) => since(b) - since(a) || b.id - a.id

/** The newest agreed version, in force or still to come. */
const baseOf = (versions: readonly RuleTable[]) => versions.filter(agreed).sort(newestFirst)[0] ?? null
/** The version that counts at `at`. Same rule as the advice's. */
const inForceAt = (versions: readonly RuleTable[], at: Date) =>
  baseOf(versions.filter(({ inForceFrom }) => inForceFrom !== null && inForceFrom <= at))

function standingOf(version: RuleTable, current: RuleTable | null, now: Date): RuleVersionHead['standing'] {
  if (version.state === 'drafted' || version.state === 'rejected') return version.state
  if (version.id === current?.id) return 'in-force'
  return version.inForceFrom !== null && version.inForceFrom > now ? 'seconded' : 'replaced'
}

function head(version: RuleTable, versions: readonly RuleTable[], now: Date, userId: number): RuleVersionHead {
  return {
    id: version.id,
    table: version.name,
    version: version.version,
    standing: standingOf(version, inForceAt(versions, now), now),
    source: version.source,
    label: version.label,
    reason: version.reason,
    draftedBy: version.draftedBy?.name ?? null,
    secondedBy: version.secondedBy?.name ?? null,
    inForceFrom: version.inForceFrom?.toISOString() ?? null,
    createdAt: version.createdAt.toISOString(),
    basedOn: version.basedOn,
    stale: version.state === 'drafted' && version.basedOn !== baseOf(versions)?.version,
    own: version.draftedById === userId,
  }
}

const whole = (version: RuleTable, versions: readonly RuleTable[], now: Date, userId: number): RuleVersionView => ({
  ...head(version, versions, now, userId),
  data: version.data as Record<string, unknown>,
})

const people = [
  { model: User, as: 'draftedBy', attributes: ['name'] },
  { model: User, as: 'secondedBy', attributes: ['name'] },
]

const isTable = (name: string): name is TableName => (tableNames as string[]).includes(name)

export async function listRules(
  { clock }: Reach,
  user: SignedIn,
): Promise<{ items: RuleTableRow[]; nextCursor: null }> {
  const now = clock()
  const all = await RuleTable.findAll({ include: people, attributes: { exclude: ['data'] }, order: [['id', 'DESC']] })
  const items = tableNames.map((name) => {
    const versions = all.filter((one) => one.name === name)
    const current = inForceAt(versions, now)
    const heads = versions.map((version) => head(version, versions, now, user.id))
    return {
      name,
      current: heads.find(({ id }) => id === current?.id) ?? null,
      waiting: heads.filter(({ standing }) => standing === 'drafted' || standing === 'seconded'),
      versions: versions.length,
    }
  })
  return { items, nextCursor: null }
}

export async function readRuleTable({ clock }: Reach, name: string, user: SignedIn): Promise<RuleTableView> {
  const versions = isTable(name)
    ? await RuleTable.findAll({ where: { name }, include: people, order: [['id', 'DESC']] })
    : []
  const base = baseOf(versions)
  if (!base) throw notFound()
  const now = clock()
  return {
    name,
    base: whole(base, versions, now, user.id),
    versions: versions.map((version) => whole(version, versions, now, user.id)),
  }
}

async function readVersion({ clock }: Reach, id: number, user: SignedIn, transaction: Transaction) {
  const version = await RuleTable.findByPk(id, { include: people, transaction })
  if (!version) throw notFound()
  const versions = await RuleTable.findAll({ where: { name: version.name }, transaction })
  return whole(version, versions, clock(), user.id)
}

/** Every version of a table, locked in the order of their ids, so that two deciders wait instead of deadlocking. */
const lockedTable = (name: string, transaction: Transaction) =>
  RuleTable.findAll({ where: { name }, order: [['id', 'ASC']], lock: true, transaction })

async function lockedChange(id: number, transaction: Transaction) {
  const found = await RuleTable.findByPk(id, { attributes: ['name'], transaction })
  const versions = found ? await lockedTable(found.name, transaction) : []
  const version = versions.find((one) => one.id === id)
  if (!version) throw notFound()
  return { version, versions, base: baseOf(versions) }
}

/**
 * The data has the table's shape, and with it in place the whole set of rules is complete and the sums run: a table that its schema takes may still
 * lead a sum out of its range, and every rider's advice would fail from that moment on.
 */
async function checkData(
  deps: Reach,
  name: TableName,
  data: unknown,
  base: RuleTable,
  at: Date,
  transaction: Transaction,
) {
  const faults = checkTable(name, data, base.data)
  if (faults.length > 0) {
    const fields = faults.map(({ path, code, data: figures }) => ({
      path: ['data', ...path].join('.'),
      code,
      data: figures,
      ...(path.length > 0 ? { cell: cellOf(path, data) } : {}),
    }))
    throw new AppError('validation', 400, {}, fields)
  }
  const all = await RuleTable.findAll({ transaction })
  const rows = tableNames.map((one) => ({
    name: one,
    data:
      one === name
        ? data
        : inForceAt(
            all.filter((row) => row.name === one),
            at,
          )?.data,
  }))
  try {
    const rules = rulesFrom(rows)
    const catalogue = await readCatalogue(deps, 'en', false, transaction)
    for (const ride of rides) {
      const widthMm = rules.defaults.tyreWidthMm[ride] ?? 28
      const tyre = { frontWidthMm: widthMm, rearWidthMm: widthMm, setup: 'tubeless' as const }
      for (const bodyMassKg of TRIED_KG) advise({ ride, bodyMassKg, brakes: 'disc', tyre }, catalogue, rules, 'draft')
    }
  } catch (error) {
    if (!(error instanceof Error) || error.name.startsWith('Sequelize')) throw error
    throw badField('data', 'sums-fail', { said: error.message })
  }
}

/** `YYYY-MM.N`: counted through all tables, so that one number names one change. */
async function nextVersion(now: Date, transaction: Transaction): Promise<string> {
  const month = now.toISOString().slice(0, 7)
  const rows = await RuleTable.findAll({ attributes: ['version'], transaction })
  const counts = rows.flatMap(({ version }) => (version.startsWith(`${month}.`) ? [Number(version.slice(8)) || 0] : []))
  return `${month}.${Math.max(0, ...counts) + 1}`
}

export function draftRules(deps: Reach, actor: SignedIn, draft: RuleDraft): Promise<RuleVersionView> {
  return inTransaction(deps.db, async (transaction) => {
    const { table: name, data, source, label, reason } = draft
    if (!isTable(name)) throw badField('table', 'no-such-table')
    const base = baseOf(await lockedTable(name, transaction))
    if (!base) throw badField('table', 'no-such-table')
    if (draft.basedOn !== undefined && draft.basedOn !== base.version)
      throw new AppError('changed-meanwhile', 409, { present: base.version })
    const now = deps.clock()
    const inForceFrom = draft.inForceFrom === undefined ? null : new Date(draft.inForceFrom)
    if (inForceFrom && inForceFrom.getTime() < now.getTime() - PAST_GRACE_MS)
      throw badField('inForceFrom', 'in-the-past')
    // The new version holds what the coming one changes, so it cannot count before it.
    if (base.inForceFrom && base.inForceFrom > (inForceFrom ?? now))
      throw badField('inForceFrom', 'before-coming', { version: base.version })
    if (isDeepStrictEqual(data, base.data) && source === base.source && label === base.label)
      throw badField('data', 'nothing-changed', { version: base.version })
    await checkData(deps, name, data, base, inForceFrom ?? now, transaction)

    const version = await RuleTable.create(
      {
        ...{ name, data, source, label, reason, inForceFrom, basedOn: base.version },
        ...{ version: await nextVersion(now, transaction), state: 'drafted' as const, draftedById: actor.id },
      },
      { transaction },
    )
    await recordAudit(
      actor,
      {
        action: 'rule-change.drafted',
        subjectType: 'rule-table',
        subjectId: name,
        reason,
        before: { version: base.version },
        after: { version: version.version, source, inForceFrom: inForceFrom?.toISOString() ?? null },
      },
      transaction,
    )
    return readVersion(deps, version.id, actor, transaction)
  })
}

/**
 * The second pair of eyes. The one place where a version gets its time of force; what the advice keeps in memory notices by the database's own
 * mark (server/features/advisor/inputs.ts), so nothing has to be told here.
 * @throws AppError own-change 403, rule-change-closed 409, rule-change-stale 409
 */
export function secondRules(deps: Reach, actor: SignedIn, id: number, reason: string): Promise<RuleVersionView> {
  return inTransaction(deps.db, async (transaction) => {
    const { version, base } = await lockedChange(id, transaction)
    if (version.draftedById === actor.id) throw new AppError('own-change', 403)
    if (version.state !== 'drafted') throw new AppError('rule-change-closed', 409)
    if (!base || !isTable(version.name) || version.basedOn !== base.version)
      throw new AppError('rule-change-stale', 409, { basedOn: version.basedOn, present: base?.version ?? null })
    const now = deps.clock()
    const inForceFrom = version.inForceFrom !== null && version.inForceFrom > now ? version.inForceFrom : now
    // Asked again: the other tables, the range or the shape may have changed since it was drafted.
    await checkData(deps, version.name, version.data, base, inForceFrom, transaction)
    await version.update({ state: 'seconded', secondedById: actor.id, inForceFrom }, { transaction })
    await recordAudit(
      actor,
      {
        action: 'rule-change.seconded',
        subjectType: 'rule-table',
        subjectId: version.name,
        reason,
        before: { version: base.version },
        after: { version: version.version, inForceFrom: inForceFrom.toISOString() },
      },
      transaction,
    )
    return readVersion(deps, id, actor, transaction)
  })
}

/** Turns a draft down, takes an own one back, or stops a seconded one before its time has come. */
export function rejectRules(deps: Reach, actor: SignedIn, id: number, reason: string): Promise<RuleVersionView> {
  return inTransaction(deps.db, async (transaction) => {
    const { version, base } = await lockedChange(id, transaction)
    const coming = agreed(version) && version.inForceFrom !== null && version.inForceFrom > deps.clock()
    if (version.state !== 'drafted' && !coming) throw new AppError('rule-change-closed', 409)
    // A later one holds this one's changes too; stopping only this one would let them in all the same.
    if (coming && base && base.id !== version.id)
      throw new AppError('rule-change-followed', 409, { version: base.version })
    const before = { state: version.state, version: version.version }
    await version.update({ state: 'rejected' }, { transaction })
    await recordAudit(
      actor,
      {
        action: 'rule-change.rejected',
        subjectType: 'rule-table',
        subjectId: version.name,
        reason,
        before,
        after: { state: 'rejected', version: version.version },
      },
      transaction,
    )
    return readVersion(deps, id, actor, transaction)
  })
}
