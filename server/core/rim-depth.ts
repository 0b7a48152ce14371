/** How deep a rim may be in front and behind. Depths in mm, masses in kg, speeds in m/s. */
import type { DepthInputs } from './depth-inputs.ts'
import { CHAIN_EFFICIENCY, dragArea, massWatts, resistance, speedOfCubic } from './power.ts'
import { roundTo } from './display.ts'
import { kmhToMs, STANDARD_GRAVITY } from './units.ts'
import {
  BASE_DEPTH_MM,
  meanDragGain,
  sideArea,
  sideForceArea,
  sideForceCoefficient,
  TYRE_HEIGHT_M,
  WHEEL_RADIUS_M,
  windMeans,
  type WindMeans,
} from './wheel-drag.ts'

export type { DepthInputs }

/** Air on the flat and on climbs, kg/m³: the standard at sea level, and that of a few hundred metres on a mild day. @source aero reference 3.4, 3.7 */
export const FLAT_AIR_DENSITY = 1.225
export const CLIMB_AIR_DENSITY = 1.2
const HEAD_ANGLE = (73 * Math.PI) / 180
const RAKE_M = 0.045
/** Trail at 73° head angle and 45 mm rake, m: (R·cos 73° − 0.045)/sin 73°. @source aero reference 2.4, DERIVED */
export const TRAIL_M = (WHEEL_RADIUS_M * Math.cos(HEAD_ANGLE) - RAKE_M) / Math.sin(HEAD_ANGLE)
/** Steer axis to centre of side pressure, m, ±0.020: one unreviewed record and the fork rake. @source aero reference 5.4, DERIVED */
export const LEVER_M = 0.06
/** Part of rider and bike on the front wheel of a road bike. @source aero reference 2.4 */
export const FRONT_SHARE = 0.42
/** Shallowest rim the wind model knows. */
export const SHALLOWEST_MM = BASE_DEPTH_MM

/**
 * Moment a gust from the side puts on the bars, N·m. M = a·½ρ(v² + w²)·CsA(d, atan(w/v)), a = 0.060 m
 * @param noseFactor 0.8 for rims with a wide blunt inner edge, 1.2 for narrow V sections (MEMORY, judgement); rims' noses are not among our facts
 * @throws RangeError unless the speed is positive and the gust not negative
 * @source aero reference 2.4, DERIVED, ±40 %
 * @example gustMoment(50, 10, 7) // 0.92
 */
export function gustMoment(depthMm: number, speedMs: number, gustMs: number, noseFactor = 1): number {
  return LEVER_M * noseFactor * gustForce(depthMm, speedMs, gustMs)
}

/** Side force of a gust on one wheel, N: ½ρ(v² + w²)·CsA(d, atan(w/v)). @throws RangeError as above @source aero reference 2.4, DERIVED */
export function gustForce(depthMm: number, speedMs: number, gustMs: number): number {
  if (!(speedMs > 0 && gustMs >= 0)) throw new RangeError('gustForce: out of range')
  const yawDeg = (Math.atan(gustMs / speedMs) * 180) / Math.PI
  return 0.5 * FLAT_AIR_DENSITY * (speedMs ** 2 + gustMs ** 2) * sideForceArea(depthMm, yawDeg)
}

/** Resisting stiffness of the loaded front wheel, N·m per radian: 0.42·(rider + bike)·g·trail. @source aero reference 2.4, DERIVED */
export const steeringStiffness = (bodyMassKg: number, bikeMassKg: number) =>
  FRONT_SHARE * (bodyMassKg + bikeMassKg) * STANDARD_GRAVITY * TRAIL_M

/**
 * Deepest front rim whose gust moment asks for no more than `correctionDeg` of lean or steer.
 * A = φ·N_f·t/(a·½ρ(v² + w²)·min(2.2 sin β, 1.2)); d = 1000·(R − 0.025 − √(R² − A/π))
 * @returns mm, not rounded; Infinity when even a disc would pass
 * @throws RangeError unless all are positive; the bike may have no mass
 * @source aero reference 2.4, DERIVED; the angles are judgement, the largest weakness of the method (±15 mm)
 * @example frontDepthCap({ bodyMassKg: 75, bikeMassKg: 8, gustMs: 7, speedMs: 10, correctionDeg: 3 }) // 57
 */
