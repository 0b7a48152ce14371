/** The objects as the SDK expects them on the wire. Only the fields that the public reference names and the shop or its tests read. */
import { invalid, missing } from './errors.ts'
import { textAt, type Form } from './forms.ts'
import { amountOf, goodsOf, type Charge, type Intent, type Refund, type Session, type StripeEvent } from './state.ts'

export type Json = Record<string, unknown>

export const sessionView = (session: Session, payUrl: string): Json => ({
  id: session.id,
  object: 'checkout.session',
  amount_subtotal: goodsOf(session),
  amount_total: amountOf(session),
  cancel_url: session.cancelUrl,
  client_reference_id: session.clientReferenceId,
  created: session.created,
  currency: session.currency,
  customer_email: session.customerEmail,
  expires_at: session.expiresAt,
  livemode: false,
  locale: session.locale,
  metadata: session.metadata,
  mode: 'payment',
  payment_intent: session.intentId,
  payment_method_types: ['card'],
  payment_status: session.paid ? 'paid' : 'unpaid',
  shipping_cost: session.shipping
    ? { amount_subtotal: session.shipping.amount, amount_tax: 0, amount_total: session.shipping.amount }
    : null,
  status: session.status,
  success_url: session.successUrl,
  total_details: { amount_discount: 0, amount_shipping: session.shipping?.amount ?? 0, amount_tax: 0 },
  url: session.status === 'open' ? payUrl : null,
})

export const intentView = (intent: Intent): Json => ({
  id: intent.id,
  object: 'payment_intent',
  amount: intent.amount,
  amount_received: intent.status === 'succeeded' ? intent.amount : 0,
  created: intent.created,
  currency: intent.currency,
  last_payment_error: intent.lastError,
  latest_charge: intent.chargeId,
  livemode: false,
  metadata: intent.metadata,
  status: intent.status,
})

export const chargeView = (charge: Charge): Json => ({
  id: charge.id,
  object: 'charge',
  amount: charge.amount,
  amount_refunded: charge.refunded,
  captured: true,
  created: charge.created,
  currency: charge.currency,
  livemode: false,
  paid: true,
  payment_intent: charge.intentId,
  refunded: charge.refunded === charge.amount,
  status: 'succeeded',
})

export const refundView = (refund: Refund): Json => ({
  id: refund.id,
  object: 'refund',
  amount: refund.amount,
  charge: refund.chargeId,
  created: refund.created,
  currency: refund.currency,
  metadata: refund.metadata,
  payment_intent: refund.intentId,
  reason: refund.reason,
  status: 'succeeded',
})

export function lineItemsView(session: Session, query: Form): Json {
  const items = session.lines.map((line, index) => ({ ...line, id: `li_${session.id.slice(8)}_${index}` }))
  const view = ({ id, name, unitAmount, quantity }: (typeof items)[number]): Json => ({
    id,
    object: 'item',
    amount_subtotal: unitAmount * quantity,
    amount_total: unitAmount * quantity,
    currency: session.currency,
    description: name,
    price: { object: 'price', currency: session.currency, unit_amount: unitAmount },
    quantity,
  })
  return page(`/v1/checkout/sessions/${session.id}/line_items`, items, view, query)
}

export const eventView = (event: StripeEvent): Json => ({
  id: event.id,
  object: 'event',
  api_version: '2026-10-28.endive',
  created: event.created,
  data: { object: event.object },
  livemode: false,
  pending_webhooks: event.delivery === 'waiting' ? 1 : 0,
  request: { id: null, idempotency_key: null },
  type: event.type,
})

/**
 * One page of a list: newest first, after a cursor, 10 unless asked for, at most 100.
 * @throws Refusal where nothing in the list has the cursor's id
 */
export function page<T extends { id: string }>(
  url: string,
  items: readonly T[],
  view: (item: T) => Json,
  query: Form,
): Json {
  const limit = Number(textAt(query, 'limit') ?? 10)
  if (!Number.isInteger(limit) || limit < 1 || limit > 100)
    throw invalid('limit is a whole number from 1 to 100.', 'limit', 'parameter_invalid_integer')
  const cursor = textAt(query, 'starting_after')
  const before = cursor === null ? -1 : items.findIndex(({ id }) => id === cursor)
  if (cursor !== null && before < 0) throw missing(cursor, 'starting_after')
  const shown = items.slice(before + 1, before + 1 + limit)
  return { object: 'list', url, has_more: before + 1 + shown.length < items.length, data: shown.map(view) }
}
