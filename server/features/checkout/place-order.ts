/** From a basket to an order that waits for its payment: checked, priced, stock held, then handed to the payment page. */
import type { OrderRequest } from '#contract/checkout.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../http/errors.ts'
import type { Order } from '../../models/order.ts'
import { findBasket, type Visitor } from '../basket/service.ts'
import { checkExpected, holdOrder, type Buyer } from './hold-order.ts'
import { findHeldOrder, leaveOrder } from './leave-order.ts'
import { orderUrl } from './order-token.ts'
import { payPageIsOver, startPayment } from './start-payment.ts'

/**
 * @returns the order and the payment page; a repeat for the same basket gives the same order
 * @throws AppError basket-not-ready, limit-not-acknowledged, price-changed, sold-out, payment-unavailable: nothing is charged, the basket is kept
 */
export async function placeOrder(deps: Deps, request: OrderRequest, visitor: Visitor & Buyer) {
  // Another visitor's basket is as good as none.
  const basket = await findBasket(visitor)
  if (basket?.id !== request.basketId) throw notFound()
  const held = await findHeldOrder(basket.id)
  if (held && (payPageIsOver(held, deps.clock()) || differs(held, request))) {
    // Too old to be paid, or the buyer came back to correct an address: the earlier one is left, a payment that was quicker counts.
    const left = await leaveOrder(deps, held, 'lapsed', { reason: 'ordered-anew' })
    if (left.state !== 'dropped') throw new AppError('already-ordered', 409)
  }
  const order = await inTransaction(deps.db, (transaction) => holdOrder(deps, request, visitor, transaction))
  checkExpected(request, order.totalCents)
  const payUrl = await startPayment(deps, order.id)
  return { orderNumber: order.number, payUrl, orderUrl: orderUrl(deps.config, order.number) }
}

function differs(order: Order, { email, delivery, locale }: OrderRequest): boolean {
  const fields = [...new Set([...Object.keys(order.delivery), ...Object.keys(delivery)])] as (keyof typeof delivery)[]
  return (
    order.email !== email ||
    (locale !== undefined && order.locale !== locale) ||
    fields.some((field) => (order.delivery[field] ?? '') !== (delivery[field] ?? ''))
  )
}
