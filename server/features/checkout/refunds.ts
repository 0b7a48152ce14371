/** Money back. Our own row first, then the processor, then ledger, event and mail; never more than what was taken and is left. */
import { Op, type Transaction } from 'sequelize'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../http/errors.ts'
import { queueOrderMail } from '../../mail/order-mails.ts'
import { LedgerEntry } from '../../models/ledger-entry.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { Refund } from '../../models/refund.ts'
import { moneyOf } from './money.ts'
import { machine, moveOrder, type Mover } from './move-order.ts'
import { putBack } from './stock.ts'

export interface RefundInput {
  orderNumber: string
  /** Either an amount, or the ids of whole lines. */
  amountCents?: number | undefined
  lineIds?: readonly number[] | undefined
  reason: string
  actor: Mover & { name: string }
  /** A repeat with the same key carries on with the same refund. */
  idempotencyKey: string
  /** Runs inside the transaction that asks for the refund: the audit row of a staff write. */
  alongside?: (refund: Refund, transaction: Transaction) => Promise<void>
}

/**
 * @throws AppError refund-too-much (409, what is left), nothing-to-refund, no-such-line, line-refunded;
 *   refund-refused: the processor said no, the row is marked failed;
 *   refund-unconfirmed: nobody can say whether it was done, so the row stays asked for, its amount is set aside, and the job asks again with the same key
 */
