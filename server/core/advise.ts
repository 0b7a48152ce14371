/**
 * The whole advice for one rider: scope, sums, verdicts, notes, working. Plain objects in, plain object out; the same input gives the same
 * object, key for key. Nothing here reads a clock, rounds for display or knows a language.
 */
import { fillAnswers, frontShareOf, offRoad, type Answers, type Filled } from './answers.ts'
import { worstRim } from './brake-heat.ts'
import type { WheelsetFacts } from './catalogue.ts'
import { judgeAll, type Judgement, type Situation } from './judge.ts'
import { frontDesignLoad, systemMass, wheelLoads } from './loads.ts'
import { dragArea } from './power.ts'
import {
  brakeHeatReason,
  depthReason,
  limitReason,
  loadReason,
  massReason,
  pressureReason,
  spokeReason,
  tradeOffReason,
  type Reason,
} from './reasons.ts'
import { depthRange, SHALLOWEST_MM, tradeOff, type DepthInputs } from './rim-depth.ts'
import { lookUp, type Rules } from './rules.ts'
import { designOf, spokeAdvice, type SpokeAdvice } from './spokes.ts'
import { isoMinimumBar } from './tyre-pressure.ts'
import { pairTyre } from './tyre-rim.ts'
import { wheelPressure, type PressureResult, type WheelPressure } from './wheel-pressure.ts'

export interface Note {
  code: string
  severity: 'info' | 'caution' | 'stop'
  data: Record<string, unknown>
}

export interface Advice {
  rulesVersion: string
  assumed: string[]
  outcome: 'recommend' | 'recommend-with-notes' | 'refuse' | 'out-of-scope'
  systemMassKg: number
  /** Parts of the total as the limits count them. */
  parts: { bodyMassKg: number; kitMassKg: number; bikeMassKg: number; luggageKg: number }
  loads: { frontN: number; rearN: number; frontShare: number } | null
  pressure: { front: WheelPressure; rear: WheelPressure } | null
  rimDepthMm: { front: { from: number; to: number }; rear: { from: number; to: number } } | null
  spokes: { front: SpokeAdvice; rear: SpokeAdvice } | null
  wheelsets: Judgement[]
  tradeOff: ReturnType<typeof tradeOff>
  brakeHeat: {
    rimC: number
    limitC: number
    verdict: 'fine' | 'caution' | 'alloy-or-disc'
    carbonC: number
    alloyC: number
    gradient: number
  } | null
  notes: Note[]
  reasons: Record<string, Reason>
}

const note = (code: string, severity: Note['severity'], data: Record<string, unknown> = {}): Note => ({
  code,
  severity,
  data,
})

/** Slowest and fastest speed on the flat that the depth method was worked for, km/h. */
const SPEEDS = [20, 50] as const

function outOfScope(filled: Filled): Note | null {
  if (filled.ridersOnBike > 1) return note('tandem', 'stop', { riders: filled.ridersOnBike })
  if (filled.assist === '45') return note('speed-assist', 'stop')
  if (![622, 584, 571, 559].includes(filled.beadSeatMm))
    return note('wheel-size', 'stop', { beadSeatMm: filled.beadSeatMm })
  return null
}

function depthInputs(filled: Filled, rules: Rules): DepthInputs {
  const { wind, terrain } = rules
  const aeroBars = filled.position === 'aero'
  return {
    bodyMassKg: filled.bodyKg,
    bikeMassKg: filled.bikeKg,
    flatSpeedKmh: Math.min(SPEEDS[1], Math.max(SPEEDS[0], filled.flatSpeedKmh)),
    aeroBars,
    meanWindMs: lookUp(wind.meanMs, filled.wind),
    gustMs: lookUp(wind.gustMs, filled.wind),
    correctionDeg: lookUp(wind.correctionDeg, filled.confidence) * (aeroBars ? wind.aeroBarsFactor : 1),
    referenceSpeedMs: filled.terrain === 'mountain' ? wind.mountainSpeedMs : wind.speedMs,
    clampMm: aeroBars
      ? Math.max(rules['depth-clamps'].aeroBarsMm, 0)
      : lookUp(rules['depth-clamps'].byRide, filled.ride),
    terrain: {
      flatShare: lookUp(terrain.flatShare, filled.terrain),
      climbShare: lookUp(terrain.climbShare, filled.terrain),
      gradient: lookUp(terrain.gradient, filled.terrain),
    },
    wideTyre: offRoad(filled.ride),
  }
}

