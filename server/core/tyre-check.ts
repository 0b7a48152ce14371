/** The rider's tyre on one wheelset's own rims: approved range, pairing, pressure. What does not go together names the smallest change that would. */
import type { Filled } from './answers.ts'
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import type { Rules } from './rules.ts'
import type { DecidingRow } from './tyre-pressure.ts'
import { pairTyre } from './tyre-rim.ts'
import { pressureOn, wheelTyre, type WheelTyre } from './wheel-pressure.ts'

export interface NearestChange {
  code: string
  field: string
  to: unknown
}

export interface Removal {
  verdict: 'mismatch' | 'pressure' | 'over-limit'
  code: string
  change?: NearestChange
}

export interface TyreCheck {
  removal: Removal | null
  codes: string[]
  /** Start values on these rims; null without a tyre, outside the model and where it is ruled out. */
  startBar: { front: number; rear: number } | null
  /** The rows that judged the pair in front and behind; null without a tyre. */
  pairing: { front: DecidingRow; rear: DecidingRow } | null
}

type Tyre = NonNullable<Filled['tyre']>
type Position = 'front' | 'rear'
type RimOf = Pick<WheelFacts, 'seat' | 'innerWidthMm' | 'maxPressureBar' | 'tyreMinMm' | 'tyreMaxMm'>
interface Loaded {
  filled: Filled
  loadsKg: { front: number; rear: number }
  rules: Rules
}

interface OnRim {
  rim: RimOf
  /** Why this rim does not take the tyre. */
  no: { verdict: 'mismatch' | 'pressure'; code: string } | null
  codes: string[]
  startBar: number | null
  row: DecidingRow
}

const positions = ['front', 'rear'] as const

/**
 * One tyre on one rim. The wheel's own approved range comes before what the general rows would have checked; it never lifts a `no`.
 * @source tyres reference step 12
 */
function onRim(rim: RimOf, tyre: WheelTyre, rules: Rules): OnRim {
  const { seat, innerWidthMm, maxPressureBar, tyreMinMm, tyreMaxMm } = rim
  const { widthMm, setup, hooklessApproved } = tyre
  const table = rules['tyre-rim-pairing']
  const pairing = pairTyre({ seat, innerWidthMm, widthMm, setup, hooklessApproved }, table)
  const no = (code: string, row: DecidingRow, verdict: 'mismatch' | 'pressure' = 'mismatch'): OnRim => ({
    rim,
    no: { verdict, code },
    codes: [],
    startBar: null,
    row,
  })
  if (pairing.verdict === 'no') return no(pairing.code, pairing.row)
  if (widthMm < tyreMinMm) return no('tyre-too-narrow-for-rim', table.ownRange)
  if (widthMm > tyreMaxMm) return no('tyre-too-wide-for-rim', table.ownRange)
  const result = pressureOn(tyre, { seat, innerWidthMm, maxBar: maxPressureBar }, rules)
  if (result.verdict === 'not-suitable')
    return no('pressure-not-suitable', result.ceilingRow ?? pairing.row, 'pressure')
  const codes: string[] = []
  if (seat === 'hookless' && hooklessApproved === null) codes.push('confirm-hookless-tyre')
  if (result.verdict !== 'ok') codes.push(result.verdict)
  const answered = pairing.code === 'narrow-pairing' || pairing.code === 'wide-pairing'
  const row = answered ? table.ownRange : pairing.row
  return { rim, no: null, codes, startBar: result.pressure?.startBar ?? null, row }
}

const alike = (a: RimOf, b: RimOf) =>
  a === b ||
  (a.innerWidthMm === b.innerWidthMm &&
    a.seat === b.seat &&
    a.maxPressureBar === b.maxPressureBar &&
    a.tyreMinMm === b.tyreMinMm &&
    a.tyreMaxMm === b.tyreMaxMm)

/** The tyre that another width would be: its own maximum, minimum and measure are not known. */
const otherTyre = (tyre: Tyre, widths: Partial<Pick<Tyre, 'frontWidthMm' | 'rearWidthMm'>>): Tyre => ({
  ...tyre,
  ...widths,
  minBar: null,
  maxBar: null,
  measured: false,
})

/**
 * The smallest change of the tyre that lets this wheelset take it: the nearest whole width, else another set-up, else an approved tyre.
 * @param wrong wheels that do not take the tyre as it is, at least one
 * @returns undefined where none of them does
 */
