/**
 * Drag and side force of one wheel by rim depth and yaw, and its mean over the wind. Semi-empirical: no wheel-by-wheel table could be
 * read, so the bands are wide (±35 %) and are shown. Depth in mm, yaw in degrees, areas in m².
 * Depth and yaw separate: ΔCdA(d,β) = C0(d) − C0(25) − η(d)·A_side(d)·g(β), so the mean over the wind needs the means of V² and g(β)·V² only.
 * @source aero reference 2.2 and 2.3, DERIVED; anchored on Greenwell et al. 1995 (MEMORY) and Crane & Morton 2018 (READ, abstract)
 */
import { FADE_DEG, LEAST_STALL_DEG, meanSail, meanSailDirect, meanSquareAir, MOST_STALL_DEG } from './wind.ts'

/** Outer radius with a 28 mm tyre, and its visible height, m. */
export const WHEEL_RADIUS_M = 0.336
export const TYRE_HEIGHT_M = 0.025
/** Rim that everything is compared with, and the depths that the drag model holds for, mm. */
export const BASE_DEPTH_MM = 25
const LEAST_DEPTH_MM = 20
export const MOST_DEPTH_MM = 100
/** Beyond this yaw the drag model holds its value. */
const MOST_YAW_DEG = 20
const rad = (deg: number) => (deg * Math.PI) / 180

/**
 * Side area of rim and tyre, m²: π[R² − (R − 0.025 − d)²].
 * @param depthMm 311, a disc, down to −25, nothing at all; the cap of a very light rider may lie below 0
 * @throws RangeError outside
 */
export function sideArea(depthMm: number): number {
  const innerM = WHEEL_RADIUS_M - TYRE_HEIGHT_M - depthMm / 1000
  if (!(depthMm >= -1000 * TYRE_HEIGHT_M && innerM >= -1e-12)) throw new RangeError('sideArea: out of range')
  return Math.PI * (WHEEL_RADIUS_M ** 2 - innerM ** 2)
}

/** Side force by side area: min(2.2·sin β, 1.2). 2.2 is near the lift slope of a low-aspect disc, DERIVED; ±25 %. */
export const sideForceCoefficient = (yawDeg: number) => Math.min(2.2 * Math.sin(rad(yawDeg)), 1.2)

/** Side-force area, m²: min(2.2·sin β, 1.2)·A_side. @param yawDeg 0 to 90 @source aero reference 2.2, DERIVED, ±25 % */
export const sideForceArea = (depthMm: number, yawDeg: number) => sideForceCoefficient(yawDeg) * sideArea(depthMm)

/** Force over dynamic pressure, m²: F/(½ρv²), as wind tunnels and flow records give it. @throws RangeError unless both are positive */
export function forceArea(forceN: number, airDensity: number, speedMs: number): number {
  if (!(airDensity > 0 && speedMs > 0)) throw new RangeError('forceArea: out of range')
  return forceN / (0.5 * airDensity * speedMs ** 2)
}

/** Drag area at no yaw, m²: C0(d) = 0.0165 − 0.0050·(1 − e^(−(d−25)/17)). */
const headOnArea = (depthMm: number) => 0.0165 - 0.005 * (1 - Math.exp(-(depthMm - BASE_DEPTH_MM) / 17))
/** Part of the side force recovered as push: η(d) = 0.42·(1 − e^(−(d−25)/40)). */
const recovered = (depthMm: number) => 0.42 * (1 - Math.exp(-(depthMm - BASE_DEPTH_MM) / 40))

/**
 * Yaw at which the flow lets go of the rim, by tyre and rim: 12° up to a tyre of 0.95 of the rim's width, 10° at 1.0, 8° from 1.10 on.
 * @param rimOuterMm outside width of the rim
 * @throws RangeError unless both are positive
 * @source aero reference 2.2, DERIVED; Crane & Morton 2018 (READ, abstract): drag goes with tyre over rim width
 * @example stallYawDeg(28, 28) // 10
 */
export function stallYawDeg(tyreMm: number, rimOuterMm: number): number {
  if (!(tyreMm > 0 && rimOuterMm > 0)) throw new RangeError('stallYawDeg: out of range')
  const ratio = tyreMm / rimOuterMm
  if (ratio <= 1) return Math.min(MOST_STALL_DEG, 10 + (2 * (1 - ratio)) / 0.05)
  return Math.max(LEAST_STALL_DEG, 10 - (2 * (ratio - 1)) / 0.1)
}

/**
 * CdA(d,β) = C0(d) + 0.035·sin²β − η(d)·s(β)·CsA·tan β: the last term is side force turned into push, gone past the stall.
 * @param depthMm 20 to 100
 * @param stallDeg yaw at which the push starts to fade, over 8°; see stallYawDeg
 * @param sailShare part of the push that counts: 1, or 0.5 where the tyre is far wider than the rim
 * @returns m²; past 20° the value at 20°
 * @throws RangeError for other depths
 */