export function frontDepthCap(given: {
  bodyMassKg: number
  bikeMassKg: number
  gustMs: number
  speedMs: number
  correctionDeg: number
}): number {
  const { bodyMassKg, bikeMassKg, gustMs, speedMs, correctionDeg } = given
  if (!(bodyMassKg > 0 && bikeMassKg >= 0 && gustMs > 0 && speedMs > 0 && correctionDeg > 0))
    throw new RangeError('frontDepthCap: out of range')
  const yawDeg = (Math.atan(gustMs / speedMs) * 180) / Math.PI
  const perArea = LEVER_M * 0.5 * FLAT_AIR_DENSITY * (speedMs ** 2 + gustMs ** 2) * sideForceCoefficient(yawDeg)
  const areaM2 = (((correctionDeg * Math.PI) / 180) * steeringStiffness(bodyMassKg, bikeMassKg)) / perArea
  const inside = WHEEL_RADIUS_M ** 2 - areaM2 / Math.PI
  const innerM = WHEEL_RADIUS_M - TYRE_HEIGHT_M
  return inside <= 0 || areaM2 > sideArea(1000 * innerM) ? Infinity : 1000 * (innerM - Math.sqrt(inside))
}

/** What every depth is compared with: speeds, power, and the means of the wind at both speeds. */
export interface Riding {
  flatSpeedMs: number
  climbSpeedMs: number
  watts: number
  /** Rider, bike and what they carry, kg; drag area with 25 mm rims, m². */
  massKg: number
  cdaM2: number
  flat: WindMeans
  climb: WindMeans
}

/**
 * Power on the flat in still air, and the speed that it gives on the rider's climbs.
 * @param direct integrate the wind instead of reading its table
 * @throws RangeError for inputs out of the ranges of its parts
 * @source aero reference 2.8 steps 1 and 2; Martin et al. 1998 (form READ via open transcriptions)
 */
export function ridingOf(given: DepthInputs, direct = false): Riding {
  const { method, terrain, rollingCoefficient, meanWindMs, stallDeg } = given
  const flatSpeedMs = kmhToMs(given.flatSpeedKmh)
  const massKg = given.bodyMassKg + given.bikeMassKg + given.carriedKg
  const cdaM2 = dragArea(given.bodyMassKg) * given.positionDrag
  const on = (gradient: number, airDensity: number) =>
    resistance({
      massKg,
      cdaM2,
      spokeAreaM2: 0,
      rollingCoefficient,
      gradient,
      airDensity,
      chainEfficiency: CHAIN_EFFICIENCY,
    })
  const level = on(0, FLAT_AIR_DENSITY)
  const wheelWatts = ((level.a * flatSpeedMs + level.b) * flatSpeedMs + level.c) * flatSpeedMs
  const up = on(terrain.gradient, CLIMB_AIR_DENSITY)
  const climbSpeedMs = speedOfCubic(wheelWatts, up.a, up.b, up.c)
  const sailShare = given.wideTyre ? method.wideTyre.sailShare : 1
  const means = (speedMs: number) => windMeans({ speedMs, meanWindMs, stallDeg, sailShare }, direct)
  return {
    flatSpeedMs,
    climbSpeedMs,
    watts: wheelWatts / CHAIN_EFFICIENCY,
    massKg,
    cdaM2,
    flat: means(flatSpeedMs),
    climb: means(climbSpeedMs),
  }
}

/**
 * Watts that a pair saves against 25 mm rims: ½ρ·v/E_c·(0.9·mean in front + 0.6·mean behind).
 * @returns W, on the flat or at the climbing speed
 * @source aero reference 2.3, DERIVED, ±35 %
 */