function wayBack(
  rims: Record<Position, RimOf>,
  tyre: Tyre,
  wrong: readonly Position[],
  { filled, loadsKg, rules }: Loaded,
): NearestChange | undefined {
  const takes = (changed: Tyre, asked: readonly Position[]) =>
    asked.every((position) => {
      const given = { ...filled, tyre: changed }
      return onRim(rims[position], wheelTyre(given, position, loadsKg[position], rules), rules).no === null
    })
  const widthOf = (position: Position) => (position === 'front' ? tyre.frontWidthMm : tyre.rearWidthMm)
  const widths = wrong.map(widthOf)
  const least = Math.ceil(Math.max(...wrong.map((position) => rims[position].tyreMinMm)))
  const most = Math.floor(
    Math.min(filled.bike.maxTyreMm ?? Infinity, ...wrong.map((position) => rims[position].tyreMaxMm)),
  )
  // The nearest to the present widths are the nearest to their middle; of two equally near the narrower comes first. The other wheel keeps its
  // width, but its printed maximum goes with the old pair.
  const middle = (Math.min(...widths) + Math.max(...widths)) / 2
  let down = Math.min(most, Math.floor(middle))
  let up = Math.max(least, Math.floor(middle) + 1)
  while (down >= least || up <= most) {
    const widthMm = down >= least && (up > most || middle - down <= up - middle) ? down-- : up++
    const changed = otherTyre(tyre, Object.fromEntries(wrong.map((position) => [`${position}WidthMm`, widthMm])))
    if (!takes(changed, positions)) continue
    const change = { code: 'other-tyre', field: 'tyre.widthMm', to: widthMm }
    return wrong.length === 2 ? change : { ...change, field: `tyre.${wrong[0] ?? 'rear'}WidthMm` }
  }
  if (tyre.setup !== 'tubeless' && takes({ ...tyre, setup: 'tubeless' }, positions))
    return { code: 'other-fact', field: 'tyre.setup', to: 'tubeless' }
  if (tyre.hooklessApproved === false && takes({ ...tyre, hooklessApproved: true }, positions))
    return { code: 'other-fact', field: 'tyre.hooklessApproved', to: true }
  return undefined
}

/**
 * Judges wheelsets for one rider's tyre. Rims that are alike in what counts are worked out once, as a range shares few of them.
 * @returns for each wheelset the first rule by which its rims do not take the tyre, or the pressures to start from on them; answers are shared
 *   between wheelsets and must not be changed
 */
export function tyreChecker(loaded: Loaded): (set: Pick<WheelsetFacts, Position>) => TyreCheck {
  const { filled, loadsKg, rules } = loaded
  const { tyre } = filled
  if (!tyre) {
    const unknown: TyreCheck = { removal: null, codes: ['tyre-unknown'], startBar: null, pairing: null }
    return () => unknown
  }
  const given = { ...filled, tyre }
  const tyres = {
    front: wheelTyre(given, 'front', loadsKg.front, rules),
    rear: wheelTyre(given, 'rear', loadsKg.rear, rules),
  }
  const known: Record<Position, OnRim[]> = { front: [], rear: [] }
  const of = (position: Position, rim: RimOf): OnRim => {
    for (const one of known[position]) if (alike(one.rim, rim)) return one
    const found = onRim(rim, tyres[position], rules)
    known[position].push(found)
    return found
  }
  const pairs: { front: OnRim; rear: OnRim; check: TyreCheck }[] = []
  return (set) => {
    const front = of('front', set.front)
    const rear = of('rear', set.rear)
    for (const pair of pairs) if (pair.front === front && pair.rear === rear) return pair.check
    const check = checkOf(front, rear, tyre, loaded)
    pairs.push({ front, rear, check })
    return check
  }
}

function checkOf(front: OnRim, rear: OnRim, tyre: Tyre, loaded: Loaded): TyreCheck {
  const pairing = { front: front.row, rear: rear.row }
  const no = front.no ?? rear.no
  if (no) {
    const wrong = positions.filter((position) => (position === 'front' ? front : rear).no)
    const change = wayBack({ front: front.rim, rear: rear.rim }, tyre, wrong, loaded)
    return { removal: change ? { ...no, change } : no, codes: [], startBar: null, pairing }
  }
  return {
    removal: null,
    codes: [...new Set([...front.codes, ...rear.codes])],
    startBar: front.startBar === null || rear.startBar === null ? null : { front: front.startBar, rear: rear.startBar },
    pairing,
  }
}
