/** One order as its buyer sees it: owner, guest with the key, or staff. Anybody else sees what an unknown number shows. */
import type { OrderView } from '#contract/checkout.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../http/errors.ts'
import type { SignedIn } from '../../http/session.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { OutboxMail } from '../../models/outbox-mail.ts'
import { opens } from './order-token.ts'
import { moneyOf } from './money.ts'

export interface Reader {
  user: SignedIn | null
  key: string | undefined
}

export async function findReadable(orderNumber: string, { user, key }: Reader): Promise<Order> {
  const order = await Order.findOne({ where: { number: orderNumber } })
  if (!order) throw notFound()
  const staff = user?.role === 'support' || user?.role === 'admin'
  const owner = user !== null && order.userId === user.id
  if (staff || owner || (key !== undefined && opens(key, order.tokenHash))) return order
  throw notFound()
}

/** Events that concern the buyer; notes and causes stay with the desk. */
const shown = new Set([
  'created',
  'paid',
  'queried',
  'cleared',
  'queued',
  'build-started',
  'handed-over',
  'arrived',
  'settled',
  'dropped',
  'expired',
  'refunded',
])

export async function viewOrder({ clock }: Pick<Deps, 'clock'>, order: Order): Promise<OrderView> {
  const [lines, events, mails, money] = await Promise.all([
    OrderLine.findAll({ where: { orderId: order.id }, order: ['id'] }),
    OrderEvent.findAll({ where: { orderId: order.id }, order: ['id'] }),
    OutboxMail.findAll({ where: { orderId: order.id }, order: ['id'] }),
    moneyOf(order.id),
  ])
  const open = order.state === 'holding' && order.holdExpiresAt !== null && order.holdExpiresAt > clock()
  return {
    orderNumber: order.number,
    state: order.state,
    email: order.email,
    locale: order.locale,
    market: order.market as OrderView['market'],
    currency: order.currency,
    delivery: order.delivery as OrderView['delivery'],
    lines: lines.map(
      ({ id, sku, title, quantity, unitCents, lineCents, taxCents, options, state, limitCheck, limitKg }) => ({
        ...{ id, sku, title, quantity, unitCents, lineCents, taxCents, options, state, limitCheck, limitKg },
      }),
    ),
    money: {
      goodsCents: order.goodsCents,
      deliveryCents: order.deliveryCents,
      taxCents: order.taxCents,
      totalCents: order.totalCents,
      takenCents: money.takenCents,
      refundedCents: money.refundedCents,
    },
    timeline: events
      .filter(({ kind }) => shown.has(kind))
      .map(({ kind, toState, createdAt }) => ({ kind, state: toState, at: createdAt.toISOString() })),
    mails: mails.map((mail) => ({
      id: mail.id,
      kind: mail.kind,
      subject: mail.subject,
      state: mail.state,
      at: (mail.sentAt ?? mail.createdAt).toISOString(),
      text: mail.text,
    })),
    payUrl: open ? order.payUrl : null,
    holdExpiresAt: order.holdExpiresAt?.toISOString() ?? null,
    createdAt: order.createdAt.toISOString(),
    placedAt: order.placedAt?.toISOString() ?? null,
  }
}
