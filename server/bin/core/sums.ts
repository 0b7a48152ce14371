/**
 * The sums that `npm run -s core -- <name>` answers: what each takes, checked by name, and what it gives. The rules and the range are the seeded
 * ones, so an answer needs no database.
 */
import { z } from 'zod'
import { riderAnswers, rimSeats, tyreSetups } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { fillAnswers } from '#core/answers.ts'
import {
  brakingPower,
  freeSpeed,
  rimHeat,
  rimTemperature,
  timeConstant,
  worstRim,
  worstRimSpeed,
} from '#core/brake-heat.ts'
import { ridingPower, windOnRider } from '#core/power.ts'
import { frontDepthCap } from '#core/rim-depth.ts'
import { rulesFrom, type Rules } from '#core/rules.ts'
import { effectiveWidth } from '#core/tyre-pressure.ts'
import { pairTyre } from '#core/tyre-rim.ts'
import { wheelPressure } from '#core/wheel-pressure.ts'
import { influence, tippingPoints } from '#core/what-changes.ts'
import { wheelsetFacts } from '../../seeds/facts.ts'
import { RULES_VERSION, ruleTables } from '../../seeds/rule-tables.ts'
import { wheelStructure, wheelStructureInput } from './wheel-structure.ts'

const positive = z.number().positive()
const seat = z.enum(rimSeats).exclude(['any'])
const setup = z.enum(tyreSetups)
const mark = `${RULES_VERSION}+seed`

/** One wheel, its load known: the method from its third step on. */
const tyrePressureInput = z.strictObject({
  loadKg: positive.max(200),
  widthMm: z.number().min(20).max(75),
  measured: z.boolean().default(false),
  ride: riderAnswers.shape.ride,
  setup: setup.default('tubeless'),
  seat: seat.default('hooked'),
  innerWidthMm: z.number().min(13).max(40).nullable().default(null),
  beadSeatMm: z.union([z.literal(622), z.literal(584), z.literal(571), z.literal(559)]).default(622),
  tyreMinBar: positive.nullable().default(null),
  tyreMaxBar: positive.nullable().default(null),
  rimMaxBar: positive.nullable().default(null),
  hooklessApproved: z.boolean().nullable().default(null),
})

function tyrePressure(given: z.output<typeof tyrePressureInput>, rules: Rules) {
  const tyre = {
    frontWidthMm: given.widthMm,
    rearWidthMm: given.widthMm,
    setup: given.setup,
    measured: given.measured,
    minBar: given.tyreMinBar,
    maxBar: given.tyreMaxBar,
    hooklessApproved: given.hooklessApproved,
  }
  const filled = fillAnswers(
    { ride: given.ride, bodyMassKg: 75, brakes: 'disc', tyre, beadSeatMm: given.beadSeatMm },
    rules,
  )
  const rim = { seat: given.seat, innerWidthMm: given.innerWidthMm, maxBar: given.rimMaxBar }
  return wheelPressure({ ...filled, tyre }, 'rear', given.loadKg, rim, rules)
}

const pairingInput = z.strictObject({
  seat,
  innerWidthMm: z.number().min(13).max(40),
  widthMm: z.number().min(18).max(90),
  setup: setup.default('tubeless'),
  hooklessApproved: z.boolean().nullable().default(null),
})

const powerInput = z.strictObject({
  speedMs: z.number().min(0).max(40),
  /** Through the air; or instead wind and headings. */
  airSpeedMs: z.number().min(-40).max(60).optional(),
  wind: z.strictObject({ speedMs: z.number().min(0), fromDeg: z.number(), headingDeg: z.number() }).optional(),
  massKg: positive,
  cdaM2: z.number().min(0),
  spokeAreaM2: z.number().min(0).default(0),
  rollingCoefficient: z.number().min(0),
  gradient: z.number().min(-1).max(1).default(0),
  airDensity: positive.default(1.225),
  chainEfficiency: positive.max(1).default(0.977),
  gravity: positive.optional(),
  kinetic: z
    .strictObject({
      fromMs: z.number().min(0),
      toMs: z.number().min(0),
      seconds: positive,
      inertia: z.number().min(0),
      radiusM: positive,
    })
    .optional(),
})

function power({ wind, airSpeedMs, kinetic, gravity, ...ride }: z.output<typeof powerInput>) {
  const moving = wind ? windOnRider(ride.speedMs, wind.speedMs, wind.fromDeg, wind.headingDeg) : null
  const air = moving?.airSpeedMs ?? airSpeedMs ?? ride.speedMs
  const watts = ridingPower({ ...ride, airSpeedMs: air, ...(gravity === undefined ? {} : { gravity }) }, kinetic)
  return { ...watts, airSpeedMs: air, yawDeg: moving?.yawDeg ?? 0 }
}

