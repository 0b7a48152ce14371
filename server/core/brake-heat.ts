/** Heat in a rim that is braked on. One lump per rim; bands of ±30 % on the rise above the air. SI, temperatures in °C. */
import { dragArea } from './power.ts'
import type { BrakeHeatPolicy } from './rules-aero.ts'
import { kmhToMs, STANDARD_GRAVITY } from './units.ts'

export interface RimHeat {
  /** Heat capacity, J/K. */
  capacity: number
  areaM2: number
  /** Radiation, W/m²K. */
  radiation: number
  /** Part of the braking power that goes into the rim. */
  share: number
}

/**
 * Alloy: the whole rim of 0.48 kg warms and cools. Carbon: only the heated zone, as laminate conducts poorly; so depth hardly helps.
 * @source aero reference 3.9, DERIVED; shares to the rim MEMORY
 */
export const rimHeat: Record<'alloy' | 'carbon', RimHeat> = {
  alloy: { capacity: 430, areaM2: 0.119, radiation: 3, share: 0.95 },
  carbon: { capacity: 300, areaM2: 0.06, radiation: 11, share: 0.9 },
}
/** Cooling by the wind of riding: h = 21·√v, W/m²K with v in m/s, ±30 %. @source aero reference 3.9: laminar plate and a flow record, DERIVED */
export const COOLING = 21
/** Rolling and air on descents, as the reference's tables take them: good tarmac, air of 20 °C. @source aero reference 3.9 */
export const DESCENT_ROLLING = 0.005
export const DESCENT_AIR_DENSITY = 1.2

export interface Descent {
  massKg: number
  gradient: number
  cdaM2: number
  rollingCoefficient: number
  airDensity: number
}

/** Pull of the slope less rolling, N. */
const drive = ({ massKg, gradient, rollingCoefficient }: Descent) =>
  (massKg * STANDARD_GRAVITY * (gradient - rollingCoefficient)) / Math.sqrt(1 + gradient * gradient)

/**
 * Power that the brakes take at a steady speed, W, never below 0. P_b = [m·g·sin θ − C_rr·m·g·cos θ − ½ρCdA·v²]·v
 * @throws RangeError for a negative speed
 * @source aero reference 2.6, DERIVED
 */
export function brakingPower(descent: Descent, speedMs: number): number {
  if (!(speedMs >= 0)) throw new RangeError('brakingPower: out of range')
  return Math.max(0, (drive(descent) - 0.5 * descent.airDensity * descent.cdaM2 * speedMs ** 2) * speedMs)
}

/** Speed at which the bike runs free, m/s; 0 where it would not roll. v_T = √(drive / ½ρCdA) @source aero reference 2.6, DERIVED */
export const freeSpeed = (descent: Descent) =>
  Math.sqrt(Math.max(0, drive(descent)) / (0.5 * descent.airDensity * descent.cdaM2))

/** Speed of the most braking power (v_T/√3) and of the hottest steady rim (v_T/√5). @source aero reference 2.6, DERIVED */
export const worstPowerSpeed = (freeSpeedMs: number) => freeSpeedMs / Math.sqrt(3)
export const worstRimSpeed = (freeSpeedMs: number) => freeSpeedMs / Math.sqrt(5)

/** Heat that a rim gives off, W per K above the air: (h·c + h_rad)·A. */
const loss = (rim: RimHeat, speedMs: number, coolingFactor = 1) =>
  (COOLING * Math.sqrt(speedMs) * coolingFactor + rim.radiation) * rim.areaM2

/** Time in which a rim comes within 37 % of its balance, s: τ = C/((h + h_rad)·A); 50 to 95 s. @source aero reference 3.9, DERIVED */
export const timeConstant = (rim: RimHeat, speedMs: number) => rim.capacity / loss(rim, speedMs)

