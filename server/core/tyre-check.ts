/** The rider's tyre on one wheelset's own rims: approved range, pairing, pressure. What does not go together names the smallest change that would. */
import type { Filled } from './answers.ts'
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import type { Rules } from './rules.ts'
import { byWidth, type DecidingRow } from './tyre-pressure.ts'
import { notOfWidth, pairTyre } from './tyre-rim.ts'
import { otherWidth, pressureOn, wheelTyre, type WheelTyre } from './wheel-pressure.ts'

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

const refused = (rim: RimOf, code: string, row: DecidingRow, verdict: 'mismatch' | 'pressure' = 'mismatch'): OnRim => ({
  rim,
  no: { verdict, code },
  codes: [],
  startBar: null,
  row,
})

/**
 * One tyre on one rim. The wheel's own approved range comes before what the general rows would have checked; it never lifts a `no`.
 * @source tyres reference step 12
 */
function onRim(rim: RimOf, tyre: WheelTyre, rules: Rules): OnRim {
  const { seat, innerWidthMm, maxPressureBar, tyreMinMm, tyreMaxMm } = rim
  const { widthMm, setup, hooklessApproved } = tyre
  const table = rules['tyre-rim-pairing']
  const pairing = pairTyre({ seat, innerWidthMm, widthMm, setup, hooklessApproved }, table)
  if (pairing.verdict === 'no') return refused(rim, pairing.code, pairing.row)
  if (widthMm < tyreMinMm) return refused(rim, 'tyre-too-narrow-for-rim', table.ownRange)
  if (widthMm > tyreMaxMm) return refused(rim, 'tyre-too-wide-for-rim', table.ownRange)
  const result = pressureOn(tyre, { seat, innerWidthMm, maxBar: maxPressureBar }, rules)
  if (result.verdict === 'not-suitable')
    return refused(rim, 'pressure-not-suitable', result.ceilingRow ?? pairing.row, 'pressure')
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

type Tyres = Record<Position, WheelTyre>
type Rims = Record<Position, RimOf>

/** One rider's tyre, worked out once, and what stays the same from rim to rim. */
interface Asked {
  filled: Filled
  rules: Rules
  tyres: Tyres
  /** The same widths set up without tubes; worked out when a rim first asks for it. */
  tubeless: Tyres | null
}

const bothTake = (rims: Rims, tyres: Tyres, rules: Rules) =>
  !onRim(rims.front, tyres.front, rules).no && !onRim(rims.rear, tyres.rear, rules).no

/** Another set-up may ask for another drop; the widths stay as they are measured and marked. */
function withoutTubes({ filled, tyres, rules }: Asked): Tyres | null {
  const { tyre, ride, beadSeatMm, innerWidthMm } = filled
  if (!tyre) return null
  const given = { ride, beadSeatMm, innerWidthMm, tyre: { ...tyre, setup: 'tubeless' as const } }
  return {
    front: wheelTyre(given, 'front', tyres.front.loadKg, rules),
    rear: wheelTyre(given, 'rear', tyres.rear.loadKg, rules),
  }
}

/**
 * The smallest change of the tyre that lets this wheelset take it: the nearest whole width, else another set-up, else an approved tyre.
 * @param wrong wheels that do not take the tyre as it is, at least one
 * @param byWidth the refusals have to do with the width, so that another one may lift them
 * @returns undefined where none of them does
 */
function wayBack(rims: Rims, wrong: readonly Position[], byWidth: boolean, asked: Asked): NearestChange | undefined {
  const { tyres, rules, filled } = asked
  if (byWidth) {
    const widthMm = nearestWidth(rims, tyres, wrong, filled, rules)
    if (widthMm !== null) {
      // The same width would do with another tyre of it: what is printed on this one stands in the way.
      if (wrong.every((position) => tyres[position].widthMm === widthMm))
        return { code: 'other-fact', field: 'tyre.maxBar', to: usualMaximum(widthMm, rules) }
      const field = wrong.length === 2 ? 'tyre.widthMm' : `tyre.${wrong[0] ?? 'rear'}WidthMm`
      return { code: 'other-tyre', field, to: widthMm }
    }
  }
  if (tyres.front.setup !== 'tubeless') {
    asked.tubeless ??= withoutTubes(asked)
    if (asked.tubeless && bothTake(rims, asked.tubeless, rules))
      return { code: 'other-fact', field: 'tyre.setup', to: 'tubeless' }
  }
  if (tyres.front.hooklessApproved === false) {
    const approved = {
      front: { ...tyres.front, hooklessApproved: true },
      rear: { ...tyres.rear, hooklessApproved: true },
    }
    if (bothTake(rims, approved, rules)) return { code: 'other-fact', field: 'tyre.hooklessApproved', to: true }
  }
  return undefined
}

/** Nearest whole width that every wheel in question takes, the narrower of two equally near; the other wheel keeps its own. */
function nearestWidth(
  rims: Record<Position, RimOf>,
  tyres: Record<Position, WheelTyre>,
  wrong: readonly Position[],
  { ride, bike }: Filled,
  rules: Rules,
): number | null {
  let least = 0
  let most = bike.maxTyreMm ?? Infinity
  let narrowest = Infinity
  let widest = 0
  for (const position of wrong) {
    least = Math.max(least, rims[position].tyreMinMm)
    most = Math.min(most, rims[position].tyreMaxMm)
    narrowest = Math.min(narrowest, tyres[position].widthMm)
    widest = Math.max(widest, tyres[position].widthMm)
  }
  // The other wheel's width stays, but what is printed on the old tyre goes with it.
  for (const position of positions) {
    if (wrong.includes(position)) continue
    const kept = otherWidth(tyres[position], tyres[position].widthMm, ride, rules)
    if (onRim(rims[position], kept, rules).no) return null
  }
  least = Math.ceil(least)
  most = Math.floor(most)
  const middle = (narrowest + widest) / 2
  let down = Math.min(most, Math.floor(middle))
  let up = Math.max(least, Math.floor(middle) + 1)
  while (down >= least || up <= most) {
    const widthMm = down >= least && (up > most || middle - down <= up - middle) ? down-- : up++
    let taken = true
    for (const position of wrong)
      taken &&= onRim(rims[position], otherWidth(tyres[position], widthMm, ride, rules), rules).no === null
    if (taken) return widthMm
  }
  return null
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
  const { ride, beadSeatMm, innerWidthMm } = filled
  const given = { ride, beadSeatMm, innerWidthMm, tyre }
  const tyres = {
    front: wheelTyre(given, 'front', loadsKg.front, rules),
    rear: wheelTyre(given, 'rear', loadsKg.rear, rules),
  }
  const asked: Asked = { filled, rules, tyres, tubeless: null }
  const known: Record<Position, OnRim[]> = { front: [], rear: [] }
  const pairs: Pair[] = []
  return (set) => {
    const front = seenBefore(known.front, set.front, tyres.front, rules)
    const rear = seenBefore(known.rear, set.rear, tyres.rear, rules)
    for (const pair of pairs) if (pair.front === front && pair.rear === rear) return pair.check
    const check = checkOf(front, rear, asked)
    pairs.push({ front, rear, check })
    return check
  }
}

interface Pair {
  front: OnRim
  rear: OnRim
  check: TyreCheck
}

/** Highest pressure that tyres of this width usually carry. */
const usualMaximum = (widthMm: number, { 'assumed-tyre-maxima': usual }: Rules) =>
  byWidth(usual.rows, widthMm) ?? usual.beyondBar

/** A rim like one seen before is not worked out again. */
function seenBefore(known: OnRim[], rim: RimOf, tyre: WheelTyre, rules: Rules): OnRim {
  for (const one of known) if (alike(one.rim, rim)) return one
  const found = onRim(rim, tyre, rules)
  known.push(found)
  return found
}

function checkOf(front: OnRim, rear: OnRim, asked: Asked): TyreCheck {
  const pairing = { front: front.row, rear: rear.row }
  const no = front.no ?? rear.no
  if (no) {
    const wrong = positions.filter((position) => (position === 'front' ? front : rear).no)
    const byWidth = !(front.no && notOfWidth(front.no.code)) && !(rear.no && notOfWidth(rear.no.code))
    const change = wayBack({ front: front.rim, rear: rear.rim }, wrong, byWidth, asked)
    return { removal: change ? { ...no, change } : no, codes: [], startBar: null, pairing }
  }
  const codes = [...front.codes]
  for (const code of rear.codes) if (!codes.includes(code)) codes.push(code)
  return {
    removal: null,
    codes,
    startBar: front.startBar === null || rear.startBar === null ? null : { front: front.startBar, rear: rear.startBar },
    pairing,
  }
}