const capInput = z.strictObject({
  bodyMassKg: positive,
  bikeMassKg: z.number().min(0),
  gustMs: positive,
  speedMs: positive,
  correctionDeg: positive,
})

const heatInput = z.strictObject({
  massKg: positive,
  gradient: z.number().min(0).max(0.4),
  cdaM2: positive.default(0.32),
  rollingCoefficient: z.number().min(0).default(0.005),
  airDensity: positive.default(1.2),
  material: z.enum(['alloy', 'carbon']),
  /** Part of the braking that this rim does. */
  onThisRim: z.number().min(0).max(1),
  airC: z.number().min(-30).max(50).default(20),
  /** A speed to hold; left out: the speed at which the rim is hottest. */
  speedMs: positive.optional(),
  /** A time; left out: the balance. */
  seconds: positive.optional(),
  /** Power into the brakes as given, such as a rig's motor, in place of the descent's. */
  watts: positive.optional(),
})

function heat(given: z.output<typeof heatInput>) {
  const rim = rimHeat[given.material]
  const free = freeSpeed(given)
  const speedMs = given.speedMs ?? Math.min(worstRimSpeed(free), 40 / 3.6)
  if (!(speedMs > 0)) throw new RangeError('on this gradient the bike does not roll: give a speed')
  const watts = given.watts ?? brakingPower(given, speedMs)
  return {
    rimC: rimTemperature(rim, watts, given.onThisRim, speedMs, given.airC, given.seconds ?? null),
    worstRimC: worstRim(given, given.material, given.onThisRim, given.airC),
    brakingW: watts,
    speedMs,
    freeSpeedMs: free,
    worstRimSpeedMs: worstRimSpeed(free),
    timeConstantS: timeConstant(rim, speedMs),
  }
}

const sum = <S extends z.ZodType>(input: S, work: (given: z.output<S>, rules: Rules) => unknown) => ({
  input,
  work: (given: unknown, rules: Rules) => work(input.parse(given), rules),
})

export const sums: Record<string, { input: z.ZodType; work: (given: unknown, rules: Rules) => unknown }> = {
  'wheel-structure': sum(wheelStructureInput, (given) => wheelStructure(given)),
  'tyre-pressure': sum(tyrePressureInput, tyrePressure),
  'tyre-rim-pairing': sum(pairingInput, (given, rules) => pairTyre(given, rules['tyre-rim-pairing'])),
  'effective-width': sum(
    z.strictObject({ widthMm: positive, innerWidthMm: positive }),
    ({ widthMm, innerWidthMm }, rules) => ({
      widthMm: effectiveWidth(widthMm, innerWidthMm, rules['measuring-rims']),
    }),
  ),
  'riding-power': sum(powerInput, power),
  'front-depth-cap': sum(capInput, (given) => ({ depthMm: frontDepthCap(given) })),
  'brake-heat': sum(heatInput, heat),
  advise: sum(riderAnswers, (given, rules) => advise(given, wheelsetFacts, rules, mark)),
  'what-changes': sum(riderAnswers, (given, rules) => ({
    tippingPoints: tippingPoints(given, wheelsetFacts, rules, mark),
    influence: influence(given, wheelsetFacts, rules, mark),
  })),
}
/**
 * @param name of the sum; text one JSON object
 * @returns what is to be printed, and how the program ends: 0, or 1 with one sentence
 */
export function answer(name: string | undefined, text: string): { out: string; error: string; code: 0 | 1 } {
  const failed = (error: string) => ({ out: '', error: `${error}\n`, code: 1 as const })
  const found = name === undefined ? undefined : sums[name]
  if (!found)
    return failed(`There is no sum called ${name ?? '(nothing)'}. There are: ${Object.keys(sums).join(', ')}.`)
  let given: unknown
  try {
    given = JSON.parse(text)
  } catch {
    return failed('What came in is not one JSON object.')
  }
  try {
    return { out: `${JSON.stringify(found.work(given, rulesFrom(ruleTables)))}\n`, error: '', code: 0 }
  } catch (error) {
    if (error instanceof z.ZodError)
      return failed(
        error.issues.map(({ path, message }) => `${path.length > 0 ? path.join('.') : 'input'}: ${message}`).join('\n'),
      )
    if (error instanceof RangeError) return failed(error.message)
    throw error
  }
}
