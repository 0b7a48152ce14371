/** What depth gains and costs: the curve, pairs of two depths, and the gradient from which weight weighs more than air. */
import type { DepthInputs } from './depth-inputs.ts'
import { CHAIN_EFFICIENCY, pullPerKg, resistance, roadLoads, speedOfCubic, type Ride } from './power.ts'
import {
  CLIMB_AIR_DENSITY,
  FLAT_AIR_DENSITY,
  gustMoment,
  pairAddedKg,
  pairWatts,
  ridingOf,
  type DepthRange,
  type Riding,
} from './rim-depth.ts'
import { STANDARD_GRAVITY } from './units.ts'
import { BASE_DEPTH_MM } from './wheel-drag.ts'

/** Gradient below which a deeper, heavier pair is faster at fixed speed: G* = ½ρ|ΔCdA|v²/(Δm·g) − C_rr. @source aero reference 2.5, DERIVED */
export function breakEvenGradient(
  dragChangeM2: number,
  addedKg: number,
  speedMs: number,
  airDensity: number,
  rolling: number,
): number {
  if (!(addedKg > 0 && speedMs >= 0 && airDensity > 0)) throw new RangeError('breakEvenGradient: out of range')
  return (0.5 * airDensity * Math.abs(dragChangeM2) * speedMs ** 2) / (addedKg * STANDARD_GRAVITY) - rolling
}

/**
 * Gradient at which two pairs are equally fast at the same power, and the speed there: that at which the ride up G*(v) takes the power.
 * @param ride of the lighter pair; its own gradient plays no part
 * @returns gradient, rise over run; speed in m/s
 * @throws RangeError unless power and added mass are positive
 * @source aero reference 3.8, DERIVED
 */
export function breakEvenAtPower(
  watts: number,
  ride: Omit<Ride, 'speedMs' | 'airSpeedMs' | 'gradient'>,
  dragChangeM2: number,
  addedKg: number,
): { gradient: number; speedMs: number } {
  if (!(watts > 0 && addedKg > 0)) throw new RangeError('breakEvenAtPower: out of range')
  const { airDensity, rollingCoefficient } = ride
  const { a, b, bearingsN, weightN } = roadLoads(ride)
  // G* + C_rr = κ·v², so slope and rolling are one more term in v³; only the cosine of the slope has to be found by going round.
  const steepness = (0.5 * airDensity * Math.abs(dragChangeM2)) / (addedKg * STANDARD_GRAVITY)
  let [gradient, speedMs] = [0, 0]
  for (let round = 0; round < 30; round += 1) {
    const cosine = 1 / Math.sqrt(1 + gradient * gradient)
    speedMs = speedOfCubic(watts * ride.chainEfficiency, a + weightN * steepness * cosine, b, bearingsN)
    const next = steepness * speedMs * speedMs - rollingCoefficient
    if (Math.abs(next - gradient) < 1e-13) break
    gradient = next
  }
  return { gradient, speedMs }
}

export interface TradeOffPoint {
  depthMm: number
  wattsSaved: number
  wattsLow: number
  wattsHigh: number
  /** At the rider's own power on the flat: seconds saved on the way that takes an hour on 25 mm rims. */
  secondsPerHour: number
  /** On the rider's own gradient; negative is faster. */
  climbSecondsPer10Km: number
  gustMomentNm: number
}

/** Part of the watts that the truth may lie off, either side. @source aero reference 2.10 */
export const wattsBand = ({ wideTyre, method }: DepthInputs) =>
  wideTyre ? method.wideTyre.bandShare : method.bandShare

/** Saved watts at a speed as the change of drag area in still air that would save as much, m², below 0 where watts are saved. */
const areaChange = (wattsSaved: number, speedMs: number) =>
  -(wattsSaved * CHAIN_EFFICIENCY) / (0.5 * FLAT_AIR_DENSITY * speedMs ** 3)

/** The ride on 25 mm rims in still air. Written out in full: copying objects costs more than the sums here. */
const still = (riding: Riding, given: DepthInputs, gradient: number, airDensity: number) => ({
  massKg: riding.massKg,
  cdaM2: riding.cdaM2,
  spokeAreaM2: 0,
  rollingCoefficient: given.rollingCoefficient,
  gradient,
  airDensity,
  chainEfficiency: CHAIN_EFFICIENCY,
})

