/** The payment page of a held order. The gate runs once more right before: a limit that fell since is not paid past. */
import type { Transaction } from 'sequelize'
import type { BasketProblem } from '#contract/basket.ts'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../http/errors.ts'
import { textsIn } from '../../http/texts.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { checkOrder } from './check-order.ts'
import { HOLD_MS } from './hold-order.ts'
import { leaveOrder } from './leave-order.ts'
import { orderToken } from './order-token.ts'

/** Between the processor's least, 30 minutes, and our hold of 35: the page always closes first. */
const PAY_PAGE_MS = 32 * 60_000

/** What was asked for, kept before asking: a repeat after a crash sends the same bytes under the same key and gets the same page. */
interface Attempt {
  attempt: number
  expiresAt: Date
}

/** True once the page of a held order can no longer be paid, or no longer be opened. */
export const payPageIsOver = ({ holdExpiresAt }: Order, now: Date) =>
  holdExpiresAt === null || holdExpiresAt.getTime() - (HOLD_MS - PAY_PAGE_MS) <= now.getTime()

/**
 * @returns the address of the page that is open, or of a new one
 * @throws AppError no-longer-fits (the order is dropped, the basket open again), hold-lapsed, payment-unavailable (the order stays held, try again)
 */
export async function startPayment(deps: Deps, orderId: number): Promise<string> {
  let asked = await inTransaction(deps.db, (transaction) => prepare(deps, orderId, false, transaction))
  if ('problems' in asked) {
    // A page that is open is closed with it; a payment that was quicker counts, and waits in question.
    const order = await Order.findByPk(orderId, { rejectOnEmpty: true })
    const left = await leaveOrder(deps, order, 'lapsed', { reason: 'no-longer-fits' })
    if (left.state !== 'dropped') throw new AppError('already-ordered', 409)
    throw new AppError('no-longer-fits', 409, { problems: asked.problems })
  }
  if ('payUrl' in asked) return asked.payUrl
  try {
    return await openPage(deps, orderId, asked)
  } catch (error) {
    // The first call never arrived, and by now its time of closing is too near for the processor: asked afresh.
    const tooLate = asked.expiresAt.getTime() - deps.clock().getTime() < PAY_PAGE_MS - 60_000
    if (!(error instanceof AppError && error.code === 'payment-refused' && tooLate)) throw error
  }
  asked = await inTransaction(deps.db, (transaction) => prepare(deps, orderId, true, transaction))
  if (!('attempt' in asked)) throw new AppError('hold-lapsed', 409)
  return openPage(deps, orderId, asked)
}

async function prepare(
  deps: Deps,
  orderId: number,
  afresh: boolean,
  transaction: Transaction,
): Promise<{ problems: BasketProblem[] } | { payUrl: string } | Attempt> {
  const now = deps.clock()
  const order = await Order.findByPk(orderId, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
  if (order.state !== 'holding' || payPageIsOver(order, now)) throw new AppError('hold-lapsed', 409)
  const problems = await checkOrder(deps, order, transaction)
  if (problems.length > 0) return { problems }
  if (order.payUrl !== null) return { payUrl: order.payUrl }

  const where = { orderId, kind: 'pay-page' }
  const last = await OrderEvent.findOne({ where, order: [['id', 'DESC']], transaction })
  const kept = last?.data as { attempt: number; expiresAt: string } | undefined
  if (kept && !afresh) return { attempt: kept.attempt, expiresAt: new Date(kept.expiresAt) }
  const next = { attempt: (kept?.attempt ?? 0) + 1, expiresAt: new Date(now.getTime() + PAY_PAGE_MS) }
  await OrderEvent.create(
    { orderId, kind: 'pay-page', actorRole: 'machine', data: next, createdAt: now },
    { transaction },
  )
  await order.update({ holdExpiresAt: new Date(now.getTime() + HOLD_MS) }, { transaction })
  return next
}

async function openPage(deps: Deps, orderId: number, { attempt, expiresAt }: Attempt): Promise<string> {
  const { payments, config } = deps
  const order = await Order.findByPk(orderId, { rejectOnEmpty: true })
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
    expiresAt,
    // The digest makes it this shop's own: another database has an order of the same number.
    idempotencyKey: `order-${order.number}-${attempt}-${order.tokenHash.slice(0, 16)}`,
  })
  const [kept] = await Order.update(
    { stripeSessionId: sessionId, payUrl: url },
    { where: { id: orderId, state: 'holding' } },
  )
  if (kept > 0) return url
  // Left in another tab while the page was being made: nobody shall pay on it.
  await payments.expireCheckout(sessionId)
  throw new AppError('hold-lapsed', 409)
}
