/** From what the rider and the bike weigh to the force on each wheel. In: kg, shares. Out: kg and N. */
import { STANDARD_GRAVITY } from './units.ts'

/**
 * Ready-to-ride total: everything a stated limit counts. m = rider + kit + bike + bags.
 * @returns kg, not rounded
 * @source tyres reference 3.2 and 5.7 (READ: ISO 4210-2 clause 5 h through TBIS 4210-3, "permissible total weight")
 */
export const systemMass = (bodyMassKg: number, kitMassKg: number, bikeMassKg: number, luggageKg: number) =>
  bodyMassKg + kitMassKg + bikeMassKg + luggageKg

export interface Loads {
  frontKg: number
  rearKg: number
  frontN: number
  rearN: number
  frontShare: number
}

/**
 * Standing load on each wheel. front = share · (rider + kit + bike) + luggage share · bags; a share measured on scales holds for everything.
 * @param unladenKg rider, kit and bike, > 0
 * @param frontShare part of it on the front wheel, 0 to 1
 * @param luggageFrontShare part of the bags on the front wheel, 0 to 1
 * @returns kg and N; the two wheels add up to the whole
 * @throws RangeError outside those ranges
 * @source tyres reference step 2 and 3.4, DERIVED (moments about the wheel contacts)
 * @example wheelLoads(90, 0.45, 0, 0.5) // 40.5 and 49.5 kg, 397.2 and 485.4 N
 */
export function wheelLoads(unladenKg: number, frontShare: number, luggageKg: number, luggageFrontShare: number): Loads {
  const share = (x: number) => x >= 0 && x <= 1
  if (!(unladenKg > 0 && luggageKg >= 0 && share(frontShare) && share(luggageFrontShare)))
    throw new RangeError('wheelLoads: out of range')
  const frontKg = unladenKg * frontShare + luggageKg * luggageFrontShare
  const totalKg = unladenKg + luggageKg
  const rearKg = totalKg - frontKg
  return {
    frontKg,
    rearKg,
    frontN: frontKg * STANDARD_GRAVITY,
    rearN: rearKg * STANDARD_GRAVITY,
    frontShare: frontKg / totalKg,
  }
}

/**
 * The load the front pressure is set for: braking and descending load the front, so it never falls far behind the rear.
 * m* = min(max(m_f, 0.85 · m_r), 1.15 · m_f)
 * @param rearKg rear load without bags placed over it
 * @source tyres reference step 10; the 0.85 and the 1.15 are judgement (PRACTICE)
 */
export const frontDesignLoad = (frontKg: number, rearKg: number, least = 0.85, most = 1.15) =>
  Math.min(Math.max(frontKg, least * rearKg), most * frontKg)
