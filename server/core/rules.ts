/** The tables and policies that the sums go by. They are dated data with a source, kept in the database; this turns them into one checked object. */
import { z } from 'zod'
import { aeroTables } from './rules-aero.ts'

const perWidth = z.array(z.tuple([z.number(), z.number()])).min(1)
const perRide = z.record(z.string(), z.number())

/** A row that can decide a verdict by itself names itself and its own source. */
const sourced = {
  row: z.string().regex(/^[a-z0-9.-]{3,40}$/),
  source: z.string().trim().min(10),
  label: z.enum(['read', 'memory', 'derived', 'practice']),
}
const positive = z.number().positive()
const upward = (values: readonly number[]) =>
  values.every((value, index) => index === 0 || value > (values[index - 1] ?? 0))
const eachOnce = (names: readonly string[]) => new Set(names).size === names.length
const loadEdges = z.tuple([positive, positive, positive, positive, positive, positive]).refine(upward)
const band = z.object({ half: positive.max(0.5), loadKg: loadEdges })

/** A wheel of the reference builds with what the structural model found of it. */
const solved = z.object({
  count: z.number().int(),
  firstSlackN: z.number(),
  lateralNPerMm: z.number(),
  rangePerN: z.number(),
  torqueWeightN: z.number(),
  brokenShiftMm: z.number(),
  brokenLeastTensionN: z.number(),
  lateralFirstSlackN: z.number(),
  share: z.number(),
})

