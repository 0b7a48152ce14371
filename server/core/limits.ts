/**
 * Ready-to-ride total against every limit of a wheelset: the stated system limit, what the structure of its wheels carries, what its axles carry.
 * The lowest wins and is named. Over is an answer, not an error; nothing is rounded, so no rounding turns a refusal into a pass.
 */
import type { WheelsetFacts } from './catalogue.ts'
import type { StructuralLimit } from './spokes.ts'

export type LimitVerdict = 'fits' | 'no-margin' | 'over-limit'
export const limitSources = ['system', 'structure', 'axle-front', 'axle-rear'] as const
export type LimitSource = (typeof limitSources)[number]

/**
 * @param totalKg rider, kit, bike and bags; limitKg the stated system limit, > 0
 * @param noMarginFrom part of the limit from which there is no margin, 0.95
 * @returns marginKg negative when over
 * @throws RangeError when the limit is not positive
 * @source F02; a limit counts everything on the bike (PRACTICE), ISO 4210-2 clause 5 h READ via TBIS 4210-3
 */
export function checkLimit(
  totalKg: number,
  limitKg: number,
  noMarginFrom = 0.95,
): { verdict: LimitVerdict; marginKg: number } {
  if (!(limitKg > 0 && totalKg > 0)) throw new RangeError('checkLimit: out of range')
  const marginKg = limitKg - totalKg
  return { verdict: marginKg < 0 ? 'over-limit' : totalKg >= noMarginFrom * limitKg ? 'no-margin' : 'fits', marginKg }
}

/**
 * The lowest limit as a ready-to-ride total, and which one it is; among equals the stated one.
 * An axle's limit is turned into a total by the rider's own split: total · limit/load.
 * @param loadsKg what rests on each wheel with this total
 * @param structural null while the wheels are not solved: then only what is stated counts
 */
export function lowestLimit(
  set: Pick<WheelsetFacts, 'limitKg' | 'front' | 'rear'>,
  totalKg: number,
  loadsKg: { front: number; rear: number },
  structural: StructuralLimit | null,
): { limitKg: number; from: LimitSource } {
  let limitKg = set.limitKg
  let from: LimitSource = 'system'
  if (structural && structural.limit.systemKg < limitKg) {
    limitKg = structural.limit.systemKg
    from = 'structure'
  }
  const front = set.front.maxAxleLoadKg
  if (front !== null && front * totalKg < limitKg * loadsKg.front) {
    limitKg = (front * totalKg) / loadsKg.front
    from = 'axle-front'
  }
  const rear = set.rear.maxAxleLoadKg
  if (rear !== null && rear * totalKg < limitKg * loadsKg.rear) {
    limitKg = (rear * totalKg) / loadsKg.rear
    from = 'axle-rear'
  }
  return { limitKg, from }
}