/** Rim brakes only: hottest rim on the rider's steepest long descent, and what to make of it. */
function brakeHeatOf(filled: Filled, totalKg: number, rules: Rules): Advice['brakeHeat'] {
  if (filled.brakes !== 'rim') return null
  const { warnAboveKg, steerAboveKg, nervousSteerAboveKg, limitC } = rules['brake-heat']
  const gradient = lookUp(rules.terrain.descent, filled.terrain)
  const descent = {
    massKg: totalKg,
    gradient,
    cdaM2: dragArea(filled.bodyKg),
    rollingCoefficient: 0.005,
    airDensity: 1.2,
  }
  const carbonC = worstRim(descent, 'carbon', 0.7)
  const alloyC = worstRim(descent, 'alloy', 0.6)
  const long = filled.terrain === 'mountain'
  const steer = long && (totalKg > steerAboveKg || (filled.confidence === 'nervous' && totalKg > nervousSteerAboveKg))
  const verdict = steer ? 'alloy-or-disc' : long && totalKg > warnAboveKg ? 'caution' : 'fine'
  return { rimC: steer ? alloyC : carbonC, limitC, verdict, carbonC, alloyC, gradient }
}

/**
 * @param catalogue every wheelset on sale; rulesVersion names rules and catalogue together
 * @returns refusals and out-of-scope answers too: being over a limit is an answer
 * @throws RangeError for answers that the contract should have refused
 */