export function wheelDragArea(depthMm: number, yawDeg: number, stallDeg = 12, sailShare = 1): number {
  if (!(depthMm >= LEAST_DEPTH_MM && depthMm <= MOST_DEPTH_MM)) throw new RangeError('wheelDragArea: out of range')
  const yaw = Math.min(Math.abs(yawDeg), MOST_YAW_DEG)
  const attached = yaw <= stallDeg ? 1 : Math.max(0, 1 - (yaw - stallDeg) / FADE_DEG)
  const sail = sailShare * recovered(depthMm) * attached * sideForceArea(depthMm, yaw) * Math.tan(rad(yaw))
  return headOnArea(depthMm) + 0.035 * Math.sin(rad(yaw)) ** 2 - sail
}

/** Against a 25 mm rim at the same yaw, m²; negative is less drag. @throws RangeError as wheelDragArea */
export const dragChange = (depthMm: number, yawDeg: number, stallDeg = 12, sailShare = 1) =>
  wheelDragArea(depthMm, yawDeg, stallDeg, sailShare) - wheelDragArea(BASE_DEPTH_MM, yawDeg, stallDeg, sailShare)

/** What of the drag depends on depth alone: gain at no yaw and push by g(β). */
interface DepthFactors {
  headOnGainM2: number
  sailM2: number
}
const factorsOf = (depthMm: number): DepthFactors => ({
  headOnGainM2: headOnArea(BASE_DEPTH_MM) - headOnArea(depthMm),
  sailM2: recovered(depthMm) * sideArea(depthMm),
})
/** Rims come in whole millimetres; their factors are worked out once. */
const wholeDepths = Array.from({ length: MOST_DEPTH_MM + 1 }, (_, mm) => (mm < LEAST_DEPTH_MM ? null : factorsOf(mm)))

/** What of the drag depends on speed and wind alone. */
export interface WindMeans {
  /** E[V²] and E[g(β)·V²], m²/s². */
  squareMs2: number
  sailMs2: number
}

/**
 * The two means over the wind that every depth shares.
 * @param speedMs above 0; meanWindMs at least 0
 * @param direct integrate instead of reading the table
 * @throws RangeError outside those ranges
 * @source aero reference 2.3, DERIVED
 */
export function windMeans(
  given: { speedMs: number; meanWindMs: number; stallDeg?: number; sailShare?: number },
  direct = false,
): WindMeans {
  const { speedMs, meanWindMs, stallDeg = 12, sailShare = 1 } = given
  if (!(speedMs > 0 && meanWindMs >= 0)) throw new RangeError('windMeans: out of range')
  const ratio = meanWindMs / speedMs
  const square = speedMs * speedMs
  const sail = direct ? meanSailDirect(ratio, stallDeg) : meanSail(ratio, stallDeg)
  return { squareMs2: square * meanSquareAir(ratio), sailMs2: square * sailShare * sail }
}

/**
 * Mean of −ΔCdA(d,β)·V² over the wind, m²·m²/s²: times ½ρ·v/E_c it is watts.
 * @param depthMm 20 to 100
 * @throws RangeError for other depths
 */
export function meanDragGain(depthMm: number, { squareMs2, sailMs2 }: WindMeans): number {
  if (!(depthMm >= LEAST_DEPTH_MM && depthMm <= MOST_DEPTH_MM)) throw new RangeError('meanDragGain: out of range')
  const { headOnGainM2, sailM2 } = wholeDepths[depthMm] ?? factorsOf(depthMm)
  return headOnGainM2 * squareMs2 + sailM2 * sailMs2
}

/**
 * Watts that one free-standing wheel saves against a 25 mm rim: mean of −½ρ·ΔCdA·V²·v/E_c over the wind.
 * On the bike the front counts 0.9 and the rear 0.6 (Kyle's 40 %, READ second-hand in Malizia et al. 2021).
 * @param direct integrate instead of reading the table; the two agree to 10⁻⁴
 * @returns W
 * @throws RangeError as windMeans and meanDragGain
 * @source aero reference 2.3, DERIVED, ±35 %
 * @example 1.5 * meanWattsSaved({ depthMm: 50, speedMs: 40 / 3.6, meanWindMs: 2.2, airDensity: 1.225, chainEfficiency: 0.977 }) // 6.5
 */
export function meanWattsSaved(
  given: {
    depthMm: number
    speedMs: number
    meanWindMs: number
    airDensity: number
    chainEfficiency: number
    stallDeg?: number
    sailShare?: number
  },
  direct = false,
): number {
  const { depthMm, speedMs, airDensity, chainEfficiency } = given
  return (0.5 * airDensity * speedMs * meanDragGain(depthMm, windMeans(given, direct))) / chainEfficiency
}
