/** Power of riding on a road, after Martin et al. 1998. SI throughout: m, s, kg, W; gradient is rise over run. */
import { STANDARD_GRAVITY } from './units.ts'

export interface Ride {
  speedMs: number
  /** Speed through the air; equal to speedMs without wind. */
  airSpeedMs: number
  massKg: number
  cdaM2: number
  /** Extra drag area of rotating spokes, both wheels; 0 when cdaM2 already holds the wheels. */
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
 * @source Martin, Milliken, Cobb, McFadden, Coggan 1998, J. Appl. Biomech. 14(3): form READ via two open transcriptions
 */
export function ridingPower(
  ride: Ride,
  kinetic?: { fromMs: number; toMs: number; seconds: number; inertia: number; radiusM: number },
) {
  const {
    speedMs: v,
    airSpeedMs,
    massKg,
    cdaM2,
    spokeAreaM2,
    rollingCoefficient,
    gradient,
    airDensity,
    chainEfficiency,
  } = ride
  const weight = massKg * (ride.gravity ?? STANDARD_GRAVITY)
  const slope = Math.atan(gradient)
  const air = 0.5 * airDensity * (cdaM2 + spokeAreaM2) * airSpeedMs * Math.abs(airSpeedMs) * v
  const rolling = v * rollingCoefficient * weight * Math.cos(slope)
  const bearings = v * (91 + 8.7 * v) * 1e-3
  const climbing = v * weight * Math.sin(slope)
  const accelerating = kinetic
    ? (0.5 * (massKg + kinetic.inertia / kinetic.radiusM ** 2) * (kinetic.toMs ** 2 - kinetic.fromMs ** 2)) /
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

/** Wind from `fromDeg`, riding towards `headingDeg`. @returns air speed along the road and absolute yaw in degrees @source as above */
export function windOnRider(speedMs: number, windMs: number, fromDeg: number, headingDeg: number) {
  const angle = ((fromDeg - headingDeg) * Math.PI) / 180
  const airSpeedMs = speedMs + windMs * Math.cos(angle)
  return { airSpeedMs, yawDeg: Math.abs((Math.atan2(windMs * Math.sin(angle), airSpeedMs) * 180) / Math.PI) }
}

/** Speed at which the ride needs `watts`, without wind. Bisection between 0.5 and 30 m/s; power grows with speed for gradients ≥ 0. */
export function speedAtPower(watts: number, ride: Omit<Ride, 'speedMs' | 'airSpeedMs'>): number {
  let [low, high] = [0.5, 30]
  for (let step = 0; step < 60; step += 1) {
    const middle = (low + high) / 2
    if (ridingPower({ ...ride, speedMs: middle, airSpeedMs: middle }).total < watts) low = middle
    else high = middle
  }
  return (low + high) / 2
}

/** Rider's drag area on the hoods, m²: 0.32·(m/75)^0.594. DERIVED from Heil 2002 (READ, abstract): rider and bike area grow with m^0.594. */
export const dragArea = (bodyMassKg: number) => 0.32 * (bodyMassKg / 75) ** 0.594

/** Frontal area times drag coefficient from height and mass. Bassett et al. 1999, MEMORY; coefficients READ via an open transcription. */
export const dragAreaFromHeight = (heightM: number, massKg: number, position: 'aero' | 'drops') =>
  position === 'aero'
    ? 0.7 * (0.0293 * heightM ** 0.725 * massKg ** 0.425 + 0.0604)
    : 0.88 * (0.0276 * heightM ** 0.725 * massKg ** 0.425 + 0.1647)
