/**
 * Wind over a year of rides: its spread, what it makes of the air past the rider, and the means that wheel drag is weighed with.
 * Speeds in m/s, angles in degrees. Wind has a Rayleigh spread of speed and comes from anywhere alike, which is the same as two independent
 * normal parts of spread σ; the air past the rider is then a normal vector about (v, 0), and its angle a projected normal one.
 */
import { splineOf, type Spline } from './spline.ts'

const RAD = Math.PI / 180
const ROOT_TWO_PI = Math.sqrt(2 * Math.PI)

/**
 * Wind speed that a part `share` of the time lies below. w = σ√(−2 ln(1 − p)), σ = ū√(2/π)
 * @param share 0 to below 1
 * @returns m/s
 * @throws RangeError outside those ranges
 * @source aero reference 2.3: Rayleigh, DERIVED
 * @example windQuantile(1, 0.9) // 1.712
 */
export function windQuantile(meanMs: number, share: number): number {
  if (!(meanMs >= 0 && share >= 0 && share < 1)) throw new RangeError('windQuantile: out of range')
  return spreadOf(meanMs) * Math.sqrt(-2 * Math.log(1 - share))
}
const spreadOf = (meanMs: number) => meanMs * Math.sqrt(2 / Math.PI)

/**
 * Wind at the height of a bike from a weather station's, by the log law: u(1 m)/u(10 m) = ln(1/z0)/ln(10/z0).
 * @param roughnessM z0: 0.03 open country, 0.1 hedges; above 0 and below 1
 * @throws RangeError outside those ranges
 * @source aero reference 3.2, DERIVED from the log law
 * @example windAtBike(4, 0.03) // 2.41
 */
export function windAtBike(stationMs: number, roughnessM: number): number {
  if (!(stationMs >= 0 && roughnessM > 0 && roughnessM < 1)) throw new RangeError('windAtBike: out of range')
  return (stationMs * Math.log(1 / roughnessM)) / Math.log(10 / roughnessM)
}

/**
 * Gust that a rider should be ready for: wind of the windiest tenth of the hours, times a gust factor of 1.8.
 * @returns m/s; the rule table holds 5, 7 and 10 for means of 1.2, 2.2 and 3.5 (3.7, 6.8, 10.8 by this; sheltered raised for gateways)
 * @source aero reference 5.4: Harstveit 1996 (READ, form; the constant MEMORY), factor 1.7 to 1.85 at 1 m over open ground, DERIVED
 */
export const designGust = (meanMs: number) => 1.8 * windQuantile(meanMs, 0.9)

/**
 * Part of a standard normal spread below `x`. Φ(x) = ½ + φ(x)·(x + x³/3 + x⁵/15 + …)
 * @source Taylor series, all terms of one sign, summed until nothing changes; Marsaglia 2004, J. Stat. Software 11(4), MEMORY
 */
export function normalShare(x: number): number {
  if (x > 8.3) return 1
  if (x < -8.3) return 0
  let [sum, term, before] = [x, x, 0]
  for (let n = 3; sum !== before; n += 2) {
    before = sum
    term *= (x * x) / n
    sum += term
  }
  return 0.5 + (sum * Math.exp((-x * x) / 2)) / ROOT_TWO_PI
}

/** ∫₀^∞ t·e^(−(t−a)²/2) dt and ∫₀^∞ t³·e^(−(t−a)²/2) dt: radial parts of the share and of the mean square of the air's speed. DERIVED. */
const firstMoment = (a: number) => Math.exp((-a * a) / 2) + ROOT_TWO_PI * a * normalShare(a)
const thirdMoment = (a: number) =>
  (a * a + 2) * Math.exp((-a * a) / 2) + ROOT_TWO_PI * normalShare(a) * (a * a * a + 3 * a)

/** Composite Simpson over an even number of steps. */
function simpson(from: number, to: number, steps: number, of: (x: number) => number): number {
  const step = (to - from) / steps
  let sum = of(from) + of(to)
  for (let index = 1; index < steps; index += 1) sum += (index % 2 === 1 ? 4 : 2) * of(from + index * step)
  return (sum * step) / 3
}

