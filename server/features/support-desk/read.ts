/** One order with everything that was said, paid, sent and done about it. */
import type { DeskMoney, DeskOrder, FrozenAdvice } from '#contract/support-desk.ts'
import { notFound } from '../../http/errors.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'
import { LedgerEntry } from '../../models/ledger-entry.ts'
import { Market } from '../../models/market.ts'
import { Order } from '../../models/order.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { OutboxMail } from '../../models/outbox-mail.ts'
import { Refund } from '../../models/refund.ts'
import { User } from '../../models/user.ts'
import { Wheelset } from '../../models/wheelset.ts'
import { refundedLines } from '../checkout/refunds.ts'
import { frozenAdviceView } from './frozen-advice.ts'

export async function findOrder(number: string): Promise<Order> {
  const order = await Order.findOne({ where: { number } })
  if (!order) throw notFound()
  return order
}

const linesOf = (order: Order) =>
  OrderLine.findAll({
    where: { orderId: order.id },
    include: [{ model: Wheelset, as: 'wheelset', attributes: ['slug'] }],
    order: ['id'],
  })

export async function readDeskOrder(number: string): Promise<DeskOrder> {
  const order = await findOrder(number)
  const where = { orderId: order.id }
  const [lines, refunded, mails, events, money] = await Promise.all([
    linesOf(order),
    refundedLines(order.id),
    OutboxMail.findAll({ where, order: ['id'] }),
    OrderEvent.findAll({
      where,
      include: [{ model: User, as: 'actor', attributes: ['name'] }],
      order: ['createdAt', 'id'],
    }),
    readMoney(order),
  ])
  const { delivery } = order
  return {
    orderNumber: order.number,
    name: order.name,
    email: order.email,
    locale: order.locale,
    market: order.market,
    state: order.state,
    placedAt: order.placedAt?.toISOString() ?? null,
    createdAt: order.createdAt.toISOString(),
    delivery: {
      ...delivery,
      line2: delivery.line2 ?? null,
      region: delivery.region ?? null,
      phone: delivery.phone ?? null,
    },
    lines: lines.map((line) => ({
      id: line.id,
      sku: line.sku,
      slug: line.wheelset?.slug ?? null,
      title: line.title,
      quantity: line.quantity,
      unitCents: line.unitCents,
      lineCents: line.lineCents,
      taxCents: line.taxCents,
      options: line.options,
      state: line.state,
      refunded: refunded.has(line.id),
      adviceId: line.adviceId,
      limitCheck: line.limitCheck,
      limitKg: line.limitKg,
    })),
    money,
    mails: mails.map((mail) => ({
      id: mail.id,
      kind: mail.kind,
      recipient: mail.recipient,
      locale: mail.locale,
      subject: mail.subject,
      text: mail.text,
      state: mail.state,
      attempts: mail.attempts,
      sentAt: mail.sentAt?.toISOString() ?? null,
      lastError: mail.lastError,
      createdAt: mail.createdAt.toISOString(),
    })),
    timeline: events.map((event) => ({
      id: event.id,
      kind: event.kind,
      fromState: event.fromState,
      toState: event.toState,
      actorName: event.actor?.name ?? null,
      actorRole: event.actorRole,
      reason: event.reason,
      createdAt: event.createdAt.toISOString(),
    })),
    advice: await readAdvice(lines, false),
  }
}

async function readMoney(order: Order): Promise<DeskMoney> {
  const where = { orderId: order.id }
  const [ledger, refunds, market] = await Promise.all([
    LedgerEntry.findAll({ where, order: ['id'] }),
    Refund.findAll({ where, include: [{ model: User, as: 'author', attributes: ['name'] }], order: ['id'] }),
    Market.findByPk(order.market),
  ])
  const sum = (kind: 'taken' | 'refunded') =>
    ledger.filter((entry) => entry.kind === kind).reduce((total, { amountCents }) => total + amountCents, 0)
  const onTheWay = refunds
    .filter(({ state }) => state === 'asked')
    .reduce((total, { amountCents }) => total + amountCents, 0)
  const takenCents = sum('taken')
  const refundedCents = -sum('refunded')
  return {
    currency: order.currency,
    goodsCents: order.goodsCents,
    deliveryCents: order.deliveryCents,
    taxCents: order.taxCents,
    totalCents: order.totalCents,
    taxIncluded: market?.taxIncluded ?? true,
    takenCents,
    refundedCents,
    leftToRefundCents: Math.max(0, takenCents - refundedCents - onTheWay),
    ledger: ledger.map(({ kind, amountCents, ref, createdAt }) => ({
      kind,
      amountCents,
      ref,
      createdAt: createdAt.toISOString(),
    })),
    refunds: refunds.map((refund) => ({
      id: refund.id,
      amountCents: refund.amountCents,
      reason: refund.reason,
      state: refund.state,
      authorName: refund.author?.name ?? null,
      createdAt: refund.createdAt.toISOString(),
    })),
  }
}

async function readAdvice(lines: readonly OrderLine[], reveal: boolean): Promise<FrozenAdvice[]> {
  const ids = [...new Set(lines.flatMap(({ adviceId }) => (adviceId === null ? [] : [adviceId])))]
  const snapshots = await AdviceSnapshot.findAll({ where: { id: ids }, order: ['createdAt', 'id'] })
  const skus = lines.map(({ sku }) => sku)
  return snapshots.map((snapshot) => frozenAdviceView(snapshot, skus, reveal))
}

/** The order's advice with the body mass in it. Only for a caller whose reason has been written to the audit. */
export const readRevealedAdvice = async (order: Order) => readAdvice(await linesOf(order), true)