/**
 * The trade-off, one point per depth of a matched pair against a 25 mm pair.
 * @param depthsMm 20 to 100
 * @param riding ridingOf(given), where it is at hand
 * @returns watts at the rider's own speed with their band (±35 %, ±60 % on wide tyres); seconds per hour and per 10 km of climb at fixed
 *   power, drag and mass together; gust moment on the bars in N·m
 * @throws RangeError for depths that the drag model does not hold for
 * @source aero reference 2.8 step 7, DERIVED; climb ±10 %
 */
export function tradeOff(
  given: DepthInputs,
  depthsMm: readonly number[],
  riding: Riding = ridingOf(given),
): TradeOffPoint[] {
  const { flatSpeedMs, climbSpeedMs } = riding
  const band = wattsBand(given)
  const wheelWatts = riding.watts * CHAIN_EFFICIENCY
  const level = resistance(still(riding, given, 0, FLAT_AIR_DENSITY))
  const up = resistance(still(riding, given, given.terrain.gradient, CLIMB_AIR_DENSITY))
  /** Newtons of slope and rolling that each added kilogram brings. */
  const perKg = pullPerKg(given.terrain.gradient, given.rollingCoefficient)
  const thinner = CLIMB_AIR_DENSITY / FLAT_AIR_DENSITY
  return depthsMm.map((depthMm) => {
    const wattsSaved = pairWatts(given, riding, depthMm, depthMm, 'flat')
    // The mean saving over the wind as a push that is there at every speed: nearly so, as most of it is at these small changes of speed.
    const flatPushN = (wattsSaved * CHAIN_EFFICIENCY) / flatSpeedMs
    const climbPushN = (thinner * pairWatts(given, riding, depthMm, depthMm, 'climb') * CHAIN_EFFICIENCY) / climbSpeedMs
    const faster = speedOfCubic(wheelWatts, level.a, level.b, level.c - flatPushN, flatSpeedMs)
    const heavierN = perKg * pairAddedKg(given, depthMm, depthMm)
    const climbing = speedOfCubic(wheelWatts, up.a, up.b, up.c - climbPushN + heavierN, climbSpeedMs)
    return {
      depthMm,
      wattsSaved,
      wattsLow: wattsSaved * (1 - band),
      wattsHigh: wattsSaved * (1 + band),
      secondsPerHour: 3600 * (1 - flatSpeedMs / faster),
      climbSecondsPer10Km: 10_000 / climbing - 10_000 / climbSpeedMs,
      gustMomentNm: gustMoment(depthMm, given.referenceSpeedMs, given.gustMs),
    }
  })
}

/** The deepest pair that the range allows, front and rear each at its upper end, beside the matched pair of the front's depth. */
export interface MixedPair {
  frontMm: number
  rearMm: number
  wattsSaved: number
  matchedWattsSaved: number
  addedMassG: number
  /** Where the pair stops being faster at the rider's power; null for 25 mm rims. */
  breakEvenGradient: number | null
}

/**
 * A rear rim deeper than the front: the wind does not turn it, so its watts come without a push on the bars.
 * @source aero reference 2.4 and 3.7 (the last column), DERIVED, ±35 %
 */
export function mixedPair(given: DepthInputs, range: DepthRange, riding: Riding = ridingOf(given)): MixedPair {
  const [frontMm, rearMm] = [range.front.to, range.rear.to]
  const addedKg = pairAddedKg(given, frontMm, rearMm)
  const wattsSaved = pairWatts(given, riding, frontMm, rearMm, 'flat')
  const ride = still(riding, given, given.terrain.gradient, CLIMB_AIR_DENSITY)
  return {
    frontMm,
    rearMm,
    wattsSaved,
    matchedWattsSaved: pairWatts(given, riding, frontMm, frontMm, 'flat'),
    addedMassG: 1000 * addedKg,
    breakEvenGradient:
      frontMm === BASE_DEPTH_MM && rearMm === BASE_DEPTH_MM
        ? null
        : breakEvenAtPower(riding.watts, ride, areaChange(wattsSaved, riding.flatSpeedMs), addedKg).gradient,
  }
}
