/** How many spokes a wheel needs for a rider: advice on durability, ±20–25 %, never a guarantee. Masses in kg. */
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import { riderLimit, useOf, type Criterion, type RiderLimit, type WheelUse } from './rider-limits.ts'
import type { Rules } from './rules.ts'

export interface SpokeAdvice {
  min: number
  advised: number
  governedBy: Criterion | 'floor'
  /** No count up to 36 meets every criterion on the reference rim. */
  beyondTable: boolean
  /** Least count of the trade for this rider, whatever the rim. */
  floor: number
  /** What the least count carries on the reference rim as a ready-to-ride total; the band is ±25 %. Null beyond the table. */
  limitKg: { low: number; estimate: number; high: number } | null
}

export interface CountLimit extends RiderLimit {
  count: number
}

type Both<T> = Record<'front' | 'rear', T>
const referenceByRules = new WeakMap<Rules, Map<WheelUse, Both<CountLimit[]>>>()

/** Limits of the reference wheels of a use by count; worked out once for each set of rules. */
export function referenceLimits(use: WheelUse, rules: Rules): Both<CountLimit[]> {
  let byUse = referenceByRules.get(rules)
  if (!byUse) referenceByRules.set(rules, (byUse = new Map<WheelUse, Both<CountLimit[]>>()))
  const known = byUse.get(use)
  if (known) return known
  const wheels = rules['reference-wheels'].byUse[use]
  if (!wheels) throw new Error(`reference wheels have no row ${use}`)
  const of = (position: 'front' | 'rear') =>
    wheels[position].map(({ count, ...strength }) => ({ count, ...riderLimit(strength, position, use, rules) }))
  const fresh = { front: of('front'), rear: of('rear') }
  byUse.set(use, fresh)
  return fresh
}

export interface CountFloors {
  front: number
  rear: number
  frontMayBeFewerBy: number
}

/**
 * Least count front and rear for a rider, by the limits of one kind of wheel.
 * The first count at or above the floor that is robust and whose limit is not below the rider. Then front ≥ rear − 4, then rear ≥ front. Where one wheel has no count the pairing is not applied to the other.
 * @param riderKg rider equivalent: total less the bike and kit of the table
 * @returns null for a wheel that no count up to 36 serves
 * @source wheel reference 2.10 steps 4 and 5; pairing is common practice
 */
export function leastCounts(
  limits: Both<readonly CountLimit[]>,
  riderKg: number,
  floors: CountFloors,
): Both<CountLimit | null> {
  const least = (position: 'front' | 'rear', floor: number) =>
    limits[position].find((row) => row.count >= floor && row.robust && row.riderKg >= riderKg) ?? null
  let front = least('front', floors.front)
  let rear = least('rear', floors.rear)
  if (front && rear) {
    const pairedFloor = rear.count - floors.frontMayBeFewerBy
    if (front.count < pairedFloor) front = least('front', pairedFloor)
    if (front && rear.count < front.count) rear = least('rear', front.count)
  }
  return { front, rear }
}

/** Trade floors for this rider on top of those of the use. @source table spoke-floors, PRACTICE */
function floorsFor(
  given: { ride: string; assist: string; luggageKg: number },
  use: WheelUse,
  riderKg: number,
  rules: Rules,
): CountFloors {
  const floors = rules['spoke-floors']
  const own = floors.byUse[use] ?? { front: 16, rear: 16 }
  const rear = Math.max(
    own.rear,
    riderKg > 120 ? floors.rearAbove120Kg : riderKg > 100 ? floors.rearAbove100Kg : 0,
    given.ride === 'bikepacking' ? floors.bikepacking : 0,
    given.assist === '25' ? floors.assist : 0,
    given.luggageKg >= floors.loadedFromKg ? floors.loaded : 0,
  )
  return {
    front: Math.max(own.front, rear - floors.frontMayBeFewerBy),
    rear,
    frontMayBeFewerBy: floors.frontMayBeFewerBy,
  }
}

