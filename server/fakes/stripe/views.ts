/** The objects as the SDK expects them on the wire. Only the fields that the public reference names and the shop or its tests read. */
import { amountOf, type Charge, type Intent, type Refund, type Session, type State, type StripeEvent } from './state.ts'

type Json = Record<string, unknown>

export const sessionView = (session: Session, payUrl: string, expanded: Intent | null = null): Json => ({
  id: session.id,
  object: 'checkout.session',
  amount_subtotal: amountOf(session),
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
  payment_intent: expanded ? intentView(expanded) : session.intentId,
  payment_method_types: ['card'],
  payment_status: session.paid ? 'paid' : 'unpaid',
  status: session.status,
  success_url: session.successUrl,
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
  metadata: {},
  payment_intent: refund.intentId,
  status: 'succeeded',
})

export const lineItemsView = (session: Session): Json => ({
  object: 'list',
  has_more: false,
  url: `/v1/checkout/sessions/${session.id}/line_items`,
  data: session.lines.map(({ name, unitAmount, quantity }, index) => ({
    id: `li_${session.id.slice(8)}_${index}`,
    object: 'item',
    amount_total: unitAmount * quantity,
    currency: session.currency,
    description: name,
    price: { object: 'price', currency: session.currency, unit_amount: unitAmount },
    quantity,
  })),
})

export const eventView = (event: StripeEvent): Json => ({
  id: event.id,
  object: 'event',
  api_version: '2026-10-28.endive',
  created: event.created,
  data: { object: event.object },
  livemode: false,
  pending_webhooks: 1,
  request: { id: null, idempotency_key: null },
  type: event.type,
})

/** Newest first, after a cursor, at most 100. */
export function page<T extends { id: string }>(
  url: string,
  items: readonly T[],
  view: (item: T) => Json,
  query: Record<string, unknown>,
): Json {
  const limit = Math.min(100, Math.max(1, Number(query.limit ?? 10) || 10))
  const after =
    typeof query.starting_after === 'string' ? items.findIndex(({ id }) => id === query.starting_after) + 1 : 0
  const shown = items.slice(after, after + limit)
  return { object: 'list', url, has_more: after + shown.length < items.length, data: shown.map(view) }
}

export const newestFirst = (state: State) => ({
  sessions: Object.values(state.memory.sessions).sort((a, b) => b.created - a.created),
  events: [...state.memory.events].reverse(),
})
