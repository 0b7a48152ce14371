/** Mails about an order, in the buyer's language at order time. A subject never names a mass; neither does the body. */
import type { Transaction } from 'sequelize'
import type { Config } from '../config.ts'
import { orderUrl } from '../features/checkout/order-token.ts'
import { textsIn } from '../http/texts.ts'
import { Market } from '../models/market.ts'
import { OrderLine } from '../models/order-line.ts'
import type { Order } from '../models/order.ts'
import { OutboxMail } from '../models/outbox-mail.ts'
import { renderMail, type Part } from './html.ts'

export type OrderMailKind = 'receipt' | 'question' | 'refund' | 'sold-meanwhile'

interface Facts {
  /** Refunds: how much, and the refund's own reference. */
  amountCents?: number
  ref?: string
}

/** Writes the mail into the outbox, inside the transaction that made it true; kind and ref together are unique, so it is written once. */
export async function queueOrderMail(
  config: Pick<Config, 'SESSION_SECRET' | 'PUBLIC_URL'>,
  order: Order,
  kind: OrderMailKind,
  now: Date,
  transaction: Transaction,
  facts: Facts = {},
) {
  const lines = await OrderLine.findAll({ where: { orderId: order.id }, order: ['id'], transaction })
  const market = await Market.findByPk(order.market, { transaction })
  const mail = writeOrderMail(config, order, lines, market, kind, facts)
  const ref = facts.ref ?? order.number
  const known = await OutboxMail.count({ where: { kind, ref }, transaction })
  if (known > 0) return
  await OutboxMail.create(
    {
      orderId: order.id,
      kind,
      ref,
      recipient: order.email,
      locale: order.locale,
      ...mail,
      state: 'queued',
      nextTryAt: now,
    },
    { transaction },
  )
}

function writeOrderMail(
  config: Pick<Config, 'SESSION_SECRET' | 'PUBLIC_URL'>,
  order: Order,
  lines: readonly OrderLine[],
  market: Market | null,
  kind: OrderMailKind,
  { amountCents = order.totalCents }: Facts,
) {
  const t = textsIn(order.locale)
  const language = order.locale === 'pt' ? 'pt-PT' : 'en-GB'
  const money = (cents: number) =>
    new Intl.NumberFormat(language, { style: 'currency', currency: order.currency }).format(cents / 100)
  const key = (name: string) => `mail:${kind}.${name}`
  const values = { number: order.number, name: order.name, amount: money(amountCents) }
  const sums: Part = {
    kind: 'rows',
    rows: [
      ...lines.map(({ quantity, title, lineCents }) => [`${quantity} × ${title}`, money(lineCents)] as const),
      [t('mail:sums.delivery'), money(order.deliveryCents)],
      market?.taxIncluded === false ? [t('mail:sums.taxAtDoor'), ''] : [t('mail:sums.tax'), money(order.taxCents)],
    ],
    total: [t('mail:sums.total'), money(order.totalCents)],
  }
  const parts: Part[] = [
    { kind: 'text', text: t('mail:hello', values) },
    { kind: 'text', text: t(key('text'), values) },
  ]
  if (kind === 'receipt') {
    parts.push({ kind: 'heading', text: t('mail:sums.heading') }, sums)
    const { line1, line2, postcode, city, region, country } = order.delivery
    const place = [order.delivery.name, line1, line2, `${postcode} ${city}`, region, country].filter(Boolean).join(', ')
    parts.push({ kind: 'rows', rows: [[t('mail:sums.deliveryTo'), place]] })
    parts.push({
      kind: 'text',
      text: t('mail:receipt.delivery', { from: market?.deliveryDaysFrom ?? 0, to: market?.deliveryDaysTo ?? 0 }),
    })
    parts.push({ kind: 'text', text: t('mail:receipt.return') })
    parts.push({ kind: 'caution', text: t('mail:receipt.caution') })
  }
  if (kind === 'refund' && order.state === 'dropped') parts.push({ kind: 'text', text: t('mail:refund.whole') })
  parts.push({ kind: 'link', text: t('mail:openOrder'), url: orderUrl(config, order.number) })
  return renderMail(order.locale, t(key('subject'), values), parts, t('mail:foot'))
}
