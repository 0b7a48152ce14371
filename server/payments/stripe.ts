/** The payment processor through its own SDK: the hosted service, or the local stand-in that speaks the same wire protocol. */
import Stripe from 'stripe'
import type { Config } from '../config.ts'
import { AppError } from '../http/errors.ts'
import type { CheckoutRequest, CheckoutState, PaymentEvent, Payments } from './index.ts'

/** The SDK accepts a stamp from the future; we do not, beyond the same five minutes it allows for the past. */
const TOLERANCE_S = 300

export function createStripe(config: Config, clock: () => Date): Payments {
  const local = config.PAYMENTS === 'stripe-fake'
  const stripe = new Stripe(config.STRIPE_SECRET_KEY, {
    ...(local ? { host: '127.0.0.1', port: config.STRIPE_FAKE_PORT, protocol: 'http' as const } : {}),
    maxNetworkRetries: 2,
    timeout: 10_000,
    telemetry: false,
  })

  return {
    async startCheckout(request) {
      const session = await stripe.checkout.sessions
        .create(sessionParams(request), { idempotencyKey: request.idempotencyKey })
        .catch(unavailable)
      if (session.url === null) throw new AppError('payment-unavailable', 503)
      return { sessionId: session.id, url: session.url }
    },

    async readCheckout(sessionId) {
      return stateOf(await stripe.checkout.sessions.retrieve(sessionId).catch(unavailable))
    },

    async expireCheckout(sessionId) {
      // Already expired or paid: the state is read afterwards in any case.
      await stripe.checkout.sessions.expire(sessionId).catch((error: unknown) => {
        if (!(error instanceof Stripe.errors.StripeInvalidRequestError)) unavailable(error)
      })
    },

    readEvent(rawBody, signature) {
      let event: Stripe.Event
      try {
        event = stripe.webhooks.constructEvent(
          rawBody,
          signature,
          config.STRIPE_WEBHOOK_SECRET,
          TOLERANCE_S,
          undefined,
          clock().getTime(),
        )
      } catch {
        throw new AppError('bad-signature', 400)
      }
      const stamped = Number(/(?:^|,)t=(\d+)/.exec(signature)?.[1])
      if (stamped > clock().getTime() / 1000 + TOLERANCE_S) throw new AppError('bad-signature', 400)
      return eventOf(event)
    },

    async refund({ paymentIntentId, amountCents, idempotencyKey }) {
      const refund = await stripe.refunds
        .create({ payment_intent: paymentIntentId, amount: amountCents }, { idempotencyKey })
        .catch(unavailable)
      if (refund.status === 'failed' || refund.status === 'canceled')
        throw new AppError('payment-refused', 409, { reason: refund.failure_reason ?? refund.status })
      return { refundId: refund.id }
    },
  }
}

function unavailable(error: unknown): never {
  if (error instanceof Stripe.errors.StripeInvalidRequestError)
    throw new AppError('payment-refused', 409, { reason: error.code ?? '' })
  if (error instanceof Stripe.errors.StripeError) throw new AppError('payment-unavailable', 503)
  throw error
}

function sessionParams(request: CheckoutRequest): Stripe.Checkout.SessionCreateParams {
  const currency = request.currency.toLowerCase()
  const item = (name: string, unitCents: number, quantity: number) => ({
    quantity,
    price_data: { currency, unit_amount: unitCents, product_data: { name } },
  })
  return {
    mode: 'payment',
    client_reference_id: request.orderNumber,
    customer_email: request.email,
    locale: request.locale,
    line_items: [
      ...request.lines.map(({ title, unitCents, quantity }) => item(title, unitCents, quantity)),
      ...(request.deliveryCents > 0 ? [item(request.deliveryTitle, request.deliveryCents, 1)] : []),
    ],
    metadata: { orderNumber: request.orderNumber },
    payment_intent_data: { metadata: { orderNumber: request.orderNumber } },
    success_url: request.successUrl,
    cancel_url: request.cancelUrl,
    expires_at: Math.floor(request.expiresAt.getTime() / 1000),
  }
}

function stateOf(session: Stripe.Checkout.Session): CheckoutState {
  const intent = session.payment_intent
  return {
    sessionId: session.id,
    status: session.status === 'complete' ? 'complete' : session.status === 'expired' ? 'expired' : 'open',
    paid: session.payment_status === 'paid',
    amountCents: session.amount_total ?? 0,
    currency: (session.currency ?? '').toUpperCase(),
    orderNumber: session.client_reference_id,
    paymentIntentId: typeof intent === 'string' ? intent : (intent?.id ?? null),
  }
}

function eventOf(event: Stripe.Event): PaymentEvent {
  const object = event.data.object as { id?: string; object?: string }
  return {
    eventId: event.id,
    type: event.type,
    created: new Date(event.created * 1000),
    sessionId: object.object === 'checkout.session' ? (object.id ?? null) : null,
    objectId: object.id ?? '',
    payload: event,
  }
}
