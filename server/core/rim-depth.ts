/** How deep a rim may be in front and behind, and what depth gains and costs. Depths in mm, masses in kg, speeds in m/s. */
import { ridingPower, speedAtPower, dragArea } from './power.ts'
import { roundTo } from './display.ts'
import { kmhToMs, STANDARD_GRAVITY } from './units.ts'
import { meanWattsSaved, sideForceArea } from './wheel-drag.ts'

const RADIUS_M = 0.336
const TYRE_M = 0.025
const AIR_DENSITY = 1.225
const CHAIN = 0.977
const ROLLING = 0.004
/** Trail at 73° head angle and 45 mm rake, m: (R·cos 73° − 0.045)/sin 73°. */
const TRAIL_M = (RADIUS_M * Math.cos((73 * Math.PI) / 180) - 0.045) / Math.sin((73 * Math.PI) / 180)
/** Steer axis to centre of side pressure, m, ±0.020: one unreviewed record and the fork rake (aero reference 5.4, DERIVED). */
const LEVER_M = 0.06
/** Shallowest rim the wind model knows. */
export const SHALLOWEST_MM = 25

/** Moment a gust puts on the bars, N·m. M = 0.06·½ρ(v² + w²)·CsA(d, atan(w/v)). @source aero reference 2.4, DERIVED, ±40 % */
export function gustMoment(depthMm: number, speedMs: number, gustMs: number): number {
  const yawDeg = (Math.atan(gustMs / speedMs) * 180) / Math.PI
  return LEVER_M * 0.5 * AIR_DENSITY * (speedMs ** 2 + gustMs ** 2) * sideForceArea(depthMm, yawDeg)
}

/** Resisting stiffness of the loaded front wheel, N·m: 0.42·(rider + bike)·g·trail. */
export const steeringStiffness = (bodyMassKg: number, bikeMassKg: number) =>
  0.42 * (bodyMassKg + bikeMassKg) * STANDARD_GRAVITY * TRAIL_M

/**
 * Deepest front rim whose gust moment asks for no more than `correctionDeg` of lean or steer.
 * A = φ·N_f·t/(a·½ρ(v² + w²)·min(2.2 sin β, 1.2)); d = 1000·(R − 0.025 − √(R² − A/π))
 * @returns mm, not rounded; Infinity when even a disc would pass
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
  const sine = gustMs / Math.hypot(speedMs, gustMs)
  const perArea = LEVER_M * 0.5 * AIR_DENSITY * (speedMs ** 2 + gustMs ** 2) * Math.min(2.2 * sine, 1.2)
  const areaM2 = (((correctionDeg * Math.PI) / 180) * steeringStiffness(bodyMassKg, bikeMassKg)) / perArea
  const inside = RADIUS_M ** 2 - areaM2 / Math.PI
  return inside <= 0 ? Infinity : 1000 * (RADIUS_M - TYRE_M - Math.sqrt(inside))
}

export interface DepthInputs {
  bodyMassKg: number
  bikeMassKg: number
  flatSpeedKmh: number
  aeroBars: boolean
  meanWindMs: number
  gustMs: number
  correctionDeg: number
  referenceSpeedMs: number
  /** Deepest rim that the use allows, whatever the wind. */
  clampMm: number
  terrain: { flatShare: number; climbShare: number; gradient: number }
  /** Gravel: the tyre is far wider than the rim. */
  wideTyre: boolean
}

const stall = (wideTyre: boolean) => (wideTyre ? { stallDeg: 8, sailShare: 0.5 } : {})
/** Rim mass grows by 3.8 g per mm and wheel, ±1. MEMORY of typical carbon rims. */
const KG_PER_MM = 0.0038

/** Speeds and savings that every depth is compared with. */
function riding(given: DepthInputs) {
  const flatSpeedMs = kmhToMs(given.flatSpeedKmh)
  const massKg = given.bodyMassKg + given.bikeMassKg
  const cdaM2 = dragArea(given.bodyMassKg) * (given.aeroBars ? 0.75 : 1)
  const still = { massKg, cdaM2, spokeAreaM2: 0, rollingCoefficient: ROLLING, chainEfficiency: CHAIN }
  const watts = ridingPower({
    ...still,
    speedMs: flatSpeedMs,
    airSpeedMs: flatSpeedMs,
    gradient: 0,
    airDensity: AIR_DENSITY,
  }).total
  const climbSpeedMs = speedAtPower(watts, { ...still, gradient: given.terrain.gradient, airDensity: 1.2 })
  const saved = new Map<string, number>()
  const savedBy = (depthMm: number, speedMs: number) => {
    const key = `${depthMm} ${speedMs}`
    const known = saved.get(key)
    if (known !== undefined) return known
    const fresh = meanWattsSaved({
      depthMm,
      speedMs,
      meanWindMs: given.meanWindMs,
      airDensity: AIR_DENSITY,
      chainEfficiency: CHAIN,
      ...stall(given.wideTyre),
    })
    saved.set(key, fresh)
    return fresh
  }
  const pair = (frontMm: number, rearMm: number, speedMs: number) =>
    0.9 * savedBy(frontMm, speedMs) + 0.6 * savedBy(rearMm, speedMs)
  return { flatSpeedMs, climbSpeedMs, watts, still, pair }
}

