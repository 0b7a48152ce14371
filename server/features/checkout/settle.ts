/**
 * What a payment page's state means for its order. The return page, the webhook and the reconciler all end here; whichever comes first places the
 * order, the others find it placed. An event only says where to look: the state is read from the processor.
 */
import type { Transaction } from 'sequelize'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../http/errors.ts'
import { queueOrderMail } from '../../mail/order-mails.ts'
import { Basket } from '../../models/basket.ts'
import { LedgerEntry } from '../../models/ledger-entry.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import type { CheckoutState, PaymentEvent } from '../../payments/index.ts'
import { checkOrder } from './check-order.ts'
import { dropOrder } from './drop-order.ts'
import { keepEvent } from './inbox.ts'
import { machine, moveOrder } from './move-order.ts'
import { askMachineRefund, carryOut } from './refunds.ts'
import { reserve, takeOut } from './stock.ts'

/**
 * @param event kept in the inbox in the same transaction as its effect
 * @throws UniqueConstraintError where the same event is being taken by another call
 */
export async function settleCheckout(deps: Deps, sessionId: string, event?: PaymentEvent): Promise<void> {
  const state = await readState(deps, sessionId)
  const order = state && (await findOrder(state))
  if (!state || !order) deps.log.warn({ sessionId }, 'payment page of no order of ours')
  else if (!state.paid && state.status === 'expired')
    await dropOrder(deps, order.id, 'lapsed', { reason: 'payment-page-expired' })
  const refund = await inTransaction(deps.db, async (transaction) => {
    if (event) await keepEvent(deps, event, transaction)
    if (!state?.paid || !order) return null
    const locked = await Order.findByPk(order.id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
    return placePaid(deps, locked, state, transaction)
  })
  // Should this fail, the refund stands asked for, and the job carries it out.
  if (refund) await carryOut(deps, refund, machine).catch((err: unknown) => deps.log.error({ err }, 'refund waits'))
}

async function readState({ payments }: Deps, sessionId: string): Promise<CheckoutState | null> {
  try {
    return await payments.readCheckout(sessionId)
  } catch (error) {
    if (error instanceof AppError && error.code === 'payment-refused') return null // the processor knows no such page
    throw error
  }
}

async function findOrder(state: CheckoutState): Promise<Order | null> {
  const bySession = await Order.findOne({ where: { stripeSessionId: state.sessionId } })
  if (bySession || state.orderNumber === null) return bySession
  // The process died between opening the page and noting it down: the page itself names the order.
  const byNumber = await Order.findOne({ where: { number: state.orderNumber, stripeSessionId: null } })
  return byNumber ? byNumber.update({ stripeSessionId: state.sessionId }) : null
}

/** @returns a refund to carry out, where the money is here but the wheelset is gone */
async function placePaid(deps: Deps, order: Order, state: CheckoutState, transaction: Transaction) {
  const { db, clock, config, log } = deps
  if ((await LedgerEntry.count({ where: { orderId: order.id, kind: 'taken' }, transaction })) > 0) return null
  const { amountCents, currency, paymentIntentId, sessionId, orderNumber } = state
  const lines = await OrderLine.findAll({ where: { orderId: order.id }, transaction })
  const ref = paymentIntentId ?? sessionId
  await LedgerEntry.create(
    { orderId: order.id, kind: 'taken', amountCents, currency: order.currency, ref, createdAt: clock() },
    { transaction },
  )
  await order.update({ stripePaymentIntent: paymentIntentId }, { transaction })
  if (order.state === 'dropped') {
    if (await reserve(db, lines, transaction)) return askMachineRefund(deps, order, 'sold-meanwhile', transaction)
    await closeBasketOf(order, transaction)
  }
  const problems = await checkOrder(deps, order, transaction)
  if (!(await moveOrder(deps, order, 'paid', machine, transaction))) {
    log.error({ order: order.number, state: order.state }, 'paid in a state that does not take a payment')
    return null
  }
  const counted = await takeOut(db, lines, transaction)
  await order.update({ placedAt: clock(), payUrl: null, holdExpiresAt: null }, { transaction })

  const mismatch = amountCents !== order.totalCents || currency !== order.currency || orderNumber !== order.number
  if (mismatch || !counted) log.error({ order: order.number, mismatch, counted }, 'a paid order needs a person')
  const causes = [
    ...(mismatch ? ['amount-mismatch'] : []),
    ...(counted ? [] : ['stock-count']),
    ...new Set(problems.map(({ code }) => code)),
    ...(lines.some(({ limitCheck }) => limitCheck === 'unconfirmed') ? ['total-unconfirmed'] : []),
  ]
  const clear = causes.length === 0
  const more = { reason: causes.join(', '), data: { causes, amountCents, currency } }
  await moveOrder(deps, order, clear ? 'cleared' : 'queried', machine, transaction, clear ? {} : more)
  await queueOrderMail(config, order, 'receipt', clock(), transaction)
  if (!clear) await queueOrderMail(config, order, 'question', clock(), transaction)
  return null
}

/** Paid after it was dropped: the basket that came back open then is bought now, unless it was ordered anew. */
async function closeBasketOf(order: Order, transaction: Transaction) {
  const where = { orderId: order.id, toState: 'dropped' as const }
  const dropped = await OrderEvent.findOne({ where, order: [['id', 'DESC']], transaction })
  const basketId = dropped?.data?.basketId
  if (typeof basketId === 'string')
    await Basket.update({ state: 'ordered' }, { where: { id: basketId, state: 'open' }, transaction })
}
