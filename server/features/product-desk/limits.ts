/** Limits as dated versions: drafted by one person, seconded by another, in force from their time on. Nothing is overwritten. */
import type { Transaction } from 'sequelize'
import type { LimitDraft, LimitRow, LimitVersionView } from '#contract/product-desk.ts'
import { recordAudit } from '../../audit/record.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, badField, notFound } from '../../http/errors.ts'
import type { SignedIn } from '../../http/session.ts'
import { LimitVersion } from '../../models/limit-version.ts'
import { User } from '../../models/user.ts'
import { Wheelset } from '../../models/wheelset.ts'

type Reach = Pick<Deps, 'db' | 'clock'>

/** Shorter than this is no proof of a higher limit. */
const PROOF_CHARACTERS = 10
/** A time typed a moment ago is still "now". */
const PAST_GRACE_MS = 5 * 60_000

const agreed = ({ state }: LimitVersion) => state === 'seconded' || state === 'in-force'
const since = ({ inForceFrom }: LimitVersion) => inForceFrom?.getTime() ?? 0

/** The version that counts at `now`: the newest agreed one whose time has come. Same rule as the catalogue's. */
export const inForceAt = (versions: readonly LimitVersion[], now: Date): LimitVersion | null =>
  versions
    .filter((one) => agreed(one) && one.inForceFrom !== null && one.inForceFrom <= now)
    .sort((a, b) => since(b) - since(a) || b.id - a.id)[0] ?? null

function standingOf(version: LimitVersion, current: LimitVersion | null, now: Date): LimitVersionView['standing'] {
  if (version.state === 'drafted' || version.state === 'rejected') return version.state
  if (version.id === current?.id) return 'in-force'
  return version.inForceFrom !== null && version.inForceFrom > now ? 'seconded' : 'replaced'
}

function view(
  version: LimitVersion,
  sku: string,
  current: LimitVersion | null,
  now: Date,
  userId: number,
): LimitVersionView {
  return {
    id: version.id,
    sku,
    limitKg: version.limitKg,
    proof: version.proof,
    reason: version.reason,
    standing: standingOf(version, current, now),
    draftedBy: version.draftedBy?.name ?? null,
    secondedBy: version.secondedBy?.name ?? null,
    inForceFrom: version.inForceFrom?.toISOString() ?? null,
    createdAt: version.createdAt.toISOString(),
    own: version.draftedById === userId,
  }
}

const people = [
  { model: User, as: 'draftedBy', attributes: ['name'] },
  { model: User, as: 'secondedBy', attributes: ['name'] },
]

export async function listLimits({ clock }: Reach, user: SignedIn): Promise<{ items: LimitRow[]; nextCursor: null }> {
  const now = clock()
  const wheelsets = await Wheelset.findAll({ attributes: ['id', 'sku', 'name', 'onSale'], order: ['name', 'sku'] })
  const versions = await LimitVersion.findAll({ include: people, order: [['id', 'DESC']] })
  const items = wheelsets.map(({ id, sku, name, onSale }) => {
    const own = versions.filter((version) => version.wheelsetId === id)
    const current = inForceAt(own, now)
    return {
      sku,
      name,
      onSale,
      current: current && view(current, sku, current, now, user.id),
      versions: own.map((version) => view(version, sku, current, now, user.id)),
    }
  })
  return { items, nextCursor: null }
}

async function readLimit(
  { clock }: Reach,
  id: number,
  user: SignedIn,
  transaction: Transaction,
): Promise<LimitVersionView> {
  const version = await LimitVersion.findByPk(id, {
    include: [...people, { model: Wheelset, as: 'wheelset', attributes: ['sku'] }],
    transaction,
  })
  if (!version?.wheelset) throw notFound()
  const now = clock()
  const current = await currentLimit(version.wheelsetId, now, transaction)
  return view(version, version.wheelset.sku, current, now, user.id)
}

export const currentLimit = async (wheelsetId: number, now: Date, transaction?: Transaction) =>
  inForceAt(await LimitVersion.findAll({ where: { wheelsetId }, transaction }), now)

/** A higher limit is a claim about strength: it needs something that shows it. */
function checkProof(limitKg: number, proof: string, current: LimitVersion | null) {
  const raised = current === null || limitKg > current.limitKg
  if (raised && proof.length < PROOF_CHARACTERS) throw badField('proof', 'proof-needed', { minimum: PROOF_CHARACTERS })
}

