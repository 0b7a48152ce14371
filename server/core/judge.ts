/** One wheelset before one rider: the first rule that removes it, or how it ranks. Every reason is a code; the words live with the pages. */
import type { Filled } from './answers.ts'
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import { checkLimit } from './limits.ts'
import type { Rules } from './rules.ts'
import { structuralLimitKg, type SpokeAdvice } from './spokes.ts'
import { tyreChecker, type NearestChange, type Removal, type TyreCheck } from './tyre-check.ts'

export interface Judgement {
  sku: string
  slug: string
  name: string
  rank: number | null
  verdict: 'fits' | 'no-margin' | 'over-limit' | 'mismatch' | 'pressure'
  limitKg: number
  marginKg: number
  codes: string[]
  nearestChange?: NearestChange
  /** Start values on this wheelset's own rims; null where no tyre is known or it is ruled out. */
  startBar: { front: number; rear: number } | null
  /** Names of the pairing rows that judged tyre and rim; null where another rule decided before or no tyre is known. */
  pairingRows: { front: string; rear: string } | null
}

/** Rules of the tyre come last: a wheelset that one of them removes takes the bike, the use and the total. */
const tyreRules = new Set([
  'tubular',
  'tyre-not-for-hookless',
  'tube-on-hookless',
  'tyre-too-narrow-for-rim',
  'tyre-too-wide-for-rim',
  'pressure-not-suitable',
])
export const onlyTyreAgainst = ({ rank, codes }: Pick<Judgement, 'rank' | 'codes'>) =>
  rank === null && codes.some((code) => tyreRules.has(code))

export interface Situation {
  filled: Filled
  totalKg: number
  loadsKg: { front: number; rear: number }
  depth: { front: { from: number; to: number }; rear: { from: number; to: number } }
  spokes: { front: SpokeAdvice; rear: SpokeAdvice }
  /** Carbon rim brakes are ruled out on this rider's descents. */
  noCarbonRimBrakes: boolean
  rules: Rules
}

const wheels = (set: WheelsetFacts): [WheelFacts, WheelFacts] => [set.front, set.rear]

/** What the bike itself rules out. Facts that nobody knows are not checked. */
function bikeMismatch(set: WheelsetFacts, { filled, rules }: Situation): Removal | null {
  const { bike, brakes, beadSeatMm, tyre } = filled
  const differs = (fact: string | null, offered: readonly string[], code: string, field: string): Removal | null =>
    fact !== null && !offered.includes(fact)
      ? { verdict: 'mismatch', code, change: { code: 'other-fact', field, to: offered } }
      : null
  if (set.brake !== brakes)
    return { verdict: 'mismatch', code: 'brake', change: { code: 'other-fact', field: 'brakes', to: set.brake } }
  if (set.beadSeatMm !== beadSeatMm)
    return {
      verdict: 'mismatch',
      code: 'wheel-size',
      change: { code: 'other-fact', field: 'beadSeatMm', to: set.beadSeatMm },
    }
  const axles =
    differs(bike.frontAxle, set.front.axles, 'front-axle', 'bike.frontAxle') ??
    differs(bike.rearAxle, set.rear.axles, 'rear-axle', 'bike.rearAxle')
  if (axles) return axles
  const freehub = differs(bike.freehub, set.rear.freehubs, 'freehub', 'bike.freehub')
  if (freehub) return freehub
  if (brakes === 'disc' && bike.rotorMount !== null) {
    // A six-bolt rotor goes onto a centre-lock hub by an adapter; the reverse does not.
    const wrong = wheels(set).find(
      ({ rotorMount }) => rotorMount !== null && rotorMount !== bike.rotorMount && rotorMount !== 'centre-lock',
    )
    if (wrong)
      return {
        verdict: 'mismatch',
        code: 'rotor-mount',
        change: { code: 'other-fact', field: 'bike.rotorMount', to: wrong.rotorMount },
      }
  }
  if (brakes === 'rim' && bike.caliperOpeningMm !== null) {
    const needed = Math.max(...wheels(set).map(({ outerWidthMm }) => outerWidthMm)) + rules.limits.caliperSlackMm
    if (bike.caliperOpeningMm < needed)
      return {
        verdict: 'mismatch',
        code: 'caliper',
        change: { code: 'other-fact', field: 'bike.caliperOpeningMm', to: needed },
      }
  }
  const { maxTyreMm } = bike
  if (maxTyreMm !== null && tyre) {
    const [front, rear] = [tyre.frontWidthMm > maxTyreMm, tyre.rearWidthMm > maxTyreMm]
    if (front || rear) {
      const field = front && rear ? 'tyre.widthMm' : front ? 'tyre.frontWidthMm' : 'tyre.rearWidthMm'
      return { verdict: 'mismatch', code: 'clearance', change: { code: 'other-tyre', field, to: maxTyreMm } }
    }
  }
  return null
}