/**
 * Temperature of one rim. Steady: T = T_a + f·P/((h + h_rad)·A), h = 21·√v; after a time: the rise times 1 − e^(−t/τ), τ = C/((h + h_rad)·A).
 * @param onThisRim part of the braking done on this rim, 0 to 1
 * @param seconds null for the steady state
 * @param coolingFactor 1 on the road; 0.5 on a rig without a wind of its own
 * @returns °C, mean of the heated rim; the track's surface runs hotter by about a fifth
 * @throws RangeError outside those ranges
 * @source aero reference 2.6, 3.9 and 5.5, DERIVED
 * @example rimTemperature(rimHeat.alloy, 500, 1, 30 / 3.6) // 83
 */
export function rimTemperature(
  rim: RimHeat,
  watts: number,
  onThisRim: number,
  speedMs: number,
  airC = 20,
  seconds: number | null = null,
  coolingFactor = 1,
): number {
  if (!(watts >= 0 && onThisRim >= 0 && onThisRim <= 1 && speedMs > 0 && coolingFactor > 0 && coolingFactor <= 1))
    throw new RangeError('rimTemperature: out of range')
  const cooling = loss(rim, speedMs, coolingFactor)
  const rise = (rim.share * onThisRim * watts) / cooling
  return airC + (seconds === null ? rise : rise * (1 - Math.exp((-seconds * cooling) / rim.capacity)))
}

/**
 * Rise of a rim in one stop, K, before it cools: f·½m·v²/C.
 * @throws RangeError outside 0 to 1 for the part, or a mass or speed below 0
 * @source aero reference 3.9, DERIVED
 */
export function stopRise(rim: RimHeat, massKg: number, fromMs: number, onThisRim: number): number {
  if (!(massKg >= 0 && fromMs >= 0 && onThisRim >= 0 && onThisRim <= 1)) throw new RangeError('stopRise: out of range')
  return (rim.share * onThisRim * 0.5 * massKg * fromMs ** 2) / rim.capacity
}

/** Speed at which a steadily braked rim is hottest, m/s: v_T/√5, but no faster than one brakes to. */
const dragSpeed = (descent: Descent, mostSpeedMs: number) => Math.min(worstRimSpeed(freeSpeed(descent)), mostSpeedMs)

/**
 * Hottest steady rim of a descent, °C: at v_T/√5, but no faster than 40 km/h.
 * @param onThisRim part of the braking on this rim, 0 to 1
 * @returns the air's temperature where the bike would not roll
 * @source aero reference 2.6 and 3.9, DERIVED, ±30 % of the rise
 */
export function worstRim(
  descent: Descent,
  material: 'alloy' | 'carbon',
  onThisRim: number,
  airC = 20,
  mostSpeedMs = 40 / 3.6,
): number {
  const speedMs = dragSpeed(descent, mostSpeedMs)
  if (speedMs <= 0) return airC
  return rimTemperature(rimHeat[material], brakingPower(descent, speedMs), onThisRim, speedMs, airC)
}

/**
 * Total mass at which the hottest steady rim of a descent just reaches a temperature, kg, by bisection between 1 and 1000.
 * @returns Infinity where 1000 kg would not reach it
 * @source the reverse of worstRim, DERIVED
 */
export function massAtRimC(
  descent: Omit<Descent, 'massKg'>,
  material: 'alloy' | 'carbon',
  onThisRim: number,
  celsius: number,
  airC = 20,
  mostSpeedMs = 40 / 3.6,
): number {
  const tried: Descent = {
    massKg: 1,
    gradient: descent.gradient,
    cdaM2: descent.cdaM2,
    rollingCoefficient: descent.rollingCoefficient,
    airDensity: descent.airDensity,
  }
  let [low, high] = [1, 1000]
  for (let step = 0; step <= 30; step += 1) {
    // The first try is the heaviest: where even that stays cooler, there is no such mass.
    tried.massKg = step === 0 ? high : (low + high) / 2
    const cooler = worstRim(tried, material, onThisRim, airC, mostSpeedMs) < celsius
    if (step === 0 && cooler) return Infinity
    if (step === 0) continue
    if (cooler) low = tried.massKg
    else high = tried.massKg
  }
  return (low + high) / 2
}

