/** Leaving an unpaid order: the payment page is closed first and then read, so that a payment that was quicker wins. */
import type { Deps } from '../../deps.ts'
import { Order } from '../../models/order.ts'
import { dropOrder } from './drop-order.ts'
import { settleCheckout } from './settle.ts'

/** The order that holds stock for a basket, lapsed or not. */
export const findHeldOrder = (basketId: string): Promise<Order | null> =>
  Order.findOne({ where: { basketId, state: 'holding' } })

/**
 * @param move dropped by the buyer, or lapsed
 * @returns the order as it stands then: dropped, or placed where it was paid meanwhile
 * @throws AppError payment-unavailable: while nobody can say whether it is paid, it stays as it is
 */
export async function leaveOrder(
  deps: Deps,
  order: Order,
  move: 'lapsed' | 'dropped',
  more: { reason: string },
): Promise<Order> {
  if (order.stripeSessionId !== null) {
    await deps.payments.expireCheckout(order.stripeSessionId)
    const { paid } = await deps.payments.readCheckout(order.stripeSessionId)
    if (paid) await settleCheckout(deps, order.stripeSessionId)
  }
  await dropOrder(deps, order.id, move, more)
  return order.reload()
}
