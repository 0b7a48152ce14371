import { Op } from 'sequelize'
import type { Deps } from '../deps.ts'
import { IdempotencyKey } from '../models/idempotency-key.ts'
import { Session } from '../models/session.ts'

const DAY_MS = 24 * 3_600_000

/** Kept answers of creating calls are there for repeats, and a repeat comes within a day; sessions that ran out open nothing. */
export async function tidy({ clock }: Pick<Deps, 'clock'>): Promise<void> {
  const now = clock()
  await IdempotencyKey.destroy({ where: { createdAt: { [Op.lt]: new Date(now.getTime() - DAY_MS) } } })
  await Session.destroy({ where: { expiresAt: { [Op.lt]: now } } })
}
