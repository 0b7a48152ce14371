/** The inbox of signed events: one row each, written in the same transaction as what the event brings about. */
import type { Transaction } from 'sequelize'
import type { Deps } from '../../deps.ts'
import { WebhookEvent } from '../../models/webhook-event.ts'
import type { PaymentEvent } from '../../payments/index.ts'

export const isKnown = async (eventId: string): Promise<boolean> =>
  (await WebhookEvent.count({ where: { eventId } })) > 0

/** @throws UniqueConstraintError where another delivery of the same event was quicker: the whole transaction is then undone, and rightly so */
export async function keepEvent({ clock }: Pick<Deps, 'clock'>, event: PaymentEvent, transaction: Transaction) {
  const { eventId, type, objectId, created, payload } = event
  await WebhookEvent.create(
    { eventId, type, objectId, created, payload: payload as Record<string, unknown>, receivedAt: clock() },
    { transaction },
  )
}
