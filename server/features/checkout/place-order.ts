/** From a basket to an order that waits for its payment: checked, priced, stock held, then handed to the payment page. */
import { UniqueConstraintError, type Transaction } from 'sequelize'
import type { OrderRequest } from '#contract/checkout.ts'
import type { Locale } from '#contract/common.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, badField, notFound } from '../../http/errors.ts'
import { textsIn } from '../../http/texts.ts'
import { Basket } from '../../models/basket.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { checkBasket } from '../basket/service.ts'
import { checkOrder } from './check-order.ts'
import { dropOrder } from './drop-order.ts'
import { digest, orderToken, orderUrl } from './order-token.ts'
import { reserve } from './stock.ts'

/** Stock is held longer than the payment page can stay open, so that nobody pays for what was let go. */
const HOLD_MS = 35 * 60_000
const PAY_PAGE_MS = 32 * 60_000

interface Visitor {
  basketId: string | undefined
  userId: number | null
  locale: Locale
}

/**
 * @returns the order and the payment page; a repeat for the same basket gives the same order
 * @throws AppError basket-not-ready, limit-not-acknowledged, price-changed, sold-out, payment-unavailable: nothing is charged, the basket is kept
 */
export async function placeOrder(deps: Deps, request: OrderRequest, visitor: Visitor) {
  // Another visitor's basket is as good as none.
  if (visitor.basketId !== request.basketId) throw notFound()
  const order = await holdOrder(deps, request, visitor)
  const payUrl = await startPayment(deps, order.id)
  return { orderNumber: order.number, payUrl, orderUrl: orderUrl(deps.config, order.number) }
}

async function holdOrder(deps: Deps, request: OrderRequest, visitor: Visitor): Promise<Order> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await inTransaction(deps.db, (transaction) => holdInside(deps, request, visitor, transaction))
    } catch (error) {
      // Two orders took the same next number at once: the later one takes the one after.
      if (attempt >= 20 || !(error instanceof UniqueConstraintError)) throw error
    }
  }
}

async function holdInside(
  deps: Deps,
  request: OrderRequest,
  visitor: Visitor,
  transaction: Transaction,
): Promise<Order> {
  const { db, clock, config } = deps
  const basket = await Basket.findByPk(request.basketId, { transaction, lock: transaction.LOCK.UPDATE })
  if (!basket) throw notFound()
  const earlier = await Order.findOne({ where: { basketId: basket.id }, transaction })
  if (earlier?.state === 'holding') return earlier
  if (earlier || basket.state === 'ordered')
    throw new AppError('already-ordered', 409, earlier ? { orderNumber: earlier.number } : {})

  const { market, prices, lines } = await checkBasket(deps, basket, visitor.locale, transaction)
  const problems = lines.flatMap(({ gate }) => gate.problems)
  if (lines.length === 0) throw new AppError('basket-empty', 409)
  if (problems.length > 0) throw new AppError('basket-not-ready', 409, { problems })
  if (lines.some(({ gate }) => gate.limitCheck === 'unconfirmed') && request.limitAcknowledged !== true)
    throw new AppError('limit-not-acknowledged', 409)
  const { totalCents } = prices
  if (request.expectedTotalCents !== undefined && request.expectedTotalCents !== totalCents) {
    throw new AppError('price-changed', 409, { expectedTotalCents: request.expectedTotalCents, totalCents })
  }
  if (request.delivery.country !== market.code)
    throw badField('delivery.country', 'other-country', { country: market.code })

  const missing = await reserve(
    db,
    lines.map(({ set, quantity }) => ({ wheelsetId: set.id, quantity, name: set.name })),
    transaction,
  )
  if (missing) throw new AppError('sold-out', 409, { name: missing.name })

  const last = await Order.max<string, Order>('number', { transaction })
  const number = `F26-${String(Number((last ?? 'F26-0').slice(4)) + 1).padStart(6, '0')}`
  const now = clock()
  const { delivery, email } = request
  const order = await Order.create(
    {
      number,
      basketId: basket.id,
      userId: visitor.userId,
      email,
      name: delivery.name,
      locale: request.locale ?? visitor.locale,
      market: market.code,
      currency: market.currency,
      delivery,
      postcode: delivery.postcode,
      state: 'holding',
      goodsCents: prices.goodsCents,
      deliveryCents: prices.deliveryCents,
      taxCents: prices.taxCents,
      totalCents,
      tokenHash: digest(orderToken(config, number)),
      holdExpiresAt: new Date(now.getTime() + HOLD_MS),
      createdAt: now,
    },
    { transaction },
  )
  await OrderLine.bulkCreate(
    lines.map(({ set, quantity, unitCents, lineCents, taxCents, gate, adviceId }) => ({
      orderId: order.id,
      wheelsetId: set.id,
      sku: set.sku,
      title: set.name,
      quantity,
      unitCents,
      lineCents,
      taxCents,
      options: gate.options,
      state: 'holding' as const,
      adviceId,
      limitCheck: gate.limitCheck === 'over-limit' ? ('unconfirmed' as const) : gate.limitCheck,
      limitKg: set.limitKg,
    })),
    { transaction },
  )
  await OrderEvent.create(
    { orderId: order.id, kind: 'created', toState: 'holding', actorRole: 'buyer', createdAt: now },
    { transaction },
  )
  await basket.update({ state: 'ordered' }, { transaction })
  return order
}

/**
 * Opens the payment page of a held order, or gives the one that is open. The gate runs once more: a limit that fell since is not paid past.
 * @throws AppError no-longer-fits (the order is dropped, the basket open again), payment-unavailable (the order stays held, try again)
 */
export async function startPayment(deps: Deps, orderId: number): Promise<string> {
  const { payments, config, clock } = deps
  const order = await Order.findByPk(orderId, { rejectOnEmpty: true })
  if (order.state !== 'holding' || (order.holdExpiresAt ?? clock()) <= clock()) throw new AppError('hold-lapsed', 409)
  const problems = await checkOrder(deps, order)
  if (problems.length > 0) {
    await dropOrder(deps, order.id, 'lapsed', { reason: 'no-longer-fits' })
    throw new AppError('no-longer-fits', 409, { problems })
  }
  if (order.payUrl !== null) return order.payUrl
  const lines = await OrderLine.findAll({ where: { orderId }, order: ['id'] })
  const key = orderToken(config, order.number)
  const page = `${config.PUBLIC_URL}/orders/${order.number}`
  const { sessionId, url } = await payments.startCheckout({
    orderId,
    orderNumber: order.number,
    currency: order.currency,
    email: order.email,
    locale: order.locale,
    lines: lines.map(({ title, quantity, unitCents }) => ({ title, quantity, unitCents })),
    deliveryCents: order.deliveryCents,
    deliveryTitle: textsIn(order.locale)('mail:sums.delivery'),
    totalCents: order.totalCents,
    successUrl: `${page}?key=${key}&paid=1`,
    cancelUrl: `${page}/left?key=${key}`,
    // Both from the order's own creation: a repeat after a crash sends the same bytes under the same key, and gets the same page.
    expiresAt: new Date(order.createdAt.getTime() + PAY_PAGE_MS),
    idempotencyKey: `order-${order.number}-1`,
  })
  await order.update({ stripeSessionId: sessionId, payUrl: url })
  return url
}
