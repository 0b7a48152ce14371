/** The working behind each value: formula in symbols, the rider's inputs, the constants, the source with its label. The words live with the pages. */
import type { Filled } from './answers.ts'
import type { Loads } from './loads.ts'
import type { DepthInputs } from './rim-depth.ts'
import type { SpokeAdvice } from './spokes.ts'
import { DROP_CONSTANT, HOOKLESS_BAR, HOOKLESS_TENSION } from './tyre-pressure.ts'
import type { PressureResult } from './wheel-pressure.ts'

export interface Reason {
  formula: string
  inputs: Record<string, unknown>
  constants: Record<string, unknown>
  source: string
  label: 'read' | 'memory' | 'derived' | 'practice'
  /** `exact`, or the band in figures, such as `±12 %`. */
  uncertainty: string
  /** Paths of the answers and codes of the facts that would change the value. */
  wouldChangeIf: string[]
}

const percent = (share: number) => `±${Math.round(share * 100)} %`

export const massReason = (f: Filled, totalKg: number): Reason => ({
  formula: 'm = rider + kit + bike + bags',
  inputs: {
    bodyMassKg: f.limitBodyKg,
    kitMassKg: f.kitKg,
    bikeMassKg: f.limitBikeKg,
    luggageKg: f.luggageKg,
    systemMassKg: totalKg,
  },
  constants: {},
  source: 'ISO 4210-2 clause 5 h, through TBIS 4210-3: a permissible total weight counts the bicycle and its luggage',
  label: 'read',
  uncertainty: 'exact',
  wouldChangeIf: ['bodyMassKg', 'kitMassKg', 'bikeMassKg', 'luggageKg'],
})

export const loadReason = (f: Filled, loads: Loads, frontShare: number): Reason => ({
  formula: 'm_f = share · (rider + kit + bike) + bags in front; m_r = m − m_f; F = m · g',
  inputs: { position: f.position, frontShare, luggagePlace: f.luggagePlace, frontN: loads.frontN, rearN: loads.rearN },
  constants: { g: 9.80665 },
  source:
    f.frontLoadShare === null
      ? 'Static split by position: midpoints of reported scale and force-plate figures, with the dummy of TBIS 4210-3'
      : 'Measured on scales by the rider',
  label: f.frontLoadShare === null ? 'derived' : 'read',
  uncertainty: f.frontLoadShare === null ? '±3 points' : '±1 point',
  wouldChangeIf: ['position', 'luggagePlace', 'frontLoadShare'],
})

export const pressureReason = (
  f: Filled,
  position: 'front' | 'rear',
  result: PressureResult,
  seat: string,
): Reason => ({
  formula: 'p = 17.3 · m / w^1.5 · √((311 + w)/(BSD/2 + w)) · (0.15/s)^1.5, at most min(tyre, rim, hookless cap)',
  inputs: {
    loadKg: result.loadKg,
    nominalWidthMm: result.nominalMm,
    effectiveWidthMm: result.effectiveMm,
    beadSeatMm: f.beadSeatMm,
    targetDrop: result.targetDrop,
    p15Bar: result.p15Bar,
    casingTensionNPerMm: result.tensionNPerMm,
    seat,
    ...(position === 'front' ? { frontRule: 'm_f* = min(max(m_f, 0.85 · m_r), 1.15 · m_f)' } : {}),
  },
  constants: {
    dropConstant: DROP_CONSTANT,
    ceilingBar: result.ceilingBar,
    ceilingFrom: result.ceilingFrom,
    floorBar: result.floorBar,
    ...(seat === 'hookless' ? { hooklessBar: HOOKLESS_BAR, hooklessTensionNPerMm: HOOKLESS_TENSION } : {}),
  },
  source:
    'F. Berto, "All About Tire Inflation" (15 % drop), two later fits of his chart; exponent: Renart & Roura-Grabulosa 2019, Am. J. Phys. 87, 102',
  label: 'derived',
  uncertainty: result.bandHalf === null ? 'outside the model' : percent(result.bandHalf),
  wouldChangeIf: [
    'bodyMassKg',
    `tyre.${position}WidthMm`,
    'tyre.measured',
    'tyre.maxBar',
    'rim.seat',
    'rim.innerWidthMm',
    'luggageKg',
  ],
})

