/** What a rider answers and what the advice says. SI units in the names; the lists feed the form as well. */
import { z } from 'zod'

export const rides = [
  'road-fast',
  'road-long',
  'climbing',
  'time-trial',
  'cyclocross',
  'gravel',
  'bikepacking',
  'commute',
  'cross-country',
  'trail',
] as const
export const brakeKinds = ['rim', 'disc'] as const
export const tyreSetups = ['tubeless', 'tube', 'tubular'] as const
export const rimSeats = ['hooked', 'hookless', 'any'] as const
export const assists = ['none', '25', '45'] as const
export const luggagePlaces = ['none', 'front', 'frame', 'rear', 'spread'] as const
export const positions = ['drop', 'aero', 'upright', 'mountain'] as const
export const surfaces = ['smooth', 'mixed', 'rough'] as const
export const terrains = ['flat', 'rolling', 'hilly', 'mountain'] as const
export const winds = ['sheltered', 'typical', 'exposed'] as const
export const confidences = ['nervous', 'average', 'confident'] as const
export type Ride = (typeof rides)[number]

const bar = z.number().min(0.3).max(15)

export const tyreAnswer = z.strictObject({
  frontWidthMm: z.number().min(20).max(75),
  rearWidthMm: z.number().min(20).max(75),
  setup: z.enum(tyreSetups),
  measured: z.boolean().optional(),
  minBar: bar.nullish(),
  maxBar: bar.nullish(),
  hooklessApproved: z.boolean().nullish(),
})

export const riderAnswers = z
  .strictObject({
    ride: z.enum(rides),
    bodyMassKg: z.number().min(30).max(180).optional(),
    bodyMassBandKg: z.strictObject({ from: z.number().min(30).max(180), to: z.number().min(30).max(180) }).optional(),
    kitMassKg: z.number().min(0).max(15).optional(),
    bikeMassKg: z.number().min(5).max(35).optional(),
    luggageKg: z.number().min(0).max(60).optional(),
    luggagePlace: z.enum(luggagePlaces).optional(),
    brakes: z.enum(brakeKinds),
    /** null: the rider does not know; no pressure is then given. */
    tyre: tyreAnswer.nullable(),
    rim: z
      .strictObject({
        seat: z.enum(rimSeats).optional(),
        innerWidthMm: z.number().min(13).max(40).nullish(),
        maxBar: bar.nullish(),
      })
      .optional(),
    beadSeatMm: z.number().int().min(200).max(800).optional(),
    ridersOnBike: z.number().int().min(1).max(10).optional(),
    assist: z.enum(assists).optional(),
    position: z.enum(positions).optional(),
    surface: z.enum(surfaces).optional(),
    terrain: z.enum(terrains).optional(),
    wind: z.enum(winds).optional(),
    confidence: z.enum(confidences).optional(),
    flatSpeedKmh: z.number().min(12).max(50).optional(),
    frontLoadShare: z.number().min(0.25).max(0.6).nullish(),
    bike: z
      .strictObject({
        frontAxle: z.string().max(20).nullish(),
        rearAxle: z.string().max(20).nullish(),
        freehub: z.string().max(30).nullish(),
        rotorMount: z.enum(['centre-lock', 'six-bolt']).nullish(),
        maxTyreMm: z.number().min(18).max(90).nullish(),
        caliperOpeningMm: z.number().min(15).max(60).nullish(),
      })
      .optional(),
  })
  .superRefine((answers, ctx) => {
    const { bodyMassKg, bodyMassBandKg } = answers
    if (bodyMassKg === undefined && bodyMassBandKg === undefined)
      ctx.addIssue({ code: 'custom', path: ['bodyMassKg'], message: 'required' })
    if (bodyMassKg !== undefined && bodyMassBandKg !== undefined)
      ctx.addIssue({ code: 'custom', path: ['bodyMassBandKg'], message: 'one-of-two' })
    if (bodyMassBandKg && bodyMassBandKg.from >= bodyMassBandKg.to)
      ctx.addIssue({ code: 'custom', path: ['bodyMassBandKg'], message: 'band-order' })
  })
export type RiderAnswers = z.infer<typeof riderAnswers>

export const outcomes = ['recommend', 'recommend-with-notes', 'refuse', 'out-of-scope'] as const
export const verdicts = ['fits', 'no-margin', 'over-limit', 'mismatch', 'pressure'] as const
export const labels = ['read', 'memory', 'derived', 'practice'] as const

const wheelPressure = z.object({
  lowBar: z.number(),
  startBar: z.number(),
  highBar: z.number(),
  ceilingBar: z.number(),
  ceilingFrom: z.string(),
  floorBar: z.number(),
})
export type WheelPressure = z.infer<typeof wheelPressure>
const depthRange = z.object({ from: z.number(), to: z.number() })
export const wheelCriteria = ['tension-reserve', 'side-stiffness', 'fatigue', 'torque'] as const
const spokeAdvice = z.object({
  min: z.number(),
  advised: z.number(),
  /** What decides: a criterion of the wheel's structure, or a floor of the trade. */
  governedBy: z.enum([...wheelCriteria, 'floor']),
  beyondTable: z.boolean(),
  /** Least count of the trade for this rider, whatever the rim. Advice given before 2026-12.2 lacks this and the limit. */
  floor: z.number().optional(),
  /** Ready-to-ride total that the least count carries on the reference rim, with its band. */
  limitKg: z.object({ low: z.number(), estimate: z.number(), high: z.number() }).nullish(),
})
const data = z.record(z.string(), z.unknown())

