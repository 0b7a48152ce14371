/** The working behind spoke counts and limits, for the rider now and for support two years on. Words live with the pages. */
import type { Filled } from './answers.ts'
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import type { Judgement } from './judge.ts'
import type { Reason } from './reasons.ts'
import { riderLimit, useOf, type RiderLimit, type WheelStrength } from './rider-limits.ts'
import type { Rules } from './rules.ts'
import { extraKgOf, referenceLimits, type SpokeAdvice } from './spokes.ts'

const MODEL_SOURCE =
  'Finite-element model of rim and pre-tensioned spokes, checked against an independent program; dynamic factor: De Lorenzo & Hull 1999 (READ, abstract), side load of ISO 4210-7 (READ), elbow fatigue and side stiffness derived and tuned to common practice'

/** A wheel's own numbers, then its limit by each criterion as a rider's mass. */
const wheelInputs = (strength: WheelStrength, { byCriterion }: RiderLimit) => ({
  bottomShare: strength.share,
  firstSlackN: strength.firstSlackN,
  lateralNPerMm: strength.lateralNPerMm,
  rangeShare: strength.rangePerN,
  tensionReserveKg: byCriterion['tension-reserve'],
  sideStiffnessKg: byCriterion['side-stiffness'],
  fatigueKg: byCriterion.fatigue,
  torqueKg: byCriterion.torque,
  brokenShiftMm: strength.brokenShiftMm,
})

const thresholds = (use: ReturnType<typeof useOf>, position: 'front' | 'rear', rules: Rules) => {
  const table = rules['wheel-criteria']
  const row = table.byUse[use]
  return {
    tyreLoss: row?.tyreLoss ?? null,
    buildScatter: table.buildScatter,
    dynamicFactor: row?.dynamicFactor ?? null,
    loadShare: row?.loadShare[position] ?? null,
    sideShare: row?.sideShare ?? null,
    sideMm: row?.sideMm ?? null,
    realStiffness: table.realStiffness,
    elbowRangeN: table.elbowRangeN,
    fatigueFactor: row?.fatigueFactor ?? null,
    mostBrokenShiftMm: table.brokenShiftMm,
    inHandShare: table.inHandShare,
  }
}

export function spokeReason(
  f: Filled,
  totalKg: number,
  position: 'front' | 'rear',
  advice: SpokeAdvice,
  rules: Rules,
): Reason {
  const use = useOf(f.ride, f.brakes)
  const extraKg = extraKgOf(use, rules)
  const limit = referenceLimits(use, rules)[position].find(({ count }) => count === advice.min)
  const strength = rules['reference-wheels'].byUse[use]?.[position].find(({ count }) => count === advice.min)
  return {
    formula:
      'least n with limit(n) ≥ m − bike and kit of the table, limit(n) = min(η·P_slack/(k·s·g), 0.65·K_lat·δ/(c·g), N_elbow/(k_f·r·s·g), torque), then the trade floors; front ≥ rear − 4',
    inputs: {
      ride: f.ride,
      brakes: f.brakes,
      systemMassKg: totalKg,
      riderEquivalentKg: totalKg - extraKg,
      governedBy: advice.governedBy,
      luggageKg: f.luggageKg,
      assist: f.assist,
      floorCount: advice.floor,
      ...(limit && strength ? wheelInputs(strength, limit) : {}),
    },
    constants: {
      tableExtraKg: extraKg,
      frontMayBeFewerBy: rules['spoke-floors'].frontMayBeFewerBy,
      ...thresholds(use, position, rules),
    },
    source: `${MODEL_SOURCE}; trade floors are common practice`,
    label: 'derived',
    uncertainty: '±20–25 %',
    wouldChangeIf: ['bodyMassKg', 'luggageKg', 'ride', 'assist'],
  }
}

/** Every limit of the wheelset ranked first, and which of them is the lowest. */
export function limitReason(
  f: Filled,
  totalKg: number,
  restingKg: { front: number; rear: number },
  first: Judgement | undefined,
  set: WheelsetFacts | undefined,
  rules: Rules,
): Reason {
  const use = useOf(f.ride, f.brakes)
  const weaker: WheelFacts | undefined = first?.structure && set?.[first.structure.position]
  const limit = weaker?.strength ? riderLimit(weaker.strength, weaker.position, use, rules) : null
  return {
    formula:
      'margin = lowest limit − (rider + kit + bike + bags); lowest of: stated limit, structure of the weaker wheel, axle rating · m / load on it; from 95 % of it: no margin',
    inputs: {
      systemMassKg: totalKg,
      limitKg: first?.limitKg ?? null,
      limitFrom: first?.limitFrom ?? null,
      statedLimitKg: set?.limitKg ?? null,
      structuralLimitKg: limit?.systemKg ?? null,
      structuralLowKg: limit?.bandKg.low ?? null,
      structuralHighKg: limit?.bandKg.high ?? null,
      weakerWheel: weaker?.position ?? null,
      governedBy: limit?.governedBy ?? null,
      ...(weaker?.strength && limit ? wheelInputs(weaker.strength, limit) : {}),
      frontAxleLoadKg: restingKg.front,
      frontAxleLimitKg: set?.front.maxAxleLoadKg ?? null,
      rearAxleLoadKg: restingKg.rear,
      rearAxleLimitKg: set?.rear.maxAxleLoadKg ?? null,
    },
    constants: {
      noMarginFrom: rules.limits.noMarginFrom,
      tableExtraKg: extraKgOf(use, rules),
      ...(weaker ? thresholds(use, weaker.position, rules) : {}),
    },
    source: `The stated system limit of the wheelset in force today, with its proof; a limit counts everything on the bike (ISO 4210-2 clause 5 h, through TBIS 4210-3). Structure: ${MODEL_SOURCE}`,
    label: 'practice',
    uncertainty: 'exact',
    wouldChangeIf: ['bodyMassKg', 'bikeMassKg', 'luggageKg', 'luggagePlace', 'limit-change'],
  }
}
