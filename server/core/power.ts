/** Power of riding on a road, after Martin et al. 1998. SI throughout: m, s, kg, W; gradient is rise over run. */
import { STANDARD_GRAVITY } from './units.ts'

/** Drive efficiency. 97.698 % is the paper's printed figure (MEMORY); 0.976 in two open transcriptions (READ): 0.1 % either way. */
export const CHAIN_EFFICIENCY = 0.977
/** Bearings of both wheels, W: v·(0.091 + 0.0087·v). READ via an open transcription of the paper. */
const BEARING_N = 0.091
const BEARING_NS_PER_M = 0.0087

export interface Ride {
  speedMs: number
  /** Speed through the air; equal to speedMs without wind. */
  airSpeedMs: number
  massKg: number
  cdaM2: number
  /** Extra drag area of rotating spokes, both wheels: 0.0044 in the paper; 0 when cdaM2 already holds the wheels. */
  spokeAreaM2: number
  rollingCoefficient: number
  gradient: number
  airDensity: number
  chainEfficiency: number
  gravity?: number
}

/**
 * P = (½ρ(CdA + F_w)·V_a²·V_g + V_g·C_rr·m·g·cos + V_g(91 + 8.7·V_g)·10⁻³ + V_g·m·g·sin + P_KE) / E_c
 * @param kinetic change of speed over a time, with the wheels' inertia I (kg·m²) at radius r (m)
 * @returns W in total and by part; the parts are before the chain
 * @throws RangeError unless mass, density and efficiency are positive and speed is not negative
 * @source Martin, Milliken, Cobb, McFadden, Coggan 1998, J. Appl. Biomech. 14(3): form READ via two open transcriptions
 */
export function ridingPower(
  ride: Ride,
  kinetic?: { fromMs: number; toMs: number; seconds: number; inertia: number; radiusM: number },
) {
  const { speedMs: v, airSpeedMs, massKg, cdaM2, spokeAreaM2, rollingCoefficient, gradient, airDensity } = ride
  const { chainEfficiency } = ride
  if (!(v >= 0 && massKg > 0 && airDensity > 0 && chainEfficiency > 0 && chainEfficiency <= 1))
    throw new RangeError('ridingPower: out of range')
  const weight = massKg * (ride.gravity ?? STANDARD_GRAVITY)
  const cosine = 1 / Math.sqrt(1 + gradient * gradient)
  const air = 0.5 * airDensity * (cdaM2 + spokeAreaM2) * airSpeedMs * Math.abs(airSpeedMs) * v
  const rolling = v * rollingCoefficient * weight * cosine
  const bearings = v * (BEARING_N + BEARING_NS_PER_M * v)
  const climbing = v * weight * gradient * cosine
  const accelerating = kinetic
    ? (0.5 * effectiveMass(massKg, kinetic.inertia, kinetic.radiusM) * (kinetic.toMs ** 2 - kinetic.fromMs ** 2)) /
      kinetic.seconds
    : 0
  return {
    total: (air + rolling + bearings + climbing + accelerating) / chainEfficiency,
    air,
    rolling,
    bearings,
    climbing,
    accelerating,
  }
}

/**
 * Mass that speeding up has to move: m + I/r². A gram at the rim counts nearly twice here, and once on a climb.
 * @param inertia of both wheels, kg·m²; radiusM of the tyre, above 0
 * @throws RangeError outside those ranges
 * @source aero reference 2.5, DERIVED
 */
export function effectiveMass(massKg: number, inertia: number, radiusM: number): number {
  if (!(massKg > 0 && inertia >= 0 && radiusM > 0)) throw new RangeError('effectiveMass: out of range')
  return massKg + inertia / (radiusM * radiusM)
}

/** Pull of slope and rolling on each kilogram, N/kg: g·(sin θ + C_rr·cos θ), θ = atan(gradient). */
export const pullPerKg = (gradient: number, rollingCoefficient: number, gravity = STANDARD_GRAVITY) =>
  (gravity * (gradient + rollingCoefficient)) / Math.sqrt(1 + gradient * gradient)

/**
 * Power that added mass costs at a speed: ΔP = Δm·g·(sin + C_rr·cos)·v / E_c
 * @returns W; negative for mass taken off
 * @throws RangeError for a negative speed or an efficiency outside 0 to 1
 * @source aero reference 2.5, DERIVED
 * @example massWatts(0.1, { gradient: 0.08, rollingCoefficient: 0.004, speedMs: 15 / 3.6, chainEfficiency: 0.977 }) // 0.35
 */