/**
 * Part of the time that the air comes from less than `yawDeg` off the direction of travel, either side.
 * P(|β| ≤ b) = (1/π)∫₀^b e^(−k²sin²β/2)·J₁(k·cos β) dβ, k = v/σ: the projected normal distribution
 * @param yawDeg 0 to 180
 * @returns 0 to 1
 * @throws RangeError outside those ranges
 * @source aero reference 2.3 and 3.2, DERIVED
 * @example yawShareBelow(40 / 3.6, 2.2, 10) // 0.73
 */
export function yawShareBelow(speedMs: number, meanWindMs: number, yawDeg: number): number {
  if (!(speedMs > 0 && meanWindMs > 0 && yawDeg >= 0 && yawDeg <= 180))
    throw new RangeError('yawShareBelow: out of range')
  const k = speedMs / spreadOf(meanWindMs)
  const density = (beta: number) => Math.exp(-((k * Math.sin(beta)) ** 2) / 2) * firstMoment(k * Math.cos(beta))
  return simpson(0, yawDeg * RAD, 400, density) / Math.PI
}

/** Angle that the air stays within for a part `share` of the time, in degrees, by bisection of yawShareBelow. @throws RangeError as there */
export function yawQuantileDeg(speedMs: number, meanWindMs: number, share: number): number {
  if (!(share >= 0 && share < 1)) throw new RangeError('yawQuantileDeg: out of range')
  let [low, high] = [0, 180]
  for (let step = 0; step < 40; step += 1) {
    const middle = (low + high) / 2
    if (yawShareBelow(speedMs, meanWindMs, middle) < share) low = middle
    else high = middle
  }
  return (low + high) / 2
}

/**
 * Mean square of the air's speed as a multiple of v². E[V²]/v² = 1 + (4/π)(ū/v)², exact for this spread.
 * @param windRatio ū/v
 */
export const meanSquareAir = (windRatio: number) => 1 + (4 / Math.PI) * windRatio * windRatio

/**
 * How much of the side force turns into push at an angle, by side area: min(2.2·sin β, 1.2)·tan β·s(β); nothing 8° past the stall.
 * @source aero reference 2.2, DERIVED; for angles up to 20°, where the side-force coefficient stays below its 1.2
 */
export function sailShape(yawDeg: number, stallDeg: number): number {
  const attached = yawDeg <= stallDeg ? 1 : Math.max(0, 1 - (yawDeg - stallDeg) / FADE_DEG)
  return attached === 0 ? 0 : 2.2 * Math.sin(yawDeg * RAD) * Math.tan(yawDeg * RAD) * attached
}
export const FADE_DEG = 8

/**
 * Mean of sailShape(β)·V² over the wind, as a multiple of v², integrated as it stands.
 * = (1/(π·k²))∫ g(β)·e^(−k²sin²β/2)·J₃(k·cos β) dβ over 0 to β_s + 8°, k = v/σ
 * @param windRatio ū/v ≥ 0
 * @param stallDeg 8 to 12: the sail is then gone at 20°, where the drag model ends
 * @throws RangeError outside those ranges
 * @source aero reference 2.3, DERIVED: its mean over speeds and directions with the speed integrated in closed form
 */
export function meanSailDirect(windRatio: number, stallDeg: number): number {
  if (!(windRatio >= 0 && stallDeg >= LEAST_STALL_DEG && stallDeg <= MOST_STALL_DEG))
    throw new RangeError('meanSailDirect: out of range')
  if (windRatio < 1e-6) return 0
  const k = 1 / spreadOf(windRatio)
  const part = (beta: number) =>
    sailShape(beta / RAD, stallDeg) * Math.exp(-((k * Math.sin(beta)) ** 2) / 2) * thirdMoment(k * Math.cos(beta))
  const bend = stallDeg * RAD
  return (simpson(0, bend, 96, part) + simpson(bend, bend + FADE_DEG * RAD, 64, part)) / (Math.PI * k * k)
}
export const LEAST_STALL_DEG = 8
export const MOST_STALL_DEG = 12