/**
 * Rise of a rotor, K, without losses: m·g·h or ½m·v² into its heat.
 * @param joulesPerKgK 460 to 500 for steel
 * @throws RangeError unless rotor and heat are positive
 * @source aero reference 5.5, PRACTICE, reproduced by formula
 */
export function rotorRise(joules: number, rotorKg: number, joulesPerKgK: number): number {
  if (!(rotorKg > 0 && joulesPerKgK > 0)) throw new RangeError('rotorRise: out of range')
  return joules / (rotorKg * joulesPerKgK)
}

/**
 * Heat that a rotor gives off, W per K: 1.6 for 160 mm, with the square of its diameter.
 * @source aero reference 5.5: bench and road work up to 400 W and 277 °C (Feier et al., READ), the 1.6 DERIVED and rough
 */
export const rotorLoss = (diameterMm: number) => 1.6 * (diameterMm / 160) ** 2

/**
 * Front rotor for a total: 160 mm above 85 kg or in the mountains, 180 mm above 120 kg.
 * @returns mm; null where nothing needs saying
 * @source aero reference 2.6, policy
 */
export function rotorHintMm(totalKg: number, mountain: boolean, policy: BrakeHeatPolicy): 160 | 180 | null {
  if (totalKg > policy.rotor180AboveKg) return 180
  return totalKg > policy.rotor160AboveKg || mountain ? 160 : null
}

/** What the advice says of rim brakes: hottest rim on the rider's worst descent, and what follows. */
export interface RimHeatAdvice {
  rimC: number
  limitC: number
  verdict: 'fine' | 'caution' | 'alloy-or-disc'
  carbonC: number
  alloyC: number
  gradient: number
  /** rimC with its band, ±30 % of the rise above the air. */
  lowC: number
  highC: number
}

/** The descent that the advice counts. Hands are at the brakes, so the drag is that of the hoods in every position. */
export const descentOf = (bodyMassKg: number, totalKg: number, gradient: number): Descent => ({
  massKg: totalKg,
  gradient,
  cdaM2: dragArea(bodyMassKg),
  rollingCoefficient: DESCENT_ROLLING,
  airDensity: DESCENT_AIR_DENSITY,
})

/**
 * Hottest rim on the rider's steepest long descent, and what to make of it: alloy or disc above 105 kg in the mountains (above 90 kg for a
 * nervous rider), a caution above 90 kg there, and a caution wherever the model passes the limit for carbon.
 * Policy and model disagree on purpose: carbon is allowed up to 90 kg, yet on 12 % the model passes 120 °C from about 83 kg on.
 * @source aero reference 2.6, DERIVED; the masses are policy
 */
export function brakeHeatAdvice(
  rider: { bodyMassKg: number; totalKg: number; gradient: number; mountain: boolean; nervous: boolean },
  policy: BrakeHeatPolicy,
): RimHeatAdvice {
  const { totalKg, gradient, mountain } = rider
  const { warnAboveKg, steerAboveKg, nervousSteerAboveKg, limitC, airC, bandShare } = policy
  const descent = descentOf(rider.bodyMassKg, totalKg, gradient)
  const speedMs = dragSpeed(descent, kmhToMs(policy.mostSpeedKmh))
  const watts = brakingPower(descent, speedMs)
  const at = (material: 'alloy' | 'carbon', onThisRim: number) =>
    speedMs <= 0 ? airC : rimTemperature(rimHeat[material], watts, onThisRim, speedMs, airC)
  const carbonC = at('carbon', policy.frontShareCarbon)
  const alloyC = at('alloy', policy.frontShareAlloy)
  const steer = mountain && (totalKg > steerAboveKg || (rider.nervous && totalKg > nervousSteerAboveKg))
  const warn = (mountain && totalKg > warnAboveKg) || carbonC > limitC
  const rimC = steer ? alloyC : carbonC
  const rise = (rimC - airC) * bandShare
  return {
    rimC,
    limitC,
    verdict: steer ? 'alloy-or-disc' : warn ? 'caution' : 'fine',
    carbonC,
    alloyC,
    gradient,
    lowC: rimC - rise,
    highC: rimC + rise,
  }
}