export function pairWatts(given: DepthInputs, riding: Riding, frontMm: number, rearMm: number, on: 'flat' | 'climb') {
  const { frontFactor, rearFactor } = given.method
  const means = riding[on]
  const speedMs = on === 'flat' ? riding.flatSpeedMs : riding.climbSpeedMs
  const gain = frontFactor * meanDragGain(frontMm, means) + rearFactor * meanDragGain(rearMm, means)
  return (0.5 * FLAT_AIR_DENSITY * speedMs * gain) / CHAIN_EFFICIENCY
}

/** Rim mass that a pair has over 25 mm rims, kg: 3.8 g per mm and wheel, ±1. MEMORY of typical carbon rims. */
export const pairAddedKg = (given: DepthInputs, frontMm: number, rearMm: number) =>
  (given.method.rimGramPerMm / 1000) * (frontMm - BASE_DEPTH_MM + (rearMm - BASE_DEPTH_MM))

export interface DepthRange {
  /** Deepest front rim by the gust, as computed. */
  capMm: number
  /** The gust allows less than the shallowest rim that the model knows. */
  shallow: boolean
  front: { from: number; to: number }
  rear: { from: number; to: number }
}

/**
 * Range of depths that suit, front and rear.
 * The upper end is the gust cap within the clamp; the lower end the shallowest rim that brings 85 % of the best gain the cap allows,
 * gain being watts saved on the flat and on the climb less the watts that the added rim mass costs uphill.
 * @param riding ridingOf(given), where it is at hand
 * @returns whole multiples of 5 mm, upper ends rounded down to the clamp; capMm as computed
 * @source aero reference 2.8, DERIVED; 85 %, terrain mix and clamps are policy
 */
export function depthRange(given: DepthInputs, riding = ridingOf(given)): DepthRange {
  const { gainShare, rearExtraMm, pairStepMm, leastRangeMm, stepMm } = given.method
  const { bodyMassKg, bikeMassKg, gustMs, correctionDeg, referenceSpeedMs } = given
  const capMm = frontDepthCap({ bodyMassKg, bikeMassKg, gustMs, speedMs: referenceSpeedMs, correctionDeg })
  const shallow = capMm < SHALLOWEST_MM
  const clampMm = roundTo(given.clampMm, stepMm, 'down')
  const to = Math.max(SHALLOWEST_MM, Math.min(roundTo(Math.min(capMm, 200), stepMm, 'nearest'), clampMm))
  const rearTo = Math.max(SHALLOWEST_MM, Math.min(to + rearExtraMm, clampMm))
  if (shallow) return { capMm, shallow, front: { from: SHALLOWEST_MM, to }, rear: { from: SHALLOWEST_MM, to: rearTo } }

  const { flatShare, climbShare, gradient } = given.terrain
  const uphill = {
    gradient,
    rollingCoefficient: given.rollingCoefficient,
    speedMs: riding.climbSpeedMs,
    chainEfficiency: CHAIN_EFFICIENCY,
  }
  const gainOf = (frontMm: number) => {
    const rearMm = Math.min(frontMm + pairStepMm, rearTo)
    const climbWatts =
      pairWatts(given, riding, frontMm, rearMm, 'climb') - massWatts(pairAddedKg(given, frontMm, rearMm), uphill)
    return flatShare * pairWatts(given, riding, frontMm, rearMm, 'flat') + climbShare * climbWatts
  }
  const gains: number[] = []
  for (let mm = SHALLOWEST_MM; mm <= to; mm += stepMm) gains.push(gainOf(mm))
  const enough = gainShare * Math.max(...gains)
  const found =
    SHALLOWEST_MM +
    stepMm *
      Math.max(
        0,
        gains.findIndex((gain) => gain >= enough),
      )
  const from = Math.max(SHALLOWEST_MM, Math.min(found, to - leastRangeMm))
  return { capMm, shallow, front: { from, to }, rear: { from, to: Math.max(from, rearTo) } }
}
