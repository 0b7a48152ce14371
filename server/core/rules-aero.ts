/** Shapes of the tables behind depth, wind and brake heat. Policy is dated data; constants of physics and of the fits stay beside their formulas. */
import { z } from 'zod'

const perWord = z.record(z.string(), z.number())
const positive = z.number().positive()
const share = positive.max(1)
/** What a single figure of a policy rests on, where it is not the source of its whole table. */
const sourced = {
  row: z.string().regex(/^[a-z0-9.-]{3,40}$/),
  source: z.string().trim().min(10),
  label: z.enum(['read', 'memory', 'derived', 'practice']),
}

export const aeroTables = {
  wind: z.object({
    meanMs: perWord,
    gustMs: perWord,
    correctionDeg: perWord,
    aeroBarsFactor: positive,
    speedMs: positive,
    mountainSpeedMs: positive,
    capBandMm: positive,
  }),
  'depth-clamps': z.object({
    byRide: perWord,
    aeroBarsMm: positive,
    /** Rule of mass-start races on the road: said as a note, as no question asks whether one races. */
    race: z.object({ ...sourced, depthMm: positive, from: z.iso.date() }),
  }),
  terrain: z.object({ flatShare: perWord, climbShare: perWord, gradient: perWord, descent: perWord }),
  'depth-method': z.object({
    /** Least part of the best gain that the lower end of the range must bring. */
    gainShare: share,
    frontFactor: share,
    rearFactor: share,
    rearExtraMm: positive,
    /** How much deeper the rear is taken when depths in front are compared. */
    pairStepMm: positive,
    leastRangeMm: positive,
    stepMm: positive,
    bandShare: share,
    wideTyre: z.object({ fromMm: positive, sailShare: share, bandShare: share }),
    positionDrag: perWord,
    rolling: perWord,
    rimGramPerMm: positive,
    climbBandShare: share,
    bunchFactor: share,
    speedKmh: z.tuple([positive, positive]),
    lightBelowKg: positive,
  }),
  'brake-heat': z.object({
    warnAboveKg: positive,
    steerAboveKg: positive,
    nervousSteerAboveKg: positive,
    limitC: positive,
    airC: z.number(),
    /** Part of the braking on the front rim: dragged evenly, braked hard, and all of it. */
    frontShareAlloy: share,
    frontShareCarbon: share,
    mostSpeedKmh: positive,
    bandShare: share,
    surfaceShare: share,
    rig: z.object({ ...sourced, watts: positive, speedKmh: positive, stillAirFactor: share }),
    rotor160AboveKg: positive,
    rotor180AboveKg: positive,
  }),
} as const

type Aero = { [Name in keyof typeof aeroTables]: z.output<(typeof aeroTables)[Name]> }
export type DepthMethod = Aero['depth-method']
export type BrakeHeatPolicy = Aero['brake-heat']
