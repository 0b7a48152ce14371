/** Heat in a rim that is braked on. One lump per rim; bands of ±30 % on the rise above the air. SI, temperatures in °C. */
import { STANDARD_GRAVITY } from './units.ts'

export interface RimHeat {
  /** Heat capacity, J/K. */
  capacity: number
  areaM2: number
  /** Radiation, W/m²K. */
  radiation: number
  /** Part of the braking power that goes into the rim. */
  share: number
}

/** @source aero reference 3.9, DERIVED; shares to the rim MEMORY */
export const rimHeat: Record<'alloy' | 'carbon', RimHeat> = {
  alloy: { capacity: 430, areaM2: 0.119, radiation: 3, share: 0.95 },
  carbon: { capacity: 300, areaM2: 0.06, radiation: 11, share: 0.9 },
}

export interface Descent {
  massKg: number
  gradient: number
  cdaM2: number
  rollingCoefficient: number
  airDensity: number
}

const drive = ({ massKg, gradient, rollingCoefficient }: Descent) => {
  const slope = Math.atan(gradient)
  return massKg * STANDARD_GRAVITY * (Math.sin(slope) - rollingCoefficient * Math.cos(slope))
}

/** Power that the brakes take at a steady speed, W, never below 0. P_b = [m·g·sin θ − C_rr·m·g·cos θ − ½ρCdA·v²]·v @source aero reference 2.6 */
export const brakingPower = (descent: Descent, speedMs: number) =>
  Math.max(0, (drive(descent) - 0.5 * descent.airDensity * descent.cdaM2 * speedMs ** 2) * speedMs)

/** Speed at which the bike runs free, m/s; 0 where it would not roll. */
export const freeSpeed = (descent: Descent) =>
  Math.sqrt(Math.max(0, drive(descent)) / (0.5 * descent.airDensity * descent.cdaM2))

/** Speed of the most braking power (v_T/√3) and of the hottest steady rim (v_T/√5). @source aero reference 2.6, DERIVED */
export const worstPowerSpeed = (freeSpeedMs: number) => freeSpeedMs / Math.sqrt(3)
export const worstRimSpeed = (freeSpeedMs: number) => freeSpeedMs / Math.sqrt(5)

/**
 * Temperature of one rim. Steady: T = T_a + f·P/((h + h_rad)·A), h = 21·√v; after a time: the rise times 1 − e^(−t/τ), τ = C/((h + h_rad)·A).
 * @param onThisRim part of the braking done on this rim, 0 to 1
 * @param seconds null for the steady state
 * @returns °C, mean of the heated rim; the track's surface runs hotter by about a fifth
 * @source aero reference 2.6 and 3.9, DERIVED
 */
export function rimTemperature(
  rim: RimHeat,
  watts: number,
  onThisRim: number,
  speedMs: number,
  airC = 20,
  seconds: number | null = null,
): number {
  if (!(watts >= 0 && onThisRim >= 0 && onThisRim <= 1 && speedMs > 0))
    throw new RangeError('rimTemperature: out of range')
  const loss = (21 * Math.sqrt(speedMs) + rim.radiation) * rim.areaM2
  const rise = (rim.share * onThisRim * watts) / loss
  return airC + (seconds === null ? rise : rise * (1 - Math.exp((-seconds * loss) / rim.capacity)))
}

/** Hottest steady rim of a descent: at v_T/√5, but no faster than 40 km/h. */
export function worstRim(descent: Descent, material: 'alloy' | 'carbon', onThisRim: number, airC = 20): number {
  const speedMs = Math.min(worstRimSpeed(freeSpeed(descent)), 40 / 3.6)
  if (speedMs <= 0) return airC
  return rimTemperature(rimHeat[material], brakingPower(descent, speedMs), onThisRim, speedMs, airC)
}

/** Rise of a rotor, K, without losses: m·g·h or ½m·v² into its heat. @param joulesPerKgK 460 to 500 for steel */
export const rotorRise = (joules: number, rotorKg: number, joulesPerKgK: number) => joules / (rotorKg * joulesPerKgK)

/** What the advice says of rim brakes: hottest rim on the rider's worst descent, and what follows. */
export interface RimHeatAdvice {
  rimC: number
  limitC: number
  verdict: 'fine' | 'caution' | 'alloy-or-disc'
  carbonC: number
  alloyC: number
  gradient: number
}
