/** Signed events. Verified first; then the event only says which payment page to look at. */
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../http/errors.ts'
import { WebhookEvent } from '../../models/webhook-event.ts'
import { settleCheckout } from './settle.ts'

/** @throws AppError bad-signature; any other fault is answered with 5xx, so that the processor sends the event again */
export async function takeEvent(deps: Deps, rawBody: unknown, signature: string): Promise<void> {
  if (!Buffer.isBuffer(rawBody)) throw new AppError('bad-signature', 400)
  const event = deps.payments.readEvent(rawBody, signature)
  if ((await WebhookEvent.count({ where: { eventId: event.eventId } })) > 0) return
  if (event.sessionId !== null) {
    await settleCheckout(deps, event.sessionId, event)
    return
  }
  // Nothing of ours hangs on it yet; it is kept, so that the desk can see what came.
  const { eventId, type, objectId, created, payload } = event
  await inTransaction(deps.db, async (transaction) => {
    if ((await WebhookEvent.count({ where: { eventId }, transaction })) > 0) return
    await WebhookEvent.create(
      { eventId, type, objectId, created, payload: payload as Record<string, unknown>, receivedAt: deps.clock() },
      { transaction },
    )
  })
}