/**
 * Least and advised spoke count, front and rear, on the reference wheels of the use.
 * The rider counts as total − (bike and kit that the table adds), so bags count in full. Advised: the same with 15 % in hand.
 * @param totalKg ready-to-ride total
 * @source wheel reference 2.10 (DERIVED), floors PRACTICE
 */
export function spokeAdvice(
  given: { ride: string; brakes: 'rim' | 'disc'; assist: string; totalKg: number; luggageKg: number },
  rules: Rules,
): Both<SpokeAdvice> {
  const use = useOf(given.ride, given.brakes)
  const riderKg = given.totalKg - extraKgOf(use, rules)
  const limits = referenceLimits(use, rules)
  const floors = floorsFor(given, use, riderKg, rules)
  const most = limits.rear.at(-1)?.count ?? 36
  // A rear wheel that nothing serves counts as the highest count for the pairing, so that a heavier rider is never told fewer in front.
  const counts = (kg: number) => {
    const found = leastCounts(limits, kg, floors)
    if (found.rear || !found.front) return found
    return leastCounts(limits, kg, { ...floors, front: Math.max(floors.front, most - floors.frontMayBeFewerBy) })
  }
  const now = counts(riderKg)
  const inHand = counts(riderKg / rules['wheel-criteria'].inHandShare)
  const advice = (position: 'front' | 'rear'): SpokeAdvice => {
    const cell = now[position]
    const min = cell?.count ?? most
    return {
      min,
      advised: Math.max(min, inHand[position]?.count ?? most),
      // At a floor the criterion did not decide: the next count down would have carried the rider as well.
      governedBy: cell
        ? atFloor(limits[position], cell, riderKg, floors, position, now)
          ? 'floor'
          : cell.governedBy
        : worst(limits[position]),
      beyondTable: cell === null,
      floor: floors[position],
      limitKg: cell ? { low: cell.bandKg.low, estimate: cell.systemKg, high: cell.bandKg.high } : null,
    }
  }
  return { front: advice('front'), rear: advice('rear') }
}

const worst = (rows: readonly CountLimit[]) => rows.at(-1)?.governedBy ?? 'tension-reserve'

function atFloor(
  rows: readonly CountLimit[],
  cell: CountLimit,
  riderKg: number,
  floors: CountFloors,
  position: 'front' | 'rear',
  found: Both<CountLimit | null>,
): boolean {
  const other = position === 'front' ? (found.rear?.count ?? 0) - floors.frontMayBeFewerBy : (found.front?.count ?? 0)
  if (cell.count !== Math.max(floors[position], other)) return false
  const below = rows[rows.indexOf(cell) - 1]
  return below === undefined || (below.robust && below.riderKg >= riderKg)
}

export const extraKgOf = (use: WheelUse, rules: Rules): number => {
  const row = rules['wheel-criteria'].byUse[use]
  if (!row) throw new Error(`wheel criteria have no row ${use}`)
  return row.extraKg
}

export interface StructuralLimit {
  position: 'front' | 'rear'
  limit: RiderLimit
}
/**
 * Structural limit of a wheelset as a ready-to-ride total: the wheel that gives first. Null while a wheel is not solved.
 */
export function structuralLimit(set: WheelsetFacts, use: WheelUse, rules: Rules): StructuralLimit | null {
  const of = (wheel: WheelFacts): StructuralLimit | null =>
    wheel.strength ? { position: wheel.position, limit: riderLimit(wheel.strength, wheel.position, use, rules) } : null
  const [front, rear] = [of(set.front), of(set.rear)]
  return !front || !rear ? null : weaker(front, rear)
}

/** A wheel that is not robust gives before any that is. */
const weaker = (front: StructuralLimit, rear: StructuralLimit) => {
  const rank = ({ limit }: StructuralLimit) => (limit.robust ? limit.systemKg : limit.systemKg - 1e6)
  return rank(front) < rank(rear) ? front : rear
}
