/** The payment processor as the shop sees it. One shape, whether the hosted service or the local stand-in answers on the wire. */
import type { Currency, Locale } from '#contract/common.ts'

export interface CheckoutRequest {
  orderId: number
  orderNumber: string
  currency: Currency
  email: string
  locale: Locale
  lines: { title: string; quantity: number; unitCents: number }[]
  deliveryCents: number
  deliveryTitle: string
  totalCents: number
  successUrl: string
  cancelUrl: string
  expiresAt: Date
  idempotencyKey: string
}

export interface CheckoutState {
  sessionId: string
  status: 'open' | 'complete' | 'expired'
  paid: boolean
  amountCents: number
  currency: string
  orderNumber: string | null
  paymentIntentId: string | null
}

/** An event only says where to look; the code then reads the present state, so a repeated or late message does no harm. */
export interface PaymentEvent {
  eventId: string
  type: string
  created: Date
  sessionId: string | null
  objectId: string
  payload: unknown
}

export interface Payments {
  /** @throws AppError payment-unavailable (503: nobody can say whether it was done), payment-refused (409: it was not) */
  startCheckout(request: CheckoutRequest): Promise<{ sessionId: string; url: string }>
  readCheckout(sessionId: string): Promise<CheckoutState>
  expireCheckout(sessionId: string): Promise<void>
  /** @throws AppError bad-signature, 400 */
  readEvent(rawBody: Buffer, signature: string): PaymentEvent
  refund(request: {
    paymentIntentId: string
    amountCents: number
    idempotencyKey: string
  }): Promise<{ refundId: string }>
}
