/** The tables and policies that the sums go by. They are dated data with a source, kept in the database; this turns them into one checked object. */
import { z } from 'zod'

const perWidth = z.array(z.tuple([z.number(), z.number()])).min(1)
const perRide = z.record(z.string(), z.number())

/** One schema a table; the name is the table's name in `rule_tables`. */
const tables = {
  'load-split': z.object({ frontShare: perRide, luggageFrontShare: perRide }),
  'target-drops': z.object({
    byRide: perRide,
    fastTubelessFrom28: z.number(),
    onRoadMost: z.number(),
    offRoadMost: z.number(),
    atLimitSlack: z.number(),
  }),
  'assumed-tyre-maxima': z.object({ rows: perWidth, beyondBar: z.number() }),
  'hookless-caps': z.object({ rows: perWidth }),
  'hookless-least-tyres': z.object({ rows: perWidth }),
  'measuring-rims': z.object({ rows: perWidth }),
  'spoke-limits': z.object({
    counts: z.array(z.number().int()),
    extraKg: z.record(z.string(), z.number()),
    /** Rider limit in kg with its governing letter; x: fails with a broken spoke, f: below the trade floor. */
    rows: z.array(
      z.object({
        design: z.enum(['road-rim', 'road-disc', 'gravel', 'mountain']),
        material: z.enum(['alloy', 'carbon']),
        depthMm: z.number(),
        front: z.array(z.string().regex(/^\d+[ABCE][xf]?$/)),
        rear: z.array(z.string().regex(/^\d+[ABCE][xf]?$/)),
      }),
    ),
    referenceDepthMm: z.record(z.string(), z.number()),
  }),
  'spoke-floors': z.object({
    rearAbove100Kg: z.number(),
    rearAbove120Kg: z.number(),
    bikepacking: z.number(),
    assist: z.number(),
    loadedFromKg: z.number(),
    loaded: z.number(),
    frontMayBeFewerBy: z.number(),
  }),
  wind: z.object({
    meanMs: perRide,
    gustMs: perRide,
    correctionDeg: perRide,
    aeroBarsFactor: z.number(),
    speedMs: z.number(),
    mountainSpeedMs: z.number(),
  }),
  'depth-clamps': z.object({ byRide: perRide, aeroBarsMm: z.number() }),
  terrain: z.object({ flatShare: perRide, climbShare: perRide, gradient: perRide, descent: perRide }),
  'brake-heat': z.object({
    warnAboveKg: z.number(),
    steerAboveKg: z.number(),
    nervousSteerAboveKg: z.number(),
    limitC: z.number(),
    rotor160AboveKg: z.number(),
    rotor180AboveKg: z.number(),
  }),
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