export async function refundOrder(deps: Deps, input: RefundInput): Promise<{ refund: Refund; leftCents: number }> {
  const { idempotencyKey, actor } = input
  const found = await Order.findOne({ where: { number: input.orderNumber } })
  if (!found) throw notFound()
  const refund = await inTransaction(deps.db, async (transaction) => {
    // The row lock makes two refunds of one order follow each other, so their sum is always seen.
    const order = await Order.findByPk(found.id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
    const known = await Refund.findOne({ where: { orderId: order.id, idempotencyKey }, transaction })
    return known ? askAgain(known, order, transaction) : ask(deps, order, input, transaction)
  })
  if (refund.state !== 'done') await carryOut(deps, refund, actor).catch(inRefundWords)
  const { leftCents } = await moneyOf(found.id)
  return { refund, leftCents }
}

function inRefundWords(error: unknown): never {
  if (!(error instanceof AppError)) throw error
  if (error.code === 'payment-refused') throw new AppError('refund-refused', 409, error.data)
  if (error.code === 'payment-unavailable') throw new AppError('refund-unconfirmed', 503)
  throw error
}

async function ask(deps: Deps, order: Order, input: RefundInput, transaction: Transaction): Promise<Refund> {
  const { leftCents } = await moneyOf(order.id, transaction)
  if (order.stripePaymentIntent === null || leftCents <= 0) throw new AppError('nothing-to-refund', 409)
  const lineIds = input.amountCents === undefined ? [...new Set(input.lineIds ?? [])] : null
  const amountCents = input.amountCents ?? (await linesCents(order, lineIds ?? [], transaction))
  checkLeft(order, amountCents, leftCents)
  const { reason, actor, idempotencyKey } = input
  const asked = await Refund.create(
    { orderId: order.id, amountCents, lineIds, reason, authorId: actor.id, idempotencyKey, createdAt: deps.clock() },
    { transaction },
  )
  await input.alongside?.(asked, transaction)
  return asked
}

async function askAgain(known: Refund, order: Order, transaction: Transaction): Promise<Refund> {
  if (known.state !== 'failed') return known
  const { leftCents } = await moneyOf(order.id, transaction)
  checkLeft(order, known.amountCents, leftCents)
  await checkLines(order, known.lineIds ?? [], transaction)
  return known.update({ state: 'asked' }, { transaction })
}

function checkLeft({ currency }: Order, amountCents: number, leftCents: number) {
  if (amountCents > leftCents) throw new AppError('refund-too-much', 409, { leftCents, amountCents, currency })
}

/** Ids of the lines that went back whole, or are on their way. */
export async function refundedLines(orderId: number, transaction?: Transaction): Promise<Set<number>> {
  const refunds = await Refund.findAll({ where: { orderId, state: ['asked', 'done'] }, transaction })
  return new Set(refunds.flatMap(({ lineIds }) => lineIds ?? []))
}

/** Somebody else's earlier refund of the same line is not paid a second time out of what the other lines cost. */
async function checkLines(order: Order, lineIds: readonly number[], transaction: Transaction): Promise<Set<number>> {
  const gone = await refundedLines(order.id, transaction)
  if (lineIds.some((id) => gone.has(id))) throw new AppError('line-refunded', 409)
  return gone
}

/** What whole lines cost, with tax where it came on top. The last of an order's lines to go back brings the delivery charge along. */
async function linesCents(order: Order, lineIds: readonly number[], transaction: Transaction): Promise<number> {
  const lines = await OrderLine.findAll({ where: { orderId: order.id }, transaction })
  const picked = lines.filter(({ id }) => lineIds.includes(id))
  if (picked.length === 0 || picked.length !== lineIds.length) throw new AppError('no-such-line', 409)
  const gone = await checkLines(order, lineIds, transaction)
  const taxOnTop = order.totalCents > order.goodsCents + order.deliveryCents
  const goods = picked.reduce((sum, { lineCents, taxCents }) => sum + lineCents + (taxOnTop ? taxCents : 0), 0)
  const last = lines.every(({ id }) => gone.has(id) || lineIds.includes(id))
  return goods + (last ? order.deliveryCents : 0)
}

/** The shop itself gives back all that is left, for a cause that the buyer is told. Written with the cause; carried out after. */
export async function askMachineRefund(
  deps: Pick<Deps, 'clock'>,
  order: Order,
  reason: 'sold-meanwhile',
  transaction: Transaction,
): Promise<Refund> {
  const { leftCents: amountCents } = await moneyOf(order.id, transaction)
  const idempotencyKey = `${reason}-${order.id}`
  const row = { orderId: order.id, amountCents, reason, authorId: null, idempotencyKey, createdAt: deps.clock() }
  return Refund.create(row, { transaction })
}

/** Asks the processor and writes down what came of it. Under one key for each refund, so it may be called again until it is known. */
export async function carryOut(deps: Deps, refund: Refund, by: Mover): Promise<void> {
  const { db, payments, clock, config } = deps
  const order = await Order.findByPk(refund.orderId, { rejectOnEmpty: true })
  const paymentIntentId = order.stripePaymentIntent ?? ''
  const { amountCents, reason } = refund
  const event = { orderId: order.id, actorId: by.id, actorRole: by.role, reason }
  let refundId: string
  try {
    const idempotencyKey = `refund-${refund.id}-${paymentIntentId}`
    refundId = (await payments.refund({ paymentIntentId, amountCents, idempotencyKey })).refundId
  } catch (error) {
    if (error instanceof AppError && error.code === 'payment-refused') {
      await refund.update({ state: 'failed' })
      await OrderEvent.create({ ...event, kind: 'refund-failed', data: { amountCents }, createdAt: clock() })
      deps.log.error({ order: order.number, refund: refund.id }, 'the processor refused a refund')
    }
    throw error
  }
  await inTransaction(db, async (transaction) => {
    const locked = await Order.findByPk(order.id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
    await refund.reload({ transaction })
    if (refund.state === 'done') return
    await refund.update({ state: 'done', stripeRefundId: refundId }, { transaction })
    const { currency, id: orderId } = order
    await LedgerEntry.create(
      { orderId, kind: 'refunded', amountCents: -amountCents, currency, ref: refundId, createdAt: clock() },
      { transaction },
    )
    await OrderEvent.create({ ...event, kind: 'refunded', data: { amountCents }, createdAt: clock() }, { transaction })
    const { takenCents, refundedCents } = await moneyOf(orderId, transaction)
    // All the money back before anything was built: the order ends and the wheelset goes back on the shelf.
    const whole = refundedCents === takenCents
    if (whole && (await moveOrder(deps, locked, 'refunded-whole', by, transaction, { reason })))
      await putBack(db, await OrderLine.findAll({ where: { orderId }, transaction }), transaction)
    const mail = refund.authorId === null ? 'sold-meanwhile' : 'refund'
    await queueOrderMail(config, locked, mail, clock(), transaction, { amountCents, ref: refundId })
  })
}

const WAIT_MS = 60_000

/** Refunds whose outcome is not known yet, asked for again. @returns how many are done now */
export async function finishRefunds(deps: Deps): Promise<number> {
  const before = new Date(deps.clock().getTime() - WAIT_MS)
  const open = await Refund.findAll({ where: { state: 'asked', createdAt: { [Op.lte]: before } }, limit: 50 })
  let done = 0
  for (const refund of open) {
    try {
      await carryOut(deps, refund, { ...machine, id: refund.authorId })
      done += 1
    } catch (err) {
      deps.log.warn({ err, refund: refund.id }, 'a refund still waits')
    }
  }
  return done
}
