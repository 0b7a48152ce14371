/** What every feature's contract shares: languages, markets, money, lists, problems. */
import { z } from 'zod'

export const locales = ['en', 'pt'] as const
export const locale = z.enum(locales)
export type Locale = z.infer<typeof locale>

export const currencies = ['EUR', 'GBP', 'USD'] as const
export const currency = z.enum(currencies)
export type Currency = z.infer<typeof currency>

/** ISO 3166-1 country codes of the places we deliver to. */
export const marketCodes = ['PT', 'ES', 'FR', 'DE', 'IE', 'NL', 'BE', 'AT', 'IT', 'LU', 'GB', 'US'] as const
export const marketCode = z.enum(marketCodes)
export type MarketCode = z.infer<typeof marketCode>

export const roles = ['rider', 'support', 'product', 'admin'] as const
export const role = z.enum(roles)
export type Role = z.infer<typeof role>

/** Minor units (cents, pence), never negative. */
export const cents = z.number().int().min(0)

export const isoTime = z.string().describe('ISO 8601, UTC')

/** `{ items, nextCursor }`; nextCursor is null on the last page. */
export const listOf = <T extends z.ZodType>(item: T) =>
  z.object({ items: z.array(item), nextCursor: z.string().nullable() })

/** Why staff change something; kept with the change for good. */
export const staffReason = z.string().trim().min(5).max(500)

/** RFC 9457 problem details, with our code, the request's id and the fields of a bad input. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  instance: z.string(),
  code: z.string(),
  requestId: z.string(),
  errors: z.array(z.object({ path: z.string(), code: z.string(), message: z.string() })).optional(),
  data: z.record(z.string(), z.unknown()).optional(),
})
export type Problem = z.infer<typeof problem>

export const market = z.object({
  code: marketCode,
  currency,
  vatPercent: z.number(),
  taxIncluded: z.boolean(),
  deliveryCents: cents,
  deliveryDaysFrom: z.number().int(),
  deliveryDaysTo: z.number().int(),
})
export type Market = z.infer<typeof market>

export const nothing = z.object({})