export const note = z.object({ code: z.string(), severity: z.enum(['info', 'caution', 'stop']), data })
export type Note = z.infer<typeof note>

export const reason = z.object({
  formula: z.string(),
  inputs: z.record(z.string(), z.unknown()),
  constants: z.record(z.string(), z.unknown()),
  source: z.string(),
  label: z.enum(labels),
  uncertainty: z.string(),
  wouldChangeIf: z.array(z.string()),
})
export type Reason = z.infer<typeof reason>

export const wheelsetVerdict = z.object({
  sku: z.string(),
  slug: z.string(),
  name: z.string(),
  rank: z.number().int().nullable(),
  verdict: z.enum(verdicts),
  /** The lowest limit for this rider; limitFrom names it. Advice given before 2026-12.2 knew the stated one alone. */
  limitKg: z.number(),
  limitFrom: z.enum(['system', 'structure', 'axle-front', 'axle-rear']).optional(),
  marginKg: z.number(),
  /** What its weaker wheel carries by the structural model, ±25 %. */
  structure: z
    .object({ position: z.enum(['front', 'rear']), limitKg: z.number(), governedBy: z.enum(wheelCriteria) })
    .nullish(),
  /** What puts it behind the one ranked before it. */
  behindBy: z.enum(['spokes', 'margin', 'depth', 'made-for', 'tyre', 'mass', 'name']).nullish(),
  codes: z.array(z.string()),
  /** The smallest change that would bring it back. */
  nearestChange: z.object({ code: z.string(), field: z.string(), to: z.unknown() }).optional(),
  /** Pressures to start from on this wheelset's own rims. */
  startBar: z.object({ front: z.number(), rear: z.number() }).nullable(),
  /** Rows of the pairing table that judged tyre and rim; `reasons.pairing` tells what each says. Older advice has none. */
  pairingRows: z.object({ front: z.string(), rear: z.string() }).nullish(),
})

export const tradeOffPoint = z.object({
  depthMm: z.number(),
  wattsSaved: z.number(),
  wattsLow: z.number(),
  wattsHigh: z.number(),
  /** Seconds saved on the flat in an hour at the rider's own power. Older advice has none. */
  secondsPerHour: z.number().optional(),
  climbSecondsPer10Km: z.number(),
  gustMomentNm: z.number(),
})

export const advice = z.object({
  rulesVersion: z.string(),
  assumed: z.array(z.string()),
  outcome: z.enum(outcomes),
  systemMassKg: z.number(),
  /** The total's parts, as the limits count them. */
  parts: z.object({ bodyMassKg: z.number(), kitMassKg: z.number(), bikeMassKg: z.number(), luggageKg: z.number() }),
  loads: z.object({ frontN: z.number(), rearN: z.number(), frontShare: z.number() }).nullable(),
  pressure: z.object({ front: wheelPressure, rear: wheelPressure }).nullable(),
  rimDepthMm: z.object({ front: depthRange, rear: depthRange }).nullable(),
  spokes: z.object({ front: spokeAdvice, rear: spokeAdvice }).nullable(),
  wheelsets: z.array(wheelsetVerdict),
  tradeOff: z.array(tradeOffPoint),
  brakeHeat: z
    .object({
      rimC: z.number(),
      limitC: z.number(),
      verdict: z.enum(['fine', 'caution', 'alloy-or-disc']),
      carbonC: z.number(),
      alloyC: z.number(),
      gradient: z.number(),
      /** rimC with its doubt. Older advice has none. */
      lowC: z.number().optional(),
      highC: z.number().optional(),
    })
    .nullable(),
  notes: z.array(note),
  reasons: z.record(z.string(), reason),
})
export type Advice = z.infer<typeof advice>

/** Where the advice turns and which answers it hangs on; asked for beside the advice, as it takes two hundred of them. */
export const adviceChanges = z.object({
  rulesVersion: z.string(),
  tippingPoints: z.array(
    z.object({
      input: z.enum(['bodyMassKg', 'tyreWidthMm', 'luggageKg', 'bikeMassKg', 'flatSpeedKmh']),
      from: z.number(),
      /** The nearest value at which the advice is another. */
      at: z.number(),
      direction: z.enum(['down', 'up']),
      changes: z.array(
        z.object({
          what: z.enum([
            'outcome',
            'first',
            'offered',
            'depth-front',
            'depth-rear',
            'spokes-front',
            'spokes-rear',
            'pressure',
          ]),
          before: z.string(),
          after: z.string(),
        }),
      ),
    }),
  ),
  /** Strongest first. */
  influence: z.array(
    z.object({
      input: z.string(),
      step: z.unknown(),
      score: z.number(),
      strongest: z.enum(['pressure', 'depth', 'spokes', 'margin', 'offers', 'first', 'outcome']).nullable(),
      assumed: z.boolean(),
    }),
  ),
})
export type AdviceChanges = z.infer<typeof adviceChanges>

/** A kept fitting: its id goes into the basket's lines, its digest stands on the order. */
export const keptAdvice = z.object({ adviceId: z.string(), sha256: z.string() })