/**
 * Range of depths that suit, front and rear.
 * The upper end is the gust cap within the clamp; the lower end the shallowest rim that brings 85 % of the best gain the cap allows,
 * gain being watts saved on the flat and on the climb less the watts that the added rim mass costs uphill.
 * @returns whole multiples of 5 mm, upper ends rounded down to the clamp; capMm as computed
 * @source aero reference 2.8, DERIVED; 85 %, terrain mix and clamps are policy
 */
export function depthRange(given: DepthInputs) {
  const capMm = frontDepthCap({ ...given, speedMs: given.referenceSpeedMs })
  const shallow = capMm < SHALLOWEST_MM
  const to = Math.max(
    SHALLOWEST_MM,
    Math.min(roundTo(Math.min(capMm, 200), 5, 'nearest'), roundTo(given.clampMm, 5, 'down')),
  )
  const rearTo = Math.min(to + 20, roundTo(given.clampMm, 5, 'down'))
  const { flatSpeedMs, climbSpeedMs, pair } = riding(given)
  const { flatShare, climbShare, gradient } = given.terrain
  const slope = Math.atan(gradient)
  const gain = (frontMm: number) => {
    const rearMm = Math.min(frontMm + 10, rearTo)
    const addedKg = KG_PER_MM * (frontMm - 25 + (rearMm - 25))
    const massWatts =
      (addedKg * STANDARD_GRAVITY * (Math.sin(slope) + ROLLING * Math.cos(slope)) * climbSpeedMs) / CHAIN
    return (
      flatShare * pair(frontMm, rearMm, flatSpeedMs) + climbShare * (pair(frontMm, rearMm, climbSpeedMs) - massWatts)
    )
  }
  const depths = Array.from({ length: (to - SHALLOWEST_MM) / 5 + 1 }, (_, index) => SHALLOWEST_MM + 5 * index)
  const gains = depths.map(gain)
  const best = Math.max(...gains)
  const found = depths[gains.findIndex((one) => one >= 0.85 * best)] ?? SHALLOWEST_MM
  const from = shallow ? SHALLOWEST_MM : Math.max(SHALLOWEST_MM, Math.min(found, to - 10))
  return { capMm, shallow, front: { from, to }, rear: { from, to: Math.max(from, rearTo) } }
}

/**
 * The trade-off, one point per depth of a matched pair against a 25 mm pair.
 * @returns watts at the rider's own speed with their band (±35 %, ±60 % on wide tyres); seconds per 10 km on the rider's own gradient at
 *   fixed power with drag and mass together (negative is faster); gust moment on the bars in N·m
 * @source aero reference 2.8 step 7, DERIVED
 */
export function tradeOff(given: DepthInputs, depthsMm: readonly number[]) {
  const { flatSpeedMs, climbSpeedMs, watts, still, pair } = riding(given)
  const band = given.wideTyre ? 0.6 : 0.35
  const uphill = (cdaChangeM2: number, addedKg: number) =>
    10_000 /
    speedAtPower(watts, {
      ...still,
      massKg: still.massKg + addedKg,
      cdaM2: still.cdaM2 + cdaChangeM2,
      gradient: given.terrain.gradient,
      airDensity: 1.2,
    })
  const shallow = uphill(0, 0)
  return depthsMm.map((depthMm) => {
    const wattsSaved = pair(depthMm, depthMm, flatSpeedMs)
    // The mean saving at climbing speed as an equal change of drag area in still air.
    const areaM2 = -(pair(depthMm, depthMm, climbSpeedMs) * CHAIN) / (0.5 * AIR_DENSITY * climbSpeedMs ** 3)
    return {
      depthMm,
      wattsSaved,
      wattsLow: wattsSaved * (1 - band),
      wattsHigh: wattsSaved * (1 + band),
      climbSecondsPer10Km: uphill(areaM2, 2 * KG_PER_MM * (depthMm - 25)) - shallow,
      gustMomentNm: gustMoment(depthMm, given.referenceSpeedMs, given.gustMs),
    }
  })
}

/** Gradient below which a deeper, heavier pair is faster at fixed speed: G* = ½ρ|ΔCdA|v²/(Δm·g) − C_rr. @source aero reference 2.5, DERIVED */
export const breakEvenGradient = (
  dragChangeM2: number,
  addedKg: number,
  speedMs: number,
  airDensity: number,
  rolling: number,
) => (0.5 * airDensity * Math.abs(dragChangeM2) * speedMs ** 2) / (addedKg * STANDARD_GRAVITY) - rolling
