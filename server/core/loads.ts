/** From what the rider and the bike weigh to the force on each wheel. In: kg, shares. Out: kg and N. */
import type { Rules } from './rules.ts'
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
 * Share of a point mass that the rear wheel carries. share = 1 − x / L; above 1 behind the rear axle, where it lifts the front.
 * @param aheadMm horizontal distance ahead of the rear axle, negative behind it
 * @param wheelbaseMm > 0
 * @throws RangeError for a wheelbase that is not positive
 * @source tyres reference 3.4, DERIVED (moments about the front contact); the table load-split holds what it gives for each place of bags
 * @example rearShareAt(900, 1000) // 0.1: a bag on the handlebar
 */
export function rearShareAt(aheadMm: number, wheelbaseMm: number): number {
  if (!(wheelbaseMm > 0)) throw new RangeError('rearShareAt: out of range')
  return 1 - aheadMm / wheelbaseMm
}

/**
 * The load the front pressure is set for: braking and descending load the front, so it never falls far behind the rear.
 * m* = min(max(m_f, least · m_r), most · m_f)
 * @param rearKg rear load without bags placed over it, ≥ 0
 * @param rule table front-design-load: 0.85 of the rear, 1.15 of its own
 * @returns kg
 * @throws RangeError for loads outside those ranges
 * @source tyres reference step 10; the 0.85 and the 1.15 are judgement (PRACTICE)
 * @example frontDesignLoad(40, 50, { leastOfRear: 0.85, mostOfOwn: 1.15 }) // 42.5
 */
export function frontDesignLoad(frontKg: number, rearKg: number, rule: Rules['front-design-load']): number {
  if (!(frontKg > 0 && rearKg >= 0)) throw new RangeError('frontDesignLoad: out of range')
  return Math.min(Math.max(frontKg, rule.leastOfRear * rearKg), rule.mostOfOwn * frontKg)
}
