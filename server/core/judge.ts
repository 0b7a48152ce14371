/** One wheelset before one rider: the first rule that removes it, or how it ranks. Every reason is a code; the words live with the pages. */
import type { Filled } from './answers.ts'
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import { checkLimit, lowestLimit, type LimitSource } from './limits.ts'
import { useOf, type Criterion, type WheelUse } from './rider-limits.ts'
import { lookUp, type Rules } from './rules.ts'
import { structuralLimit, type SpokeAdvice, type StructuralLimit } from './spokes.ts'
import { tyreChecker, type NearestChange, type Removal, type TyreCheck } from './tyre-check.ts'

interface Structure {
  position: 'front' | 'rear'
  limitKg: number
  governedBy: Criterion
}

/** What a wheelset has nothing to say of is left out, so that the reply stays short: undefined here, absent on the wire. */
export interface Judgement {
  sku: string
  slug: string
  name: string
  rank: number | null
  verdict: 'fits' | 'no-margin' | 'over-limit' | 'mismatch' | 'pressure'
  /** The lowest of its limits for this rider, and which one that is. */
  limitKg: number
  limitFrom: LimitSource
  marginKg: number
  /** What its weaker wheel carries in this use by the structural model, ±25 %; absent while it is not solved, and for what something else rules out. */
  structure: Structure | undefined
  codes: string[]
  /** What puts it behind the one ranked before it; absent for the first and for what is ruled out. */
  behindBy: (typeof rankedBy)[number] | undefined
  nearestChange?: NearestChange
  /** Start values on this wheelset's own rims; null where no tyre is known or it is ruled out. */
  startBar: { front: number; rear: number } | null
  /** Names of the pairing rows that judged tyre and rim; null where another rule decided before or no tyre is known. */
  pairingRows: { front: string; rear: string } | undefined
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
  /** What rests on each wheel, without the design rule for the front. */
  restingKg: { front: number; rear: number }
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

function useMismatch(set: WheelsetFacts, { filled, noCarbonRimBrakes, rules }: Situation): Removal | null {
  if (!set.rides.includes(filled.ride))
    return { verdict: 'mismatch', code: 'use', change: { code: 'other-fact', field: 'ride', to: set.rides } }
  if (set.useCondition < lookUp(rules['use-conditions'].leastByRide, filled.ride))
    return { verdict: 'mismatch', code: 'use-condition' }
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
function outsideDepth({ front, rear }: WheelsetFacts, { depth }: Situation): number {
  return (
    Math.max(0, depth.front.from - front.depthMm, front.depthMm - depth.front.to) +
    Math.max(0, depth.rear.from - rear.depthMm, rear.depthMm - depth.rear.to)
  )
}

/** How the spokes stand: met, fewer than usual but carried by this rim with 15 % in hand, or below the advice. */
function spokeVerdict(set: WheelsetFacts, situation: Situation, structural: StructuralLimit | null) {
  const { front, rear } = situation.spokes
  const [frontCount, rearCount] = [set.front.spokeCount, set.rear.spokeCount]
  if (frontCount >= front.min && rearCount >= rear.min) return 'spokes-met'
  const floorsMet = frontCount >= front.floor && rearCount >= rear.floor
  const share = situation.rules['wheel-criteria'].inHandShare
  return floorsMet && structural && situation.totalKg <= share * structural.limit.systemKg
    ? 'structure-carries'
    : 'spokes-below-advice'
}

const rowsOf = (tyre: TyreCheck) =>
  tyre.pairing ? { front: tyre.pairing.front.row, rear: tyre.pairing.rear.row } : undefined

/** What ranks the offered ones, in this order; the names are the ones that a judgement gives for standing behind the one before it. */
export const rankedBy = ['spokes', 'margin', 'depth', 'made-for', 'tyre', 'mass', 'name'] as const
interface Offered {
  judgement: Judgement
  key: readonly number[]
}
const bySlug = (a: { slug: string }, b: { slug: string }) => (a.slug < b.slug ? -1 : a.slug > b.slug ? 1 : 0)

function firstDifference(a: Offered, b: Offered): number {
  for (let i = 0; i < a.key.length; i += 1) if (a.key[i] !== b.key[i]) return i
  return a.key.length
}
const byKey = (a: Offered, b: Offered) => {
  const i = firstDifference(a, b)
  return i < a.key.length ? (a.key[i] ?? 0) - (b.key[i] ?? 0) : bySlug(a.judgement, b.judgement)
}

/**
 * Judges and ranks a catalogue for one rider. First what the bike and the use rule out, then the lowest limit, then tyre and pressure. What is
 * left is ranked by: spokes at or above the advice, margin left, depth inside the advised range (too deep in front counts double), made for this
 * ride first, tyre wide enough, then the lighter pair. Price and stock play no part.
 * @returns ranked ones first, each naming what puts it behind the one before it, then the ruled-out by name; stable for equal input
 */
export function judgeAll(sets: readonly WheelsetFacts[], situation: Situation): Judgement[] {
  const { totalKg, rules, filled, depth } = situation
  const use = useOf(filled.ride, filled.brakes)
  const tyreOf = tyreChecker(situation)
  const offered: Offered[] = []
  const removed: Judgement[] = []
  for (const { set, structural, structure } of candidates(sets, use, rules)) {
    const lowest = lowestLimit(set, totalKg, situation.restingKg, structural)
    const limit = checkLimit(totalKg, lowest.limitKg, rules.limits.noMarginFrom)
    const judgement: Judgement = {
      sku: set.sku,
      slug: set.slug,
      name: set.name,
      rank: null,
      verdict: limit.verdict,
      limitKg: lowest.limitKg,
      limitFrom: lowest.from,
      marginKg: limit.marginKg,
      structure: undefined,
      codes: [],
      behindBy: undefined,
      startBar: null,
      pairingRows: undefined,
    }
    const early =
      bikeMismatch(set, situation) ??
      useMismatch(set, situation) ??
      (structural && !structural.limit.robust ? notRobust : null) ??
      (limit.verdict === 'over-limit' ? overLimit(lowest) : null)
    const tyre = early ? null : tyreOf(set)
    if (tyre) judgement.pairingRows = rowsOf(tyre)
    const removal = early ?? tyre?.removal ?? null
    if (removal) {
      if (lowest.from === 'structure') judgement.structure = structure
      judgement.verdict = removal.verdict
      judgement.codes.push(removal.code)
      if (removal.change) judgement.nearestChange = removal.change
      removed.push(judgement)
      continue
    }
    const outsideMm = outsideDepth(set, situation)
    const tooDeepInFront = Math.max(0, set.front.depthMm - depth.front.to)
    const spokes = spokeVerdict(set, situation, structural)
    const madeForThis = set.rides[0] === filled.ride
    const { codes } = judgement
    codes.push(outsideMm === 0 ? 'depth-in-range' : tooDeepInFront > 0 ? 'depth-too-deep' : 'depth-outside', spokes)
    if (madeForThis) codes.push('made-for-this')
    if (structural && totalKg > rules['wheel-criteria'].inHandShare * structural.limit.systemKg)
      codes.push('structure-near')
    if (tyre) codes.push(...tyre.codes)
    judgement.startBar = tyre?.startBar ?? null
    judgement.structure = structure
    offered.push({
      judgement,
      key: [
        Number(spokes === 'spokes-below-advice'),
        Number(limit.verdict === 'no-margin'),
        outsideMm + tooDeepInFront,
        Number(!madeForThis),
        Number(codes.includes('wider-tyre')),
        set.massG,
      ],
    })
  }
  offered.sort(byKey)
  offered.forEach((one, index) => {
    one.judgement.rank = index + 1
    const before = offered[index - 1]
    if (before) one.judgement.behindBy = rankedBy[firstDifference(before, one)] ?? 'name'
  })
  const ranked = offered.map(({ judgement }) => judgement)
  for (const judgement of removed) ranked.push(judgement)
  return ranked
}

interface Candidate {
  set: WheelsetFacts
  structural: StructuralLimit | null
  structure: Structure | undefined
}
const known = new WeakMap<readonly WheelsetFacts[], { rules: Rules; byUse: Map<WheelUse, readonly Candidate[]> }>()

/** What holds for every rider of a use: the range by name, each with its structural limit. Worked out once for a range and a set of rules. */
function candidates(sets: readonly WheelsetFacts[], use: WheelUse, rules: Rules): readonly Candidate[] {
  let kept = known.get(sets)
  if (kept?.rules !== rules) known.set(sets, (kept = { rules, byUse: new Map<WheelUse, readonly Candidate[]>() }))
  const found = kept.byUse.get(use)
  if (found) return found
  const fresh = sets
    .map((set): Candidate => {
      const structural = structuralLimit(set, use, rules)
      const structure = structural
        ? {
            position: structural.position,
            limitKg: structural.limit.systemKg,
            governedBy: structural.limit.governedBy,
          }
        : undefined
      return { set, structural, structure }
    })
    .sort((a, b) => bySlug(a.set, b.set))
  kept.byUse.set(use, fresh)
  return fresh
}

const notRobust: Removal = { verdict: 'mismatch', code: 'not-robust' }
const limitCodes = {
  system: 'system-mass',
  structure: 'structure',
  'axle-front': 'axle-load',
  'axle-rear': 'axle-load',
} as const satisfies Record<LimitSource, string>
const overLimit = ({ limitKg, from }: ReturnType<typeof lowestLimit>): Removal => ({
  verdict: 'over-limit',
  code: limitCodes[from],
  change: { code: 'lower-total', field: 'systemMassKg', to: limitKg },
})
