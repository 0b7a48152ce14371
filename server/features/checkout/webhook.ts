/** Signed events. Verified first; then the event only says which payment page to look at. */
import { UniqueConstraintError } from 'sequelize'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../http/errors.ts'
import { isKnown, keepEvent } from './inbox.ts'
import { settleCheckout } from './settle.ts'

/** @throws AppError bad-signature; any other fault is answered with 5xx, so that the processor sends the event again */
export async function takeEvent(deps: Deps, rawBody: unknown, signature: string): Promise<void> {
  if (!Buffer.isBuffer(rawBody)) throw new AppError('bad-signature', 400)
  const event = deps.payments.readEvent(rawBody, signature)
  if (await isKnown(event.eventId)) return
  try {
    if (event.sessionId !== null) await settleCheckout(deps, event.sessionId, event)
    // Nothing of ours hangs on it; it is kept, so that the desk can see what came.
    else await inTransaction(deps.db, (transaction) => keepEvent(deps, event, transaction))
  } catch (error) {
    // Two deliveries at once: the other one has done it.
    if (error instanceof UniqueConstraintError && (await isKnown(event.eventId))) return
    throw error
  }
}
