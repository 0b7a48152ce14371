/** Money back. Our own row first, then the processor, then ledger, event and mail; never more than what was taken and is left. */
import type { Transaction } from 'sequelize'
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { AppError, notFound } from '../../http/errors.ts'
import { queueOrderMail, type OrderMailKind } from '../../mail/order-mails.ts'
import { LedgerEntry } from '../../models/ledger-entry.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { Refund } from '../../models/refund.ts'
import { machine, moveOrder, type Mover } from './move-order.ts'
import { putBack } from './stock.ts'

/** @returns cents: taken so far, given back or on the way back, and what is left */
export async function moneyOf(orderId: number, transaction?: Transaction) {
  const inside = transaction ? { transaction } : {}
  const entries = await LedgerEntry.findAll({ where: { orderId }, raw: true, ...inside })
  const asked = await Refund.findAll({ where: { orderId, state: 'asked' }, raw: true, ...inside })
  const takenCents = entries
    .filter(({ kind }) => kind === 'taken')
    .reduce((sum, { amountCents }) => sum + amountCents, 0)
  const refundedCents = -entries
    .filter(({ kind }) => kind === 'refunded')
    .reduce((sum, { amountCents }) => sum + amountCents, 0)
  const pendingCents = asked.reduce((sum, { amountCents }) => sum + amountCents, 0)
  return { takenCents, refundedCents, leftCents: takenCents - refundedCents - pendingCents }
}

export interface RefundInput {
  orderNumber: string
  /** Either an amount, or the ids of whole lines. */
  amountCents?: number | undefined
  lineIds?: readonly number[] | undefined
  reason: string
  actor: Mover & { name: string }
  idempotencyKey: string
  /** Runs inside the transaction that asks for the refund: the audit row of a staff write. */
  alongside?: (refund: Refund, transaction: Transaction) => Promise<void>
}

/**
 * @throws AppError refund-too-much (409, what is left), nothing-to-refund, payment-unavailable (the row is marked failed; try again)
 */
export async function refundOrder(deps: Deps, input: RefundInput): Promise<{ refund: Refund; leftCents: number }> {
  const found = await Order.findOne({ where: { number: input.orderNumber } })
  if (!found) throw notFound()
  const refund = await inTransaction(deps.db, async (transaction) => {
    // The row lock makes two refunds of one order follow each other, so their sum is always seen.
    const order = await Order.findByPk(found.id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
    const { leftCents } = await moneyOf(order.id, transaction)
    if (order.stripePaymentIntent === null || leftCents <= 0) throw new AppError('nothing-to-refund', 409)
    const amountCents = input.amountCents ?? (await linesCents(order.id, input.lineIds ?? [], transaction))
    if (amountCents > leftCents)
      throw new AppError('refund-too-much', 409, { leftCents, amountCents, currency: order.currency })
    const { reason, actor, idempotencyKey } = input
    const asked = await Refund.create(
      { orderId: order.id, amountCents, reason, authorId: actor.id, idempotencyKey, createdAt: deps.clock() },
      { transaction },
    )
    await input.alongside?.(asked, transaction)
    return asked
  })
  const { leftCents } = await carryOut(deps, refund, input.actor, 'refund')
  return { refund, leftCents }
}

async function linesCents(orderId: number, lineIds: readonly number[], transaction: Transaction): Promise<number> {
  const lines = await OrderLine.findAll({ where: { orderId, id: [...new Set(lineIds)] }, transaction })
  if (lines.length === 0 || lines.length !== new Set(lineIds).size) throw new AppError('no-such-line', 409)
  return lines.reduce((sum, { lineCents }) => sum + lineCents, 0)
}

async function carryOut(deps: Deps, refund: Refund, by: Mover, mail: OrderMailKind) {
  const { db, payments, clock, config } = deps
  const order = await Order.findByPk(refund.orderId, { rejectOnEmpty: true })
  let refundId: string
  try {
    const done = await payments.refund({
      paymentIntentId: order.stripePaymentIntent ?? '',
      amountCents: refund.amountCents,
      idempotencyKey: `refund-${refund.id}`,
    })
    refundId = done.refundId
  } catch (error) {
    await refund.update({ state: 'failed' })
    throw error
  }
  return inTransaction(db, async (transaction) => {
    const locked = await Order.findByPk(order.id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true })
    await refund.update({ state: 'done', stripeRefundId: refundId }, { transaction })
    const { amountCents, reason } = refund
    await LedgerEntry.create(
      {
        orderId: order.id,
        kind: 'refunded',
        amountCents: -amountCents,
        currency: order.currency,
        ref: refundId,
        createdAt: clock(),
      },
      { transaction },
    )
    const money = await moneyOf(order.id, transaction)
    await OrderEvent.create(
      {
        orderId: order.id,
        kind: 'refunded',
        actorId: by.id,
        actorRole: by.role,
        reason,
        data: { amountCents },
        createdAt: clock(),
      },
      { transaction },
    )
    // All the money back before anything was built: the order ends and the wheelset goes back on the shelf.
    if (money.leftCents === 0 && (await moveOrder(deps, locked, 'refunded-whole', by, transaction, { reason }))) {
      await putBack(db, await OrderLine.findAll({ where: { orderId: order.id }, transaction }), transaction)
    }
    await queueOrderMail(config, locked, mail, clock(), transaction, { amountCents, ref: refundId })
    return money
  })
}

/** The shop itself gives everything back, for a cause that the buyer is told. */
export async function refundMachine(deps: Deps, orderId: number, reason: 'sold-meanwhile') {
  const idempotencyKey = `${reason}-${orderId}`
  const known = await Refund.findOne({ where: { idempotencyKey } })
  if (known?.state === 'done') return
  const { leftCents } = await moneyOf(orderId)
  const refund =
    known ??
    (await Refund.create({
      orderId,
      amountCents: leftCents,
      reason,
      authorId: null,
      idempotencyKey,
      createdAt: deps.clock(),
    }))
  if (refund.amountCents > 0) await carryOut(deps, refund, machine, 'sold-meanwhile')
}