export function advise(
  answers: Answers,
  catalogue: readonly WheelsetFacts[],
  rules: Rules,
  rulesVersion: string,
): Advice {
  const filled = fillAnswers(answers, rules)
  const totalKg = systemMass(filled.limitBodyKg, filled.kitKg, filled.limitBikeKg, filled.luggageKg)
  const parts = {
    bodyMassKg: filled.limitBodyKg,
    kitMassKg: filled.kitKg,
    bikeMassKg: filled.limitBikeKg,
    luggageKg: filled.luggageKg,
  }
  const base = { rulesVersion, assumed: filled.assumed, systemMassKg: totalKg, parts }
  const scope = outOfScope(filled)
  if (scope) {
    const nothing = {
      loads: null,
      pressure: null,
      rimDepthMm: null,
      spokes: null,
      wheelsets: [],
      tradeOff: [],
      brakeHeat: null,
    }
    return {
      ...base,
      ...nothing,
      outcome: 'out-of-scope',
      notes: [scope, note('who-can-help', 'info', { for: scope.code })],
      reasons: { systemMassKg: massReason(filled, totalKg) },
    }
  }

  const share = filled.frontLoadShare ?? frontShareOf(filled, rules)
  const luggageShare = filled.frontLoadShare ?? lookUp(rules['load-split'].luggageFrontShare, filled.luggagePlace)
  const loads = wheelLoads(filled.bodyKg + filled.kitKg + filled.bikeKg, share, filled.luggageKg, luggageShare)
  const overRear = filled.luggagePlace === 'rear' ? filled.luggageKg * (1 - luggageShare) : 0
  const loadsKg = { front: frontDesignLoad(loads.frontKg, loads.rearKg - overRear), rear: loads.rearKg }

  const given = depthInputs(filled, rules)
  const depth = depthRange(given)
  const spokes = spokeAdvice(
    { ride: filled.ride, brakes: filled.brakes, assist: filled.assist, totalKg, luggageKg: filled.luggageKg },
    rules,
  )
  const brakeHeat = brakeHeatOf(filled, totalKg, rules)
  const situation: Situation = {
    filled,
    totalKg,
    loadsKg,
    depth,
    spokes,
    noCarbonRimBrakes: brakeHeat?.verdict === 'alloy-or-disc',
    rules,
  }
  const wheelsets = judgeAll(catalogue, situation)
  const seat = filled.seat === 'any' ? 'hooked' : filled.seat
  const results = pressures(filled, loadsKg, seat, rules)
  const refusals = [
    ...pairingRefusal(filled, seat, rules),
    ...pressureRefusal(results),
    ...catalogueRefusal(wheelsets, totalKg),
  ]
  const front = results?.front.pressure
  const rear = results?.rear.pressure
  const pressure =
    refusals.some(({ code }) => code !== 'over-every-limit' && code !== 'none-for-bike') || !front || !rear
      ? null
      : { front, rear }

  const first = wheelsets.find(({ rank }) => rank === 1)
  const notes = [
    ...refusals,
    ...pressureNotes(filled, results, pressure !== null),
    ...situationNotes(filled, given, depth.shallow, brakeHeat, spokes, totalKg, rules),
    ...(first?.verdict === 'no-margin'
      ? [note('no-margin', 'caution', { marginKg: first.marginKg, limitKg: first.limitKg })]
      : []),
    note('start-value', 'caution'),
    note('lower-maximum-wins', 'caution'),
    note('mechanic', 'info'),
    note('makers-and-rules', 'info'),
  ]
  // Standing cautions go with every answer; notes beyond them make it one "with notes".
  const standing = new Set([
    'start-value',
    'lower-maximum-wins',
    'mechanic',
    'makers-and-rules',
    'bike-unknown',
    'sharpen',
    'rotor-size',
    'race-65',
  ])
  const outcome =
    refusals.length > 0
      ? 'refuse'
      : notes.some(({ code }) => !standing.has(code))
        ? 'recommend-with-notes'
        : 'recommend'
  const depths = [
    ...new Set(
      catalogue.filter(({ brake }) => brake === filled.brakes).flatMap((set) => [set.front.depthMm, set.rear.depthMm]),
    ),
  ]
  const extraKg = lookUp(rules['spoke-limits'].extraKg, designOf(filled.ride, filled.brakes))
  const reasons: Record<string, Reason> = {
    systemMassKg: massReason(filled, totalKg),
    loads: loadReason(filled, loads, share),
    ...(results
      ? {
          'pressure.front': pressureReason(filled, 'front', results.front, seat),
          'pressure.rear': pressureReason(filled, 'rear', results.rear, seat),
        }
      : {}),
    'rimDepthMm.front': depthReason(filled, given, depth.capMm, 'front'),
    'rimDepthMm.rear': depthReason(filled, given, depth.capMm, 'rear'),
    'spokes.front': spokeReason(filled, totalKg, spokes.front, extraKg),
    'spokes.rear': spokeReason(filled, totalKg, spokes.rear, extraKg),
    limit: limitReason(totalKg, first?.limitKg ?? null),
    tradeOff: tradeOffReason(given),
    ...(brakeHeat ? { brakeHeat: brakeHeatReason(totalKg, brakeHeat.gradient) } : {}),
  }
  return {
    ...base,
    outcome,
    loads: { frontN: loads.frontN, rearN: loads.rearN, frontShare: loads.frontShare },
    pressure,
    rimDepthMm: { front: depth.front, rear: depth.rear },
    spokes,
    wheelsets,
    tradeOff: tradeOff(
      given,
      depths.filter((mm) => mm >= SHALLOWEST_MM).sort((a, b) => a - b),
    ),
    brakeHeat,
    notes,
    reasons,
  }
}

function pressures(
  filled: Filled,
  loadsKg: { front: number; rear: number },
  seat: 'hooked' | 'hookless',
  rules: Rules,
) {
  const { tyre } = filled
  if (!tyre) return null
  const rim = { seat, innerWidthMm: filled.innerWidthMm, maxBar: filled.rimMaxBar }
  const of = (position: 'front' | 'rear') => wheelPressure({ ...filled, tyre }, position, loadsKg[position], rim, rules)
  return { front: of('front'), rear: of('rear') }
}

