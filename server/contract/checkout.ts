/** Ordering and paying. `key` opens an order to a guest; it comes by mail and is kept only as a digest. */
import { z } from 'zod'
import { cents, currency, isoTime, locale, marketCode } from './common.ts'
import { lineOptions } from './basket.ts'

const line = (most: number) => z.string().trim().min(1).max(most)

export const delivery = z.strictObject({
  name: line(80),
  line1: line(120),
  line2: z.string().trim().max(120).optional(),
  postcode: z.string().trim().min(2).max(12),
  city: line(80),
  region: z.string().trim().max(80).optional(),
  country: marketCode,
  phone: z
    .string()
    .trim()
    .max(30)
    .regex(/^[+\d\s().-]*$/, 'phone')
    .optional(),
})
export type Delivery = z.infer<typeof delivery>

export const orderRequest = z.strictObject({
  basketId: z.uuid(),
  email: z.email().max(190),
  delivery,
  locale: locale.optional(),
  /** Needed where a wheelset was not chosen from a fitting: the shopper has added up the ready-to-ride total against the limit. */
  limitAcknowledged: z.boolean().optional(),
  /** The total the shopper saw; another one now is a refusal that names both. */
  expectedTotalCents: cents.optional(),
})
export type OrderRequest = z.output<typeof orderRequest>

export const orderPlaced = z.object({ orderNumber: z.string(), payUrl: z.string(), orderUrl: z.string() })
export const payReply = z.object({ payUrl: z.string() })

/** In the order of an order's life; `dropped` ends it early. */
export const orderStates = [
  'holding',
  'placed',
  'query',
  'cleared',
  'queued',
  'on-bench',
  'handed-over',
  'arrived',
  'settled',
  'dropped',
] as const
export const orderState = z.enum(orderStates)
export type OrderState = z.infer<typeof orderState>

export const orderMail = z.object({
  id: z.number().int(),
  kind: z.string(),
  subject: z.string(),
  state: z.string(),
  at: isoTime,
  text: z.string(),
})

export const order = z.object({
  orderNumber: z.string(),
  state: orderState,
  email: z.string(),
  locale,
  market: marketCode,
  currency,
  delivery,
  lines: z.array(
    z.object({
      id: z.number().int(),
      sku: z.string(),
      title: z.string(),
      quantity: z.number().int(),
      unitCents: cents,
      lineCents: cents,
      taxCents: cents,
      options: lineOptions,
      state: z.string(),
      limitCheck: z.enum(['within', 'no-margin', 'unconfirmed']),
      limitKg: z.number(),
    }),
  ),
  money: z.object({
    goodsCents: cents,
    deliveryCents: cents,
    taxCents: cents,
    totalCents: cents,
    takenCents: cents,
    refundedCents: cents,
  }),
  timeline: z.array(z.object({ kind: z.string(), state: z.string().nullable(), at: isoTime })),
  mails: z.array(orderMail),
  /** While the order is held unpaid. */
  payUrl: z.string().nullable(),
  holdExpiresAt: isoTime.nullable(),
  createdAt: isoTime,
  placedAt: isoTime.nullable(),
})
export type OrderView = z.infer<typeof order>

export const orderKey = z.strictObject({ key: z.string().max(100).optional() })
export const orderParams = z.object({ orderNumber: z.string().max(20) })
export const webhookReceived = z.object({ received: z.literal(true) })
