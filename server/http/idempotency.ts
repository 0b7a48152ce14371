/**
 * Idempotency-Key on creating calls: the first answer is kept and given again to a repeat. Refusals are not kept, so a
 * corrected call may use the same key. Scoped to caller and route: two callers may choose the same key.
 */
import { createHash } from 'node:crypto'
import type { Request } from 'express'
import { UniqueConstraintError } from 'sequelize'
import { IdempotencyKey } from '../models/idempotency-key.ts'
import { AppError, badField } from './errors.ts'

/** No call runs this long: requests are cut off after 30 s. */
const ABANDONED_MS = 120_000

export interface KeptAnswer {
  status: number
  body: unknown
}

export async function once(
  req: Request,
  caller: string,
  need: 'required' | 'optional',
  clock: () => Date,
  answer: () => Promise<KeptAnswer>,
): Promise<KeptAnswer> {
  const key = req.get('idempotency-key')
  if (key === undefined) {
    if (need === 'required') throw new AppError('idempotency-key-missing', 400)
    return answer()
  }
  if (!/^[\x21-\x7e]{8,80}$/.test(key)) throw badField('Idempotency-Key', 'not-valid')
  const scope = `${req.method} ${req.path} ${caller}`.slice(0, 120)
  const requestHash = createHash('sha256')
    .update(JSON.stringify(req.body ?? null))
    .digest('hex')

  try {
    await IdempotencyKey.create({ scope, key, requestHash, state: 'running', createdAt: clock() })
  } catch (error) {
    if (!(error instanceof UniqueConstraintError)) throw error
    const kept = await IdempotencyKey.findOne({ where: { scope, key } })
    if (!kept) throw new AppError('still-running', 409)
    if (kept.state === 'running' && clock().getTime() - kept.createdAt.getTime() > ABANDONED_MS) {
      // The process died under the first try. What it did stands in its own tables, which have unique keys of their own.
      await kept.destroy()
      return once(req, caller, need, clock, answer)
    }
    if (kept.requestHash !== requestHash) throw new AppError('idempotency-key-reused', 422)
    if (kept.state !== 'done' || kept.status === null) throw new AppError('still-running', 409)
    return { status: kept.status, body: kept.body }
  }
  try {
    const given = await answer()
    await IdempotencyKey.update(
      { state: 'done', status: given.status, body: given.body as object },
      { where: { scope, key } },
    )
    return given
  } catch (error) {
    await IdempotencyKey.destroy({ where: { scope, key } })
    throw error
  }
}