/** One schema a table; the name is the table's name in `rule_tables`. */
export const tables = {
  'load-split': z.object({ frontShare: perRide, luggageFrontShare: perRide }),
  /** The front wheel's design load: at least a part of the rear's, at most a multiple of its own. */
  'front-design-load': z.object({ leastOfRear: positive.max(1), mostOfOwn: z.number().min(1).max(2) }),
  'target-drops': z.object({
    byRide: perRide,
    fastTubeless: z.object({ fromMm: positive, drop: positive.max(0.3) }),
    onRoadMost: positive.max(0.3),
    offRoadMost: positive.max(0.3),
    atLimitSlack: z.number().min(0).max(0.05),
  }),
  'assumed-tyre-maxima': z.object({ rows: perWidth, beyondBar: positive }),
  /** Widths upward, caps never rising with width: a wider tyre must not be given more. */
  'hookless-ceilings': z.object({
    rows: z
      .array(z.object({ ...sourced, upToMm: positive, maxBar: positive }))
      .min(1)
      .refine((rows) => upward(rows.map(({ upToMm }) => upToMm)), 'widths must rise')
      .refine((rows) => upward(rows.map(({ maxBar }) => -maxBar)), 'caps must fall'),
    road: z.object({ ...sourced, maxBar: positive }),
    tension: z.object({ ...sourced, maxNPerMm: positive }),
  }),
  /**
   * Each row speaks for rims of its bead wall from an inner width on. `inner-plus` and `inner-times`: the edge is worked out from the inner
   * width; `width`: the edge is a tyre width. `below` and `above` say on which side of the edge the verdict holds.
   */
  'tyre-rim-pairing': z.object({
    rows: z
      .array(
        z.object({
          ...sourced,
          seat: z.enum(['hooked', 'hookless']),
          innerFromMm: z.number().min(0),
          side: z.enum(['below', 'above', 'within']),
          by: z.enum(['inner-plus', 'inner-times', 'width']),
          value: z.number().min(0),
          verdict: z.enum(['ok', 'check', 'no']),
        }),
      )
      .min(1)
      .refine((rows) => eachOnce(rows.map(({ row }) => row)), 'two rows of one name')
      .refine(
        (rows) => rows.every(({ side, verdict }) => (side === 'within') === (verdict === 'ok')),
        'only within is ok',
      )
      .refine(
        (rows) =>
          (['hooked', 'hookless'] as const).every((seat) =>
            (['below', 'above'] as const).every((side) =>
              rows.some(
                (one) => one.seat === seat && one.side === side && one.verdict === 'no' && one.innerFromMm === 0,
              ),
            ),
          ),
        'each bead wall needs a least and a widest tyre for every rim',
      ),
    demands: z.object({
      tubular: z.object(sourced),
      notApproved: z.object(sourced),
      tube: z.object(sourced),
      confirm: z.object(sourced),
    }),
    otherwise: z.object(sourced),
    ownRange: z.object(sourced),
  }),
  /** Printed charts, for people to compare with; the verdicts go by the pairing table. */
  'rim-tyre-charts': z.object({
    rows: z.array(z.object({ ...sourced, innerMm: positive, fromMm: positive, toMm: positive })).min(1),
  }),
  'measuring-rims': z.object({ rows: perWidth, growthPerMm: positive.max(1), warnBeyondMm: positive }),
  'pressure-bands': z.object({
    widthMm: z.tuple([positive, positive, positive, positive]).refine(upward),
    measured: band,
    nominal: band,
    outerHalf: positive.max(0.5),
  }),
  'tyre-minima': z.object({
    unmarkedFloorBar: positive,
    iso: z.object({ narrowUpToMm: positive, narrowBar: positive, otherBar: positive, offRoadBar: positive }),
  }),
  'pressure-preferences': z.object({
    least: positive.max(1),
    most: z.number().min(1),
    rows: z.array(z.object({ ...sourced, factor: positive })),
  }),
  'rim-proof': z.object({ proofPsi: positive, testFactor: z.number().min(1) }),
  'wheel-criteria': z.object({
    byUse: z.record(
      z.string(),
      z.object({
        tyreLoss: z.number(),
        dynamicFactor: z.number(),
        sideShare: z.number(),
        sideMm: z.number(),
        fatigueFactor: z.number(),
        loadShare: z.object({ front: z.number(), rear: z.number() }),
        extraKg: z.number(),
        leastSideN: z.number(),
      }),
    ),
    buildScatter: z.number(),
    realStiffness: z.number(),
    elbowRangeN: z.number(),
    brokenShiftMm: z.number(),
    bandShare: z.number(),
    inHandShare: z.number(),
  }),
  /** Solved wheels of the usual builds, by use: what the advised counts are read from. */
  'reference-wheels': z.object({
    byUse: z.record(z.string(), z.object({ front: z.array(solved), rear: z.array(solved) })),
  }),
  'spoke-floors': z.object({
    /** Least count of the trade by use, front and rear. */
    byUse: z.record(z.string(), z.object({ front: z.number(), rear: z.number() })),
    rearAbove100Kg: z.number(),
    rearAbove120Kg: z.number(),
    bikepacking: z.number(),
    assist: z.number(),
    loadedFromKg: z.number(),
    loaded: z.number(),
    frontMayBeFewerBy: z.number(),
  }),
  ...aeroTables,
  /** ASTM F2043 condition that a ride asks of the wheels, 1 to 5. */
  'use-conditions': z.object({ leastByRide: z.record(z.string(), z.number().int().min(1).max(5)) }),
  limits: z.object({ noMarginFrom: z.number(), caliperSlackMm: z.number(), assumedBikeExtraKg: z.number() }),
  defaults: z.object({
    kitMassKg: z.number(),
    bikeMassKg: perRide,
    assistBikeMassKg: z.number(),
    bikepackingLuggageKg: z.number(),
    flatSpeedKmh: perRide,
    tyreWidthMm: perRide,
  }),
} as const

export type TableName = keyof typeof tables
export type Rules = { [Name in TableName]: z.output<(typeof tables)[Name]> }
export const tableNames = Object.keys(tables) as TableName[]

/**
 * @param rows one row a table, the one in force
 * @throws Error naming the table that is missing or does not have its shape: advice without all of its rules would be a guess
 */
export function rulesFrom(rows: readonly { name: string; data: unknown }[]): Rules {
  const entries = tableNames.map((name) => {
    const row = rows.find((one) => one.name === name)
    const parsed = tables[name].safeParse(row?.data)
    if (!parsed.success) throw new Error(`rule table ${name} is ${row ? 'not of its shape' : 'missing'}`)
    return [name, parsed.data] as const
  })
  return Object.fromEntries(entries) as Rules
}

/** A value of a table by a word of the contract; the contract and the tables must know the same words. */
export function lookUp(table: Record<string, number>, word: string): number {
  const value = table[word]
  if (value === undefined) throw new Error(`rule table has no row ${word}`)
  return value
}