export function massWatts(
  addedKg: number,
  on: { gradient: number; rollingCoefficient: number; speedMs: number; chainEfficiency: number },
): number {
  const { gradient, rollingCoefficient, speedMs, chainEfficiency } = on
  if (!(speedMs >= 0 && chainEfficiency > 0 && chainEfficiency <= 1)) throw new RangeError('massWatts: out of range')
  return (addedKg * pullPerKg(gradient, rollingCoefficient) * speedMs) / chainEfficiency
}

/** Wind from `fromDeg`, riding towards `headingDeg`. @returns air speed along the road and absolute yaw in degrees @source as above */
export function windOnRider(speedMs: number, windMs: number, fromDeg: number, headingDeg: number) {
  const angle = ((fromDeg - headingDeg) * Math.PI) / 180
  const airSpeedMs = speedMs + windMs * Math.cos(angle)
  return { airSpeedMs, yawDeg: Math.abs((Math.atan2(windMs * Math.sin(angle), airSpeedMs) * 180) / Math.PI) }
}

/** What a ride's resistance is made of whatever the slope: a·v² of air, b·v and bearingsN of bearings, and the weight that slope and rolling act on. */
export function roadLoads(ride: Omit<Ride, 'speedMs' | 'airSpeedMs' | 'gradient'>) {
  return {
    a: 0.5 * ride.airDensity * (ride.cdaM2 + ride.spokeAreaM2),
    b: BEARING_NS_PER_M,
    bearingsN: BEARING_N,
    weightN: ride.massKg * (ride.gravity ?? STANDARD_GRAVITY),
  }
}

/** Resistance of a ride in still air as a polynomial of its speed: N = a·v² + b·v + c. */
export function resistance(ride: Omit<Ride, 'speedMs' | 'airSpeedMs'>) {
  const { a, b, bearingsN, weightN } = roadLoads(ride)
  return { a, b, c: weightN * pullPerKg(ride.gradient, ride.rollingCoefficient, 1) + bearingsN }
}

/**
 * Speed above 0 at which a·v³ + b·v² + c·v takes `watts`. Newton from a speed that takes more: the curve is convex there, so each step stays
 * above the answer and comes closer.
 * @param watts 0 or more; a > 0, b ≥ 0; where c < 0 (downhill) the answer is the larger one
 * @param startMs a guess; one that lies below costs a step more
 * @throws RangeError outside those ranges
 */
export function speedOfCubic(watts: number, a: number, b: number, c: number, startMs?: number): number {
  if (!(watts >= 0 && a > 0 && b >= 0 && Number.isFinite(c))) throw new RangeError('speedOfCubic: out of range')
  let v = startMs ?? speedAbove(watts, a, c)
  for (let step = 0; step < 100; step += 1) {
    const slope = (3 * a * v + 2 * b) * v + c
    const next = slope > 0 ? v - (((a * v + b) * v + c) * v - watts) / slope : 0
    if (!(next > 0)) {
      if (watts === 0 && c >= 0) return 0
      v = speedAbove(watts, a, c)
      continue
    }
    // What is left after a step is about its square: past 10⁻⁸ nothing that a number can hold.
    if (Math.abs(next - v) <= 1e-8 * v) return next
    v = next
  }
  return v
}

/** A speed that surely takes `watts` or more: W/c alone, or the cube root of W/a with what the slope gives. */
function speedAbove(watts: number, a: number, c: number): number {
  const above = Math.cbrt(watts / a) + Math.sqrt(Math.max(0, -c) / a)
  return c > 0 ? Math.min(above, watts / c) : above
}

/**
 * Speed at which the ride needs `watts` in still air.
 * @param watts 0 or more
 * @returns m/s, to within rounding of where bisection would end
 * @throws RangeError outside those ranges
 */
export function speedAtPower(watts: number, ride: Omit<Ride, 'speedMs' | 'airSpeedMs'>): number {
  const { a, b, c } = resistance(ride)
  return speedOfCubic(watts * ride.chainEfficiency, a, b, c)
}

/**
 * Rider's drag area on the hoods, m²: 0.32·(m/75)^0.594.
 * @throws RangeError unless the mass is positive
 * @source DERIVED from Heil 2002 (READ, abstract): area of rider and bike grows with m^0.594 (0.468 to 0.720)
 */
export function dragArea(bodyMassKg: number): number {
  if (!(bodyMassKg > 0)) throw new RangeError('dragArea: out of range')
  return 0.32 * (bodyMassKg / 75) ** 0.594
}

/** Frontal area times drag coefficient from height and mass. Bassett et al. 1999, MEMORY; coefficients READ via an open transcription. */
export const dragAreaFromHeight = (heightM: number, massKg: number, position: 'aero' | 'drops') =>
  position === 'aero'
    ? 0.7 * (0.0293 * heightM ** 0.725 * massKg ** 0.425 + 0.0604)
    : 0.88 * (0.0276 * heightM ** 0.725 * massKg ** 0.425 + 0.1647)