/** The rider's own rim, where one is named: a pair that does not go together is refused, whoever the rider is. */
function pairingRefusal(
  { tyre, innerWidthMm, seat: named }: Filled,
  seat: 'hooked' | 'hookless',
  rules: Rules,
): Note[] {
  if (!tyre || innerWidthMm === null || named === 'any') return []
  return (['front', 'rear'] as const).flatMap((position) => {
    const widthMm = position === 'front' ? tyre.frontWidthMm : tyre.rearWidthMm
    const pairing = pairTyre({
      seat,
      innerWidthMm,
      widthMm,
      setup: tyre.setup,
      hooklessApproved: tyre.hooklessApproved ?? null,
      leastOnHookless: rules['hookless-least-tyres'].rows,
    })
    if (pairing.verdict !== 'no') return []
    const widestInnerMm = Math.floor(widthMm - 3)
    return [
      note(pairing.code, 'stop', {
        position,
        widthMm,
        innerWidthMm,
        seat,
        leastTyreMm: pairing.leastTyreMm,
        widestHookedInnerMm: widestInnerMm,
      }),
    ]
  })
}

function pressureRefusal(results: { front: PressureResult; rear: PressureResult } | null): Note[] {
  if (!results) return []
  return (['rear', 'front'] as const).flatMap((position) => {
    const { verdict, nominalMm, ceilingBar, loadKg, widthThatWouldDoMm } = results[position]
    return verdict === 'not-suitable'
      ? [
          note('pressure-not-suitable', 'stop', {
            position,
            widthMm: nominalMm,
            ceilingBar,
            loadKg,
            widthThatWouldDoMm,
          }),
        ]
      : []
  })
}

/** Nothing to offer: over every limit that fits the bike, or nothing in the range for this bike at all. */
function catalogueRefusal(wheelsets: readonly Judgement[], totalKg: number): Note[] {
  if (wheelsets.some(({ rank }) => rank !== null)) return []
  const over = wheelsets.filter(({ verdict }) => verdict === 'over-limit')
  if (over.length === 0)
    return [note('none-for-bike', 'stop', { codes: [...new Set(wheelsets.flatMap(({ codes }) => codes))].sort() })]
  const bestLimitKg = Math.max(...over.map(({ limitKg }) => limitKg))
  return [
    note('over-every-limit', 'stop', { totalKg, limitKg: bestLimitKg, gapKg: totalKg - bestLimitKg }),
    note('metal-rim-36', 'info', { totalKg }),
  ]
}

