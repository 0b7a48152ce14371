/**
 * What a payment page's state means for its order. The return page, the webhook and the reconciler all end here; whichever comes first places the
 * order, the others find it placed. An event only says where to look: the state is read from the processor.
 */
import type { Transaction } from 'sequelize'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { queueOrderMail } from '../../mail/order-mails.ts'
import { Basket } from '../../models/basket.ts'
import { LedgerEntry } from '../../models/ledger-entry.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { WebhookEvent } from '../../models/webhook-event.ts'
import type { CheckoutState, PaymentEvent } from '../../payments/index.ts'
import { checkOrder } from './check-order.ts'
import { dropOrder } from './drop-order.ts'
import { machine, moveOrder } from './move-order.ts'
import { refundMachine } from './refunds.ts'
import { reserve, takeOut } from './stock.ts'

/** @param event kept in the inbox in the same transaction as its effect; a second one with the same id changes nothing */
export async function settleCheckout(deps: Deps, sessionId: string, event?: PaymentEvent): Promise<void> {
  const state = await deps.payments.readCheckout(sessionId)
  const order = await findOrder(state)
  if (!order) {
    deps.log.warn({ sessionId }, 'payment page of no order of ours')
    if (event) await inTransaction(deps.db, (transaction) => keepEvent(deps, event, transaction))
    return
  }
  if (!state.paid) {
    if (state.status === 'expired') await dropOrder(deps, order.id, 'lapsed', { reason: 'payment-page-expired' })
    if (event) await inTransaction(deps.db, (transaction) => keepEvent(deps, event, transaction))
    return
  }
  const doubts = (await checkOrder(deps, order)).map(({ code }) => code)
  const unsold = await inTransaction(deps.db, async (transaction) => {
    if (event && !(await keepEvent(deps, event, transaction))) return false
    const locked = await Order.findByPk(order.id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
    return placePaid(deps, locked, state, doubts, transaction)
  })
  if (unsold) await giveBackUnsold(deps, order.id)
}

async function findOrder(state: CheckoutState): Promise<Order | null> {
  const bySession = await Order.findOne({ where: { stripeSessionId: state.sessionId } })
  if (bySession || state.orderNumber === null) return bySession
  // The process died between opening the page and noting it down: the page itself names the order.
  const byNumber = await Order.findOne({ where: { number: state.orderNumber, stripeSessionId: null } })
  return byNumber ? byNumber.update({ stripeSessionId: state.sessionId }) : null
}

/** @returns false where the event was seen before */
async function keepEvent(
  { clock }: Pick<Deps, 'clock'>,
  event: PaymentEvent,
  transaction: Transaction,
): Promise<boolean> {
  const { eventId, type, objectId, created, payload } = event
  const known = await WebhookEvent.count({ where: { eventId }, transaction })
  if (known > 0) return false
  await WebhookEvent.create(
    { eventId, type, objectId, created, payload: payload as Record<string, unknown>, receivedAt: clock() },
    { transaction },
  )
  return true
}

/** @returns true where the money is here but the wheelset is gone */
async function placePaid(
  deps: Deps,
  order: Order,
  state: CheckoutState,
  doubts: readonly string[],
  transaction: Transaction,
): Promise<boolean> {
  const { db, clock, config, log } = deps
  const ref = state.paymentIntentId ?? state.sessionId
  const alreadyTaken = await LedgerEntry.count({ where: { orderId: order.id, kind: 'taken' }, transaction })
  if (alreadyTaken > 0) return false
  const lines = await OrderLine.findAll({ where: { orderId: order.id }, transaction })
  const late = order.state === 'dropped'
  await LedgerEntry.create(
    {
      orderId: order.id,
      kind: 'taken',
      amountCents: state.amountCents,
      currency: order.currency,
      ref,
      createdAt: clock(),
    },
    { transaction },
  )
  await order.update({ stripePaymentIntent: state.paymentIntentId }, { transaction })
  if (late && (await reserve(db, lines, transaction))) return true
  if (!(await moveOrder(deps, order, 'paid', machine, transaction))) {
    log.error({ order: order.number, state: order.state }, 'paid in a state that does not take a payment')
    return false
  }
  await takeOut(db, lines, transaction)
  await order.update({ placedAt: clock(), payUrl: null, holdExpiresAt: null }, { transaction })
  if (order.basketId !== null) await Basket.update({ state: 'ordered' }, { where: { id: order.basketId }, transaction })

  const mismatch =
    state.amountCents !== order.totalCents || state.currency !== order.currency || state.orderNumber !== order.number
  if (mismatch) log.error({ order: order.number }, 'the payment does not match the order')
  const causes = [
    ...(mismatch ? ['amount-mismatch'] : []),
    ...doubts,
    ...(lines.some(({ limitCheck }) => limitCheck === 'unconfirmed') ? ['total-unconfirmed'] : []),
  ]
  await moveOrder(
    deps,
    order,
    causes.length > 0 ? 'queried' : 'cleared',
    machine,
    transaction,
    causes.length > 0 ? { reason: causes.join(', '), data: { causes } } : {},
  )
  await queueOrderMail(config, order, 'receipt', clock(), transaction)
  if (causes.length > 0) await queueOrderMail(config, order, 'question', clock(), transaction)
  return false
}

/** Paid, but the last one went meanwhile: all the money back, with an apology. Never "failed", never silent. */
async function giveBackUnsold(deps: Deps, orderId: number) {
  await refundMachine(deps, orderId, 'sold-meanwhile')
}
