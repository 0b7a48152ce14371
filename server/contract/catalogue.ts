/** The range: wheelsets as riders see them, with filters, sort and cursor. */
import { z } from 'zod'
import { rides } from './advisor.ts'
import { cents, currency, listOf, locale, market } from './common.ts'

export const wheelFacts = z.object({
  position: z.enum(['front', 'rear']),
  rimName: z.string(),
  hubName: z.string(),
  spokeName: z.string(),
  material: z.enum(['carbon', 'alloy']),
  depthMm: z.number(),
  innerWidthMm: z.number(),
  outerWidthMm: z.number(),
  seat: z.enum(['hooked', 'hookless']),
  maxPressureBar: z.number(),
  tyreMinMm: z.number(),
  tyreMaxMm: z.number(),
  spokeCount: z.number().int(),
  crossesLeft: z.number().int(),
  crossesRight: z.number().int(),
  tensionTightN: z.number(),
  pcdLeftMm: z.number(),
  pcdRightMm: z.number(),
  flangeLeftMm: z.number(),
  flangeRightMm: z.number(),
  axles: z.array(z.string()),
  freehubs: z.array(z.string()),
  rotorMount: z.enum(['centre-lock', 'six-bolt']).nullable(),
  massG: z.number(),
  /** Most that this axle carries, kg; null where its maker states none. */
  maxAxleLoadKg: z.number().nullable(),
})
export type WheelFactsView = z.infer<typeof wheelFacts>

export const wheelset = z.object({
  sku: z.string(),
  slug: z.string(),
  name: z.string(),
  tagline: z.string(),
  description: z.string(),
  brake: z.enum(['rim', 'disc']),
  beadSeatMm: z.number().int(),
  rides: z.array(z.enum(rides)),
  useCondition: z.number().int().min(1).max(5),
  assistRated: z.boolean(),
  buildKind: z.enum(['shelf', 'bench']),
  limitKg: z.number(),
  limitProof: z.string(),
  massG: z.number(),
  prices: z.partialRecord(currency, cents),
  available: z.number().int().min(0),
  front: wheelFacts,
  rear: wheelFacts,
})
export type Wheelset = z.infer<typeof wheelset>
const bothSides = z.object({ left: z.number(), right: z.number() })
const spread = z.object({ mean: z.number(), least: z.number(), greatest: z.number() })
const broken = z.object({ shiftMm: z.number(), runOutMm: z.number(), leastTensionN: z.number() })
/** What the structural model found of one wheel at its tension: an estimate, ±25 % as a rider limit. Left is the rotor's side. */
export const wheelStructure = z.object({
  tensionN: bothSides.extend({ average: z.number() }),
  tensionRatio: z.number(),
  spokeLengthMm: bothSides,
  bracingDeg: bothSides,
  rimCompressionN: z.number(),
  radialNPerMm: spread,
  lateralNPerMm: spread,
  tangentialNPerMm: spread,
  share: z.number(),
  gain: z.number(),
  /** Change of each spoke's tension for a newton of load at a left and at a right spoke; spoke 0 is at the road. */
  profile: z.object({ underLeft: z.array(z.number()), underRight: z.array(z.number()) }),
  firstSlackN: z.number(),
  firstSlackSide: z.enum(['left', 'right', 'either']),
  lateralFirstSlackN: z.number(),
  rangePerN: bothSides,
  torqueWeightN: z.object({ front: z.number(), rear: z.number() }),
  brokenSpoke: z.object({ left: broken, right: broken }),
  bucklingTensionN: z.number(),
})
export const wheelsetDetail = wheelset.extend({
  /** Null while a wheel is not solved. */
  structure: z.object({ front: wheelStructure.nullable(), rear: wheelStructure.nullable() }),
})
export type WheelsetDetail = z.infer<typeof wheelsetDetail>
export const wheelsetList = listOf(wheelset)
export type WheelsetList = z.infer<typeof wheelsetList>

export const wheelsetSorts = ['name', 'price', 'depth', 'mass', 'limit'] as const

/** Filters, all optional; numbers travel as text in an address. */
export const wheelsetFilters = z.strictObject({
  q: z.string().trim().max(80).optional(),
  ride: z.enum(rides).optional(),
  brake: z.enum(['rim', 'disc']).optional(),
  beadSeatMm: z.coerce.number<string>().int().optional(),
  material: z.enum(['carbon', 'alloy']).optional(),
  seat: z.enum(['hooked', 'hookless']).optional(),
  depthFromMm: z.coerce.number<string>().min(0).max(120).optional(),
  depthToMm: z.coerce.number<string>().min(0).max(120).optional(),
  spokesFrom: z.coerce.number<string>().int().min(0).max(48).optional(),
  limitFromKg: z.coerce.number<string>().min(0).max(300).optional(),
  tyreMm: z.coerce.number<string>().min(18).max(80).optional(),
  assist: z.enum(['yes']).optional(),
  inStock: z.enum(['yes']).optional(),
  sort: z.enum(wheelsetSorts).optional(),
  currency: currency.optional(),
  lng: locale.optional(),
  limit: z.coerce.number<string>().int().min(1).max(100).optional(),
  cursor: z.string().max(200).optional(),
})
export type WheelsetFilters = z.output<typeof wheelsetFilters>

export const marketList = listOf(market)