function useMismatch(set: WheelsetFacts, { filled, noCarbonRimBrakes }: Situation): Removal | null {
  if (!set.rides.includes(filled.ride))
    return { verdict: 'mismatch', code: 'use', change: { code: 'other-fact', field: 'ride', to: set.rides } }
  if (filled.assist !== 'none' && !set.assistRated)
    return { verdict: 'mismatch', code: 'assist', change: { code: 'other-fact', field: 'assist', to: 'none' } }
  const seat = filled.seat === 'any' ? undefined : wheels(set).find((wheel) => wheel.seat !== filled.seat)
  if (seat)
    return { verdict: 'mismatch', code: 'rim-seat', change: { code: 'other-fact', field: 'rim.seat', to: seat.seat } }
  if (noCarbonRimBrakes && set.brake === 'rim' && wheels(set).some(({ material }) => material === 'carbon'))
    return { verdict: 'mismatch', code: 'brake-heat' }
  return null
}

/** Millimetres by which the pair lies outside the advised depths. */
const outsideDepth = (set: WheelsetFacts, { depth }: Situation) =>
  [
    Math.max(0, depth.front.from - set.front.depthMm),
    Math.max(0, set.front.depthMm - depth.front.to),
    Math.max(0, depth.rear.from - set.rear.depthMm),
    Math.max(0, set.rear.depthMm - depth.rear.to),
  ].reduce((sum, one) => sum + one, 0)

const rowsOf = (tyre: TyreCheck | null) =>
  tyre?.pairing ? { front: tyre.pairing.front.row, rear: tyre.pairing.rear.row } : null

/**
 * Judges and ranks a catalogue for one rider. First what the bike and the use rule out, then the limit, then tyre and pressure. What is left is
 * ranked by: spokes at or above the advice, margin left, depth inside the advised range (too deep in front counts double), made for this ride first,
 * then the lighter pair. Price and stock play no part.
 * @returns ranked ones first, then the ruled-out by name; stable for equal input
 */
export function judgeAll(sets: readonly WheelsetFacts[], situation: Situation): Judgement[] {
  const { totalKg, rules, filled, spokes, depth } = situation
  const tyreOf = tyreChecker(situation)
  const judged = sets.map((set) => {
    const { sku, slug, name, limitKg } = set
    const limit = checkLimit(totalKg, limitKg, rules.limits.noMarginFrom)
    const base = { sku, slug, name, limitKg, marginKg: limit.marginKg }
    const over: Removal | null =
      limit.verdict === 'over-limit'
        ? {
            verdict: 'over-limit',
            code: 'system-mass',
            change: { code: 'lower-total', field: 'systemMassKg', to: limitKg },
          }
        : null
    const early = bikeMismatch(set, situation) ?? useMismatch(set, situation) ?? over
    const tyre = early ? null : tyreOf(set)
    const removal = early ?? tyre?.removal ?? null
    if (removal) {
      const judgement: Judgement = {
        ...base,
        rank: null,
        verdict: removal.verdict,
        codes: [removal.code],
        startBar: null,
        pairingRows: rowsOf(tyre),
      }
      if (removal.change) judgement.nearestChange = removal.change
      return { judgement, key: null }
    }
    const outsideMm = outsideDepth(set, situation)
    const tooDeepInFront = Math.max(0, set.front.depthMm - depth.front.to)
    const fewSpokes = set.front.spokeCount < spokes.front.min || set.rear.spokeCount < spokes.rear.min
    const structural = [set.front, set.rear]
      .map((wheel) => structuralLimitKg(filled.ride, filled.brakes, wheel, rules))
      .filter((kg) => kg !== null)
    const codes = [
      outsideMm === 0 ? 'depth-in-range' : tooDeepInFront > 0 ? 'depth-too-deep' : 'depth-outside',
      fewSpokes ? 'spokes-below-advice' : 'spokes-met',
      ...(set.rides[0] === filled.ride ? ['made-for-this'] : []),
      ...(structural.some((kg) => totalKg > kg) ? ['structure-near'] : []),
      ...(tyre?.codes ?? []),
    ]
    const key = [
      Number(fewSpokes),
      Number(limit.verdict === 'no-margin'),
      outsideMm + tooDeepInFront,
      Number(set.rides[0] !== filled.ride),
      Number(codes.includes('wider-tyre')),
      set.massG,
    ]
    const judgement: Judgement = {
      ...base,
      rank: null,
      verdict: limit.verdict,
      codes,
      startBar: tyre?.startBar ?? null,
      pairingRows: rowsOf(tyre),
    }
    return { judgement, key }
  })
  const bySlug = (a: Judgement, b: Judgement) => (a.slug < b.slug ? -1 : a.slug > b.slug ? 1 : 0)
  const offered = judged
    .flatMap(({ judgement, key }) => (key ? [{ judgement, key }] : []))
    .sort(
      (a, b) =>
        a.key.reduce((found, value, index) => found || value - (b.key[index] ?? 0), 0) ||
        bySlug(a.judgement, b.judgement),
    )
    .map(({ judgement }, index) => ({ ...judgement, rank: index + 1 }))
  const removed = judged.flatMap(({ judgement, key }) => (key ? [] : [judgement])).sort(bySlug)
  return [...offered, ...removed]
}