/** The table behind meanSail: one curve over ū/v for each whole degree of stall, made when first asked for. */
const STEP = 1 / 48
const MOST_RATIO = 4
const curves = new Map<number, Spline>()
function curveAt(stallDeg: number): Spline {
  let curve = curves.get(stallDeg)
  if (!curve) {
    const values = Array.from({ length: MOST_RATIO / STEP + 1 }, (_, index) => meanSailDirect(index * STEP, stallDeg))
    // The mean is even in ū/v, so the curve leaves 0 level.
    curve = splineOf(values, STEP, 'level')
    curves.set(stallDeg, curve)
  }
  return curve
}

/**
 * meanSailDirect by table: a cubic spline over ū/v, and a polynomial between the whole degrees of stall; beyond ū/v = 4 direct.
 * @returns within 10⁻⁴ of the watts that come of it; the tests hold it against the integral
 * @throws RangeError as meanSailDirect
 */
export function meanSail(windRatio: number, stallDeg: number): number {
  if (!(windRatio >= 0 && stallDeg >= LEAST_STALL_DEG && stallDeg <= MOST_STALL_DEG))
    throw new RangeError('meanSail: out of range')
  if (windRatio > MOST_RATIO) return meanSailDirect(windRatio, stallDeg)
  if (Number.isInteger(stallDeg)) return curveAt(stallDeg).at(windRatio)
  // Polynomial of degree 4 through the five whole degrees.
  let sum = 0
  for (let node = LEAST_STALL_DEG; node <= MOST_STALL_DEG; node += 1) {
    let weight = curveAt(node).at(windRatio)
    for (let other = LEAST_STALL_DEG; other <= MOST_STALL_DEG; other += 1)
      if (other !== node) weight *= (stallDeg - other) / (node - other)
    sum += weight
  }
  return sum
}

/** Steps of the yaw table: half of it is fine enough for a figure shown to a degree. */
const YAW_STEP = 1 / 16
let yawCurves: { median: Spline; nineTenths: Spline } | null = null

/**
 * Yaw that the air stays within half and nine tenths of the time, by a table over ū/v, in degrees; beyond ū/v = 4 the last piece goes on.
 * @param windRatio ū/v ≥ 0
 * @throws RangeError below
 * @source yawQuantileDeg, DERIVED
 */
export function yawQuantiles(windRatio: number): { medianDeg: number; nineTenthsDeg: number } {
  if (!(windRatio >= 0)) throw new RangeError('yawQuantiles: out of range')
  if (!yawCurves) {
    const count = MOST_RATIO / YAW_STEP + 1
    const curve = (share: number) =>
      splineOf(
        Array.from({ length: count }, (_, index) => (index === 0 ? 0 : quantileOnce(index * YAW_STEP, share))),
        YAW_STEP,
        'straight',
      )
    yawCurves = { median: curve(0.5), nineTenths: curve(0.9) }
  }
  return { medianDeg: yawCurves.median.at(windRatio), nineTenthsDeg: yawCurves.nineTenths.at(windRatio) }
}

/** yawQuantileDeg by running along the spread once, a quarter of a degree at a time: quick enough to fill a table. */
function quantileOnce(windRatio: number, share: number): number {
  const k = 1 / spreadOf(windRatio)
  const step = 0.25
  const density = (deg: number) =>
    (Math.exp(-((k * Math.sin(deg * RAD)) ** 2) / 2) * firstMoment(k * Math.cos(deg * RAD)) * RAD) / Math.PI
  let [sum, deg, before] = [0, 0, density(0)]
  for (;;) {
    const after = density(deg + step)
    const part = ((before + after) / 2) * step
    if (sum + part >= share || deg >= 180) return deg + (step * (share - sum)) / part
    sum += part
    deg += step
    before = after
  }
}