export function draftLimit(deps: Reach, actor: SignedIn, draft: LimitDraft): Promise<LimitVersionView> {
  return inTransaction(deps.db, async (transaction) => {
    const wheelset = await Wheelset.findOne({ where: { sku: draft.sku }, lock: true, transaction })
    if (!wheelset) throw badField('sku', 'no-such-wheelset')
    const now = deps.clock()
    const inForceFrom = draft.inForceFrom === undefined ? null : new Date(draft.inForceFrom)
    if (inForceFrom && inForceFrom.getTime() < now.getTime() - PAST_GRACE_MS)
      throw badField('inForceFrom', 'in-the-past')
    const current = await currentLimit(wheelset.id, now, transaction)
    if (current?.limitKg === draft.limitKg) throw badField('limitKg', 'same-as-now')
    checkProof(draft.limitKg, draft.proof, current)

    const { limitKg, proof, reason } = draft
    const version = await LimitVersion.create(
      { wheelsetId: wheelset.id, limitKg, proof, reason, state: 'drafted', draftedById: actor.id, inForceFrom },
      { transaction },
    )
    await recordAudit(
      actor,
      {
        action: 'limit-change.drafted',
        subjectType: 'limit-change',
        subjectId: wheelset.sku,
        reason,
        before: { limitKg: current?.limitKg ?? null },
        after: { changeId: version.id, limitKg, proof, inForceFrom: inForceFrom?.toISOString() ?? null },
      },
      transaction,
    )
    return readLimit(deps, version.id, actor, transaction)
  })
}

async function lockedChange(id: number, transaction: Transaction) {
  const found = await LimitVersion.findByPk(id, { attributes: ['wheelsetId'], transaction })
  if (!found) throw notFound()
  // Wheelset first, then its version: the same order everywhere, so that two deciders wait instead of deadlocking.
  const wheelset = await Wheelset.findByPk(found.wheelsetId, { lock: true, transaction })
  const version = await LimitVersion.findByPk(id, { lock: true, transaction })
  if (!wheelset || !version) throw notFound()
  return { wheelset, version }
}

/**
 * The second pair of eyes. The author's own yes does not count, whatever the author's role.
 * @throws AppError own-change 403, limit-change-closed 409
 */
export function secondLimit(deps: Reach, actor: SignedIn, id: number, reason: string): Promise<LimitVersionView> {
  return inTransaction(deps.db, async (transaction) => {
    const { wheelset, version } = await lockedChange(id, transaction)
    if (version.draftedById === actor.id) throw new AppError('own-change', 403)
    if (version.state !== 'drafted') throw new AppError('limit-change-closed', 409)
    const now = deps.clock()
    const current = await currentLimit(wheelset.id, now, transaction)
    // Asked again: what was a lowering when drafted may be a raise by now.
    checkProof(version.limitKg, version.proof, current)
    const inForceFrom = version.inForceFrom !== null && version.inForceFrom > now ? version.inForceFrom : now
    await version.update({ state: 'seconded', secondedById: actor.id, inForceFrom }, { transaction })
    await recordAudit(
      actor,
      {
        action: 'limit-change.seconded',
        subjectType: 'limit-change',
        subjectId: wheelset.sku,
        reason,
        before: { limitKg: current?.limitKg ?? null },
        after: { changeId: id, limitKg: version.limitKg, inForceFrom: inForceFrom.toISOString() },
      },
      transaction,
    )
    return readLimit(deps, id, actor, transaction)
  })
}

/** Turns a draft down, takes an own one back, or stops a seconded one before its time has come. */
export function rejectLimit(deps: Reach, actor: SignedIn, id: number, reason: string): Promise<LimitVersionView> {
  return inTransaction(deps.db, async (transaction) => {
    const { wheelset, version } = await lockedChange(id, transaction)
    const waiting =
      version.state === 'drafted' ||
      (agreed(version) && version.inForceFrom !== null && version.inForceFrom > deps.clock())
    if (!waiting) throw new AppError('limit-change-closed', 409)
    const before = { state: version.state }
    await version.update({ state: 'rejected' }, { transaction })
    await recordAudit(
      actor,
      {
        action: 'limit-change.rejected',
        subjectType: 'limit-change',
        subjectId: wheelset.sku,
        reason,
        before,
        after: { changeId: id, limitKg: version.limitKg, state: 'rejected' },
      },
      transaction,
    )
    return readLimit(deps, id, actor, transaction)
  })
}