export const depthReason = (f: Filled, given: DepthInputs, capMm: number, position: 'front' | 'rear'): Reason => ({
  formula:
    'φ = a · ½ρ(v² + w²) · CsA(d) / (N_f · t) ≤ φ_max; from: least depth with 85 % of the gain; rear: front + 20 mm',
  inputs: {
    bodyMassKg: f.bodyKg,
    bikeMassKg: f.bikeKg,
    wind: f.wind,
    confidence: f.confidence,
    terrain: f.terrain,
    flatSpeedKmh: given.flatSpeedKmh,
    gustMs: given.gustMs,
    correctionDeg: given.correctionDeg,
    capMm: Number.isFinite(capMm) ? capMm : null,
    clampMm: given.clampMm,
  },
  constants: {
    leverM: 0.06,
    trailM: 0.0557,
    airDensity: 1.225,
    referenceSpeedMs: given.referenceSpeedMs,
    rimGramPerMm: 3.8,
  },
  source:
    'Gust model of our own; wheel drag after Greenwell et al. 1995 (from memory) and Crane & Morton 2018 (abstract); power after Martin et al. 1998',
  label: 'derived',
  uncertainty: '±15 mm',
  wouldChangeIf: [
    'wind',
    'confidence',
    'bodyMassKg',
    'terrain',
    'flatSpeedKmh',
    ...(position === 'front' ? ['position'] : []),
  ],
})

export const spokeReason = (f: Filled, totalKg: number, advice: SpokeAdvice, extraKg: number): Reason => ({
  formula: 'least n with limit(n) ≥ m − bike and kit of the table, then the trade floors; front ≥ rear − 4',
  inputs: {
    ride: f.ride,
    brakes: f.brakes,
    systemMassKg: totalKg,
    riderEquivalentKg: totalKg - extraKg,
    governedBy: advice.governedBy,
    luggageKg: f.luggageKg,
    assist: f.assist,
  },
  constants: { tableExtraKg: extraKg, frontMayBeFewerBy: 4 },
  source:
    'Rider limits of a finite-element model of rim and pre-tensioned spokes, by count; trade floors are common practice',
  label: 'derived',
  uncertainty: '±20–25 %',
  wouldChangeIf: ['bodyMassKg', 'luggageKg', 'ride', 'assist'],
})

export const limitReason = (totalKg: number, limitKg: number | null): Reason => ({
  formula: 'margin = stated limit − (rider + kit + bike + bags); from 95 % of the limit: no margin',
  inputs: { systemMassKg: totalKg, limitKg },
  constants: { noMarginFrom: 0.95 },
  source: 'The stated system limit of the wheelset in force today, with its proof',
  label: 'practice',
  uncertainty: 'exact',
  wouldChangeIf: ['bodyMassKg', 'bikeMassKg', 'luggageKg', 'limit-change'],
})

export const tradeOffReason = (given: DepthInputs): Reason => ({
  formula: 'P = Σ weight · ½ρ(0.9·ΔCdA(d_f, β) + 0.6·ΔCdA(d_r, β)) · V_rel² · v / E_c, against a 25 mm pair',
  inputs: { flatSpeedKmh: given.flatSpeedKmh, meanWindMs: given.meanWindMs, gradient: given.terrain.gradient },
  constants: {
    airDensity: 1.225,
    chainEfficiency: 0.977,
    rollingCoefficient: 0.004,
    frontFactor: 0.9,
    rearFactor: 0.6,
  },
  source:
    'Martin et al. 1998, J. Appl. Biomech. 14(3):276–291; wheel drag by depth and yaw: semi-empirical, of our own',
  label: 'derived',
  uncertainty: given.wideTyre ? '±60 %' : '±35 %',
  wouldChangeIf: ['flatSpeedKmh', 'wind', 'terrain'],
})

export const brakeHeatReason = (totalKg: number, gradient: number): Reason => ({
  formula: 'T = T_air + f·P_b/((21·√v + h_rad)·A), P_b = (m·g·sin θ − C_rr·m·g·cos θ − ½ρCdA·v²)·v, at v = v_free/√5',
  inputs: { systemMassKg: totalKg, gradient },
  constants: { airC: 20, frontShareCarbon: 0.7, frontShareAlloy: 0.6 },
  source: 'A lumped rim of our own, cooled like a flat plate; no measured road temperature was found in print',
  label: 'derived',
  uncertainty: '±30 %',
  wouldChangeIf: ['bodyMassKg', 'terrain', 'brakes', 'luggageKg'],
})
