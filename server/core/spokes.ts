/** How many spokes a wheel needs for a rider: advice on durability, ±20-25 %, never a guarantee. Masses in kg. */
import type { WheelFacts } from './catalogue.ts'
import { lookUp, type Rules } from './rules.ts'

export type Design = 'road-rim' | 'road-disc' | 'gravel' | 'mountain'

export function designOf(ride: string, brakes: 'rim' | 'disc'): Design {
  if (ride === 'cross-country' || ride === 'trail') return 'mountain'
  if (ride === 'gravel' || ride === 'cyclocross' || ride === 'bikepacking') return 'gravel'
  return brakes === 'rim' ? 'road-rim' : 'road-disc'
}

const criteria = { A: 'tension-reserve', B: 'side-stiffness', C: 'fatigue', E: 'torque' } as const
export type Criterion = (typeof criteria)[keyof typeof criteria]

interface Cell {
  count: number
  riderKg: number
  criterion: Criterion
  usable: boolean
}

function cells(
  row: Rules['spoke-limits']['rows'][number],
  position: 'front' | 'rear',
  counts: readonly number[],
): Cell[] {
  return row[position].map((text, index) => {
    const [, kg = '0', letter = 'A', mark = ''] = /^(\d+)([ABCE])([xf]?)$/.exec(text) ?? []
    return {
      count: counts[index] ?? 0,
      riderKg: Number(kg),
      criterion: criteria[letter as keyof typeof criteria],
      usable: mark === '',
    }
  })
}

/** The row of the next shallower rim of the same kind, so that the table is never read in the rider's favour. */
function rowFor(design: Design, material: 'alloy' | 'carbon', depthMm: number, rules: Rules) {
  return rules['spoke-limits'].rows
    .filter((row) => row.design === design && row.material === material && row.depthMm <= depthMm)
    .sort((a, b) => a.depthMm - b.depthMm)
    .at(-1)
}

export interface SpokeAdvice {
  min: number
  advised: number
  governedBy: Criterion | 'floor'
  /** No count up to 36 meets every criterion on the reference rim. */
  beyondTable: boolean
}

/**
 * Least and advised spoke count, front and rear, on the reference rim of the use (30 mm carbon; 25 mm in the mountains).
 * The rider counts as total − (bike and kit that the table adds), so bags count in full. Least: the first usable count whose limit is not below
 * that; then the floors; then the front no more than 4 below the rear. Advised: the same with 15 % in hand.
 * @param totalKg ready-to-ride total
 * @source wheel reference 2.10 and 4.12 (DERIVED), floors PRACTICE
 */
export function spokeAdvice(
  given: { ride: string; brakes: 'rim' | 'disc'; assist: string; totalKg: number; luggageKg: number },
  rules: Rules,
): { front: SpokeAdvice; rear: SpokeAdvice } {
  const design = designOf(given.ride, given.brakes)
  const { extraKg, referenceDepthMm, counts } = rules['spoke-limits']
  const riderKg = given.totalKg - lookUp(extraKg, design)
  const row = rowFor(design, 'carbon', lookUp(referenceDepthMm, design), rules)
  if (!row) throw new Error(`spoke table has no reference row for ${design}`)
  const floors = rules['spoke-floors']
  const rearFloor = Math.max(
    riderKg > 120 ? floors.rearAbove120Kg : riderKg > 100 ? floors.rearAbove100Kg : 0,
    given.ride === 'bikepacking' ? floors.bikepacking : 0,
    given.assist === '25' ? floors.assist : 0,
    given.luggageKg >= floors.loadedFromKg ? floors.loaded : 0,
  )
  const least = (position: 'front' | 'rear', neededKg: number, floor: number): SpokeAdvice => {
    const usable = cells(row, position, counts).filter((cell) => cell.usable)
    // Once a count is enough, every higher one has to be enough as well: the table dips at changes of lacing.
    const found = usable.findIndex((_, index) => usable.slice(index).every((cell) => cell.riderKg >= neededKg))
    const cell = usable[found] ?? usable.at(-1)
    const min = Math.max(cell?.count ?? 36, floor)
    return {
      min,
      advised: min,
      governedBy: cell && cell.count >= floor ? cell.criterion : 'floor',
      beyondTable: found === -1,
    }
  }
  const both = (neededKg: number) => {
    const rear = least('rear', neededKg, rearFloor)
    const front = least('front', neededKg, rear.min - floors.frontMayBeFewerBy)
    return { front, rear: rear.min >= front.min ? rear : { ...rear, min: front.min } }
  }
  const now = both(riderKg)
  const inHand = both(riderKg / 0.85)
  return {
    front: { ...now.front, advised: Math.max(now.front.min, inHand.front.min) },
    rear: { ...now.rear, advised: Math.max(now.rear.min, inHand.rear.min) },
  }
}

/**
 * Structural limit of one wheel as a system mass, from the stand-in table; null where the table has no usable row. Information beside the stated
 * system limit, which decides.
 */
export function structuralLimitKg(
  ride: string,
  brakes: 'rim' | 'disc',
  wheel: Pick<WheelFacts, 'position' | 'material' | 'depthMm' | 'spokeCount'>,
  rules: Rules,
): number | null {
  const design = designOf(ride, brakes)
  const row = rowFor(design, wheel.material, wheel.depthMm, rules)
  const cell =
    row &&
    cells(row, wheel.position, rules['spoke-limits'].counts).find(
      ({ count, usable }) => usable && count === wheel.spokeCount,
    )
  return cell ? cell.riderKg + lookUp(rules['spoke-limits'].extraKg, design) : null
}
