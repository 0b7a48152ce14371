/** The support desk: finding an order, everything about it on one page, refunds, notes. */
import { z } from 'zod'
import { cents, currency, isoTime, listOf, locale, staffReason } from './common.ts'
import { lineOptions } from './basket.ts'
import { orderState } from './checkout.ts'

export const limitChecks = ['within', 'no-margin', 'unconfirmed'] as const
export const limitCheck = z.enum(limitChecks)
export type LimitCheck = z.infer<typeof limitCheck>

/** `q` is matched against number, name, e-mail and the beginning of the postcode. */
export const deskOrderFilters = z.strictObject({
  q: z.string().trim().max(100).optional(),
  state: orderState.optional(),
  limit: z.coerce.number<string>().int().min(1).max(100).optional(),
  cursor: z.string().max(200).optional(),
})
export type DeskOrderFilters = z.output<typeof deskOrderFilters>

export const deskOrderRow = z.object({
  orderNumber: z.string(),
  name: z.string(),
  email: z.string(),
  postcode: z.string(),
  country: z.string(),
  state: orderState,
  totalCents: cents,
  currency,
  /** Null while nothing has been paid; `createdAt` then says when it was started. */
  placedAt: isoTime.nullable(),
  createdAt: isoTime,
  titles: z.array(z.string()),
  /** The most doubtful of the order's lines. */
  limitCheck,
})
export type DeskOrderRow = z.infer<typeof deskOrderRow>
export const deskOrderList = listOf(deskOrderRow)

export const deskLine = z.object({
  id: z.number().int(),
  sku: z.string(),
  slug: z.string().nullable(),
  title: z.string(),
  quantity: z.number().int(),
  unitCents: cents,
  lineCents: cents,
  taxCents: cents,
  options: lineOptions,
  state: orderState,
  /** Went back whole, or is on its way back. */
  refunded: z.boolean(),
  adviceId: z.string().nullable(),
  limitCheck,
  limitKg: z.number(),
})
export type DeskLine = z.infer<typeof deskLine>

export const deskMoney = z.object({
  currency,
  goodsCents: cents,
  deliveryCents: cents,
  taxCents: cents,
  totalCents: cents,
  taxIncluded: z.boolean(),
  takenCents: cents,
  refundedCents: cents,
  /** Taken, less what was refunded, less refunds on their way. */
  leftToRefundCents: cents,
  ledger: z.array(
    z.object({
      kind: z.enum(['taken', 'refunded']),
      amountCents: z.number().int(),
      ref: z.string(),
      createdAt: isoTime,
    }),
  ),
  refunds: z.array(
    z.object({
      id: z.number().int(),
      amountCents: cents,
      reason: z.string(),
      state: z.enum(['asked', 'done', 'failed']),
      authorName: z.string().nullable(),
      createdAt: isoTime,
    }),
  ),
})
export type DeskMoney = z.infer<typeof deskMoney>

export const deskMail = z.object({
  id: z.number().int(),
  kind: z.string(),
  recipient: z.string(),
  locale,
  subject: z.string(),
  text: z.string(),
  state: z.enum(['queued', 'sent', 'failed']),
  attempts: z.number().int(),
  sentAt: isoTime.nullable(),
  lastError: z.string().nullable(),
  createdAt: isoTime,
})
export type DeskMail = z.infer<typeof deskMail>

export const deskEvent = z.object({
  id: z.number().int(),
  kind: z.string(),
  fromState: orderState.nullable(),
  toState: orderState.nullable(),
  actorName: z.string().nullable(),
  actorRole: z.string(),
  reason: z.string().nullable(),
  createdAt: isoTime,
})
export type DeskEvent = z.infer<typeof deskEvent>

/**
 * What the rider was told, as it was frozen. Body mass and every figure it could be worked out from (total, loads, margins,
 * the values put into the formulas) are left out until somebody states why they are needed; `withheld` names them.
 */
export const frozenAdvice = z.object({
  adviceId: z.string(),
  createdAt: isoTime,
  rulesVersion: z.string(),
  sha256: z.string(),
  /** The stored text still has the digest it was stored with. */
  intact: z.boolean(),
  answers: z.record(z.string(), z.unknown()),
  withheld: z.array(z.string()),
  outcome: z.string().nullable(),
  assumed: z.array(z.string()),
  systemMassKg: z.number().nullable(),
  pressure: z.unknown(),
  rimDepthMm: z.unknown(),
  spokes: z.unknown(),
  notes: z.array(z.object({ code: z.string(), severity: z.string() })),
  /** The wheelsets of this order only. */
  wheelsets: z.array(
    z.object({
      sku: z.string(),
      rank: z.number().nullable(),
      verdict: z.string(),
      limitKg: z.number().nullable(),
      marginKg: z.number().nullable(),
      codes: z.array(z.string()),
    }),
  ),
  reasons: z.array(
    z.object({
      quantity: z.string(),
      formula: z.string().nullable(),
      source: z.string().nullable(),
      label: z.string().nullable(),
      uncertainty: z.string().nullable(),
      wouldChangeIf: z.string().nullable(),
      inputs: z.record(z.string(), z.unknown()).nullable(),
    }),
  ),
})
export type FrozenAdvice = z.infer<typeof frozenAdvice>

export const deskOrder = z.object({
  orderNumber: z.string(),
  name: z.string(),
  email: z.string(),
  locale,
  market: z.string(),
  state: orderState,
  placedAt: isoTime.nullable(),
  createdAt: isoTime,
  delivery: z.object({
    name: z.string(),
    line1: z.string(),
    line2: z.string().nullable(),
    postcode: z.string(),
    city: z.string(),
    region: z.string().nullable(),
    country: z.string(),
    phone: z.string().nullable(),
  }),
  lines: z.array(deskLine),
  money: deskMoney,
  mails: z.array(deskMail),
  timeline: z.array(deskEvent),
  advice: z.array(frozenAdvice),
})
export type DeskOrder = z.infer<typeof deskOrder>

export const revealMass = z.strictObject({ reason: staffReason })
export const revealedMass = z.object({ advice: z.array(frozenAdvice) })

/**
 * Whole lines by their ids, each once, or an amount. The last of an order's lines to go back brings the delivery charge along.
 * Never more than what is left: the server decides under a lock.
 */
export const refundRequest = z
  .strictObject({
    lines: z.array(z.number().int().min(1)).min(1).max(50).optional(),
    amountCents: cents.min(1).optional(),
    reason: staffReason,
  })
  .refine((asked) => (asked.lines === undefined) !== (asked.amountCents === undefined), {
    message: 'lines-or-amount',
    path: ['amountCents'],
  })
export type RefundRequest = z.output<typeof refundRequest>

export const refundDone = z.object({
  orderNumber: z.string(),
  amountCents: cents,
  currency,
  state: z.enum(['asked', 'done', 'failed']),
  leftToRefundCents: cents,
})
export type RefundDone = z.infer<typeof refundDone>

export const deskNote = z.strictObject({ text: z.string().trim().min(5).max(500) })
