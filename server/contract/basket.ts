/** The basket: what the shopper asks for, and what the server makes of it. Prices only ever travel from the server. */
import { z } from 'zod'
import { cents, currency, marketCode } from './common.ts'

const option = z.string().min(1).max(30)
export const lineOptions = z.strictObject({
  frontAxle: option.nullish(),
  rearAxle: option.nullish(),
  freehub: option.nullish(),
  rotorMount: option.nullish(),
})
export type LineOptions = z.infer<typeof lineOptions>

export const basketRequest = z.strictObject({
  lines: z
    .array(
      z.strictObject({
        sku: z.string().min(1).max(40),
        quantity: z.number().int().min(1).max(5),
        options: lineOptions.default({}),
        /** The kept fitting that this wheelset was chosen from. */
        adviceId: z.uuid().optional(),
      }),
    )
    .max(10),
  market: marketCode,
  currency,
})
export type BasketRequest = z.output<typeof basketRequest>

export const limitChecks = ['within', 'no-margin', 'over-limit', 'unconfirmed'] as const
export const basketProblem = z.object({ code: z.string(), path: z.string(), data: z.record(z.string(), z.unknown()) })
export type BasketProblem = z.infer<typeof basketProblem>

export const basketLine = z.object({
  sku: z.string(),
  slug: z.string(),
  name: z.string(),
  quantity: z.number().int(),
  options: lineOptions,
  optionChoices: z.object({
    frontAxle: z.array(z.string()),
    rearAxle: z.array(z.string()),
    freehub: z.array(z.string()),
    rotorMount: z.array(z.string()),
  }),
  unitCents: cents,
  lineCents: cents,
  adviceId: z.string().nullable(),
  limitCheck: z.enum(limitChecks),
  /** Total of the fitting this line is judged by; null where there was none. */
  readyToRideKg: z.number().nullable(),
  limitKg: z.number(),
  marginKg: z.number().nullable(),
  available: z.number().int(),
  problems: z.array(basketProblem),
})
export type BasketLineView = z.infer<typeof basketLine>

export const basket = z.object({
  basketId: z.string().nullable(),
  market: marketCode,
  currency,
  lines: z.array(basketLine),
  goodsCents: cents,
  deliveryCents: cents,
  /** Tax inside the total where prices include it; 0 where tax is due at the door. */
  taxCents: cents,
  taxIncluded: z.boolean(),
  totalCents: cents,
  deliveryDaysFrom: z.number().int(),
  deliveryDaysTo: z.number().int(),
  /** What concerns the basket as a whole; each line has its own besides. */
  problems: z.array(basketProblem),
  canOrder: z.boolean(),
  /** The unpaid order that this basket became; its stock is held. Changing the basket leaves that order. */
  heldOrder: z.object({ orderNumber: z.string(), orderUrl: z.string() }).nullable(),
})
export type BasketView = z.infer<typeof basket>