function pressureNotes(
  filled: Filled,
  results: { front: PressureResult; rear: PressureResult } | null,
  shown: boolean,
): Note[] {
  if (!filled.tyre || !results) return [note('sharpen', 'info', { field: 'tyre.rearWidthMm' })]
  const { tyre, seat } = filled
  const both = [results.front, results.rear]
  const found: Note[] = []
  if (both.some(({ verdict }) => verdict === 'outside-model'))
    found.push(note('outside-model', 'caution', { ceilingBar: Math.min(...both.map(({ ceilingBar }) => ceilingBar)) }))
  if (!shown) return found
  if (both.some(({ ceilingFrom }) => ceilingFrom === 'tyre-assumed') || (tyre.maxBar ?? null) === null)
    found.push(note('tyre-max-assumed', 'info', { field: 'tyre.maxBar' }))
  if (seat === 'hookless')
    found.push(note('hookless-limit', 'caution', { ceilingBar: Math.min(...both.map(({ ceilingBar }) => ceilingBar)) }))
  if (seat === 'hookless' && (tyre.hooklessApproved ?? null) === null)
    found.push(note('confirm-hookless-tyre', 'caution'))
  const wider = both.find(({ verdict }) => verdict === 'wider-tyre')
  if (wider)
    found.push(
      note('wider-tyre', 'caution', { widthMm: wider.nominalMm, widthThatWouldDoMm: wider.widthThatWouldDoMm }),
    )
  if (both.some(({ verdict }) => verdict === 'at-ceiling')) found.push(note('at-ceiling', 'caution'))
  if (both.some(({ verdict }) => verdict === 'at-floor'))
    found.push(note('at-floor', 'caution', { floorBar: Math.max(...both.map(({ floorBar }) => floorBar)) }))
  const differs = both.find(({ nominalMm, effectiveMm }) => Math.abs(effectiveMm - nominalMm) > 1.5)
  if (differs)
    found.push(note('width-differs', 'caution', { nominalMm: differs.nominalMm, effectiveMm: differs.effectiveMm }))
  const low = both.find(
    ({ pressure, nominalMm }) => pressure && pressure.startBar < isoMinimumBar(nominalMm, offRoad(filled.ride)),
  )
  if (low && tyre.setup === 'tube')
    found.push(note('below-iso-minimum', 'caution', { minimumBar: isoMinimumBar(low.nominalMm, offRoad(filled.ride)) }))
  if (
    filled.innerWidthMm !== null &&
    seat !== 'any' &&
    Math.min(tyre.frontWidthMm, tyre.rearWidthMm) / filled.innerWidthMm < 1.4
  ) {
    found.push(
      note('narrow-pairing', 'caution', {
        widthMm: Math.min(tyre.frontWidthMm, tyre.rearWidthMm),
        innerWidthMm: filled.innerWidthMm,
      }),
    )
  }
  return found
}

function situationNotes(
  filled: Filled,
  given: DepthInputs,
  shallow: boolean,
  heat: Advice['brakeHeat'],
  spokes: { front: SpokeAdvice; rear: SpokeAdvice },
  totalKg: number,
  rules: Rules,
): Note[] {
  const found: Note[] = []
  if (filled.luggageKg > 0)
    found.push(note('luggage-counted', 'info', { luggageKg: filled.luggageKg, bareKg: totalKg - filled.luggageKg }))
  if (shallow) found.push(note('shallowest-stocked', 'info', { depthMm: SHALLOWEST_MM }))
  if (given.flatSpeedKmh !== filled.flatSpeedKmh)
    found.push(note('speed-held', 'info', { flatSpeedKmh: given.flatSpeedKmh }))
  if (filled.ride === 'road-fast') found.push(note('race-65', 'info', { depthMm: 65 }))
  if (filled.bodyKg < 55) found.push(note('light-rider', 'info'))
  if (heat && heat.verdict !== 'fine')
    found.push(
      note('brake-heat', 'caution', {
        carbonC: heat.carbonC,
        alloyC: heat.alloyC,
        limitC: heat.limitC,
        verdict: heat.verdict,
      }),
    )
  if (spokes.front.beyondTable || spokes.rear.beyondTable)
    found.push(note('spokes-beyond-table', 'caution', { totalKg }))
  const { rotor160AboveKg, rotor180AboveKg } = rules['brake-heat']
  if (filled.brakes === 'disc' && (totalKg > rotor160AboveKg || filled.terrain === 'mountain')) {
    found.push(note('rotor-size', 'info', { rotorMm: totalKg > rotor180AboveKg ? 180 : 160 }))
  }
  const { bike } = filled
  const unknown = Object.entries(bike).flatMap(([name, fact]) =>
    fact === null &&
    (name !== 'caliperOpeningMm' || filled.brakes === 'rim') &&
    (name !== 'rotorMount' || filled.brakes === 'disc')
      ? [`bike.${name}`]
      : [],
  )
  if (unknown.length > 0) found.push(note('bike-unknown', 'info', { fields: unknown }))
  if (filled.bodyKg !== filled.limitBodyKg)
    found.push(note('band-used', 'info', { limitBodyKg: filled.limitBodyKg, pressureBodyKg: filled.bodyKg }))
  return found
}
