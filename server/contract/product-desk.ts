/** The product desk: wheelsets with their words, prices and stock; limits as dated versions; the audit. */
import { z } from 'zod'
import { cents, currency, isoTime, listOf, locale, role, staffReason } from './common.ts'

const prices = z.partialRecord(currency, cents)

export const productRow = z.object({
  sku: z.string(),
  slug: z.string(),
  name: z.string(),
  brake: z.enum(['rim', 'disc']),
  beadSeatMm: z.number().int(),
  depthFrontMm: z.number(),
  depthRearMm: z.number(),
  spokesFront: z.number().int(),
  spokesRear: z.number().int(),
  buildKind: z.enum(['shelf', 'bench']),
  onSale: z.boolean(),
  /** Null: no limit in force, so it cannot be sold. */
  limitKg: z.number().nullable(),
  /** Limit changes waiting for a second person. */
  draftedLimits: z.number().int(),
  onHand: z.number().int(),
  reserved: z.number().int(),
  prices,
  /** Languages without words of their own. */
  missingTexts: z.array(locale),
  version: z.number().int(),
  updatedAt: isoTime,
})
export type ProductRow = z.infer<typeof productRow>
export const productList = listOf(productRow)

const words = z.object({ tagline: z.string(), description: z.string() })

export const productWheelset = z.object({
  ...productRow.shape,
  useCondition: z.number().int(),
  assistRated: z.boolean(),
  rides: z.array(z.string()),
  limitProof: z.string().nullable(),
  limitInForceFrom: isoTime.nullable(),
  texts: z.record(locale, words),
  priceHistory: z.array(z.object({ currency, priceCents: cents, validFrom: isoTime })),
})
export type ProductWheelset = z.infer<typeof productWheelset>

const typedWords = z.strictObject({
  tagline: z.string().trim().min(1).max(200),
  description: z.string().trim().min(1).max(4000),
})
const typedPrice = z.number().int().min(100).max(5_000_000)

/**
 * A change of one wheelset. `version` is the one that was read: an edit made on an older one is refused with the present values.
 * `stock.onHandSeen`: the count that was on the screen; a sale in between then shows instead of being overwritten.
 * Prices are minor units: EUR and GBP with tax, USD without.
 */
export const productChange = z.strictObject({
  version: z.number().int().min(1),
  reason: staffReason,
  texts: z.strictObject({ en: typedWords.optional(), pt: typedWords.optional() }).optional(),
  prices: z
    .strictObject({ EUR: typedPrice.optional(), GBP: typedPrice.optional(), USD: typedPrice.optional() })
    .optional(),
  stock: z
    .strictObject({ onHand: z.number().int().min(0).max(100_000), onHandSeen: z.number().int().min(0).optional() })
    .optional(),
  onSale: z.boolean().optional(),
  /** Says that a price jump over the usual is meant. */
  confirmJump: z.boolean().optional(),
})
export type ProductChange = z.output<typeof productChange>

/** A price may move by this part of the old one without being asked about. */
export const PRICE_JUMP_SHARE = 0.2

/** What a limit may be, kg of rider, kit, bike and luggage together: outside this a figure is a slip of the hand. */
export const LIMIT_FROM_KG = 40
export const LIMIT_TO_KG = 200

/** `in-force` is the newest seconded version whose time has come; `replaced` those before it. */
export const limitStandings = ['drafted', 'seconded', 'in-force', 'replaced', 'rejected'] as const
export const limitVersion = z.object({
  id: z.number().int(),
  sku: z.string(),
  limitKg: z.number(),
  proof: z.string(),
  reason: z.string(),
  standing: z.enum(limitStandings),
  draftedBy: z.string().nullable(),
  secondedBy: z.string().nullable(),
  inForceFrom: isoTime.nullable(),
  createdAt: isoTime,
  /** Drafted by the person who asks, who therefore cannot second it. */
  own: z.boolean(),
})
export type LimitVersionView = z.infer<typeof limitVersion>

export const limitRow = z.object({
  sku: z.string(),
  name: z.string(),
  onSale: z.boolean(),
  current: limitVersion.nullable(),
  /** Newest first, the current one among them. */
  versions: z.array(limitVersion),
})
export type LimitRow = z.infer<typeof limitRow>
export const limitList = listOf(limitRow)

export const limitDraft = z.strictObject({
  sku: z.string().trim().min(1).max(40),
  /** In tenths at most: a figure that display would have to round could read as more than it is. */
  limitKg: z.number().min(LIMIT_FROM_KG).max(LIMIT_TO_KG).multipleOf(0.1),
  /** What shows that the wheels carry it; needed in full where the limit goes up. */
  proof: z.string().trim().max(4000),
  reason: staffReason,
  /** Left out: from the moment it is seconded. */
  inForceFrom: z.iso.datetime({ offset: true }).optional(),
})
export type LimitDraft = z.output<typeof limitDraft>

export const limitDecision = z.strictObject({ reason: staffReason })

/** Whom the change touches: totals of frozen advice above the new limit. Kilograms over, no names. */
export const limitImpact = z.object({
  currentKg: z.number().nullable(),
  newKg: z.number(),
  openBaskets: z.number().int(),
  unpaidOrders: z.number().int(),
  placedOrders: z.number().int(),
  /** Sent or in use: their riders would need a safety notice. */
  deliveredOrders: z.number().int(),
  over: z.array(
    z.object({
      kind: z.enum(['basket', 'unpaid', 'placed', 'delivered']),
      orderNumber: z.string().nullable(),
      overKg: z.number(),
    }),
  ),
})
export type LimitImpact = z.infer<typeof limitImpact>

export const auditFilters = z.strictObject({
  subjectType: z.enum(['order', 'wheelset', 'limit-change', 'rule-table']).optional(),
  subjectId: z.string().trim().max(64).optional(),
  limit: z.coerce.number<string>().int().min(1).max(100).optional(),
  cursor: z.string().max(20).regex(/^\d+$/).optional(),
})
export type AuditFilters = z.output<typeof auditFilters>

export const auditRow = z.object({
  id: z.number().int(),
  actorName: z.string(),
  actorRole: role,
  action: z.string(),
  subjectType: z.string(),
  subjectId: z.string(),
  reason: z.string(),
  before: z.record(z.string(), z.unknown()).nullable(),
  after: z.record(z.string(), z.unknown()).nullable(),
  createdAt: isoTime,
})
export type AuditRowView = z.infer<typeof auditRow>
export const auditList = listOf(auditRow)
