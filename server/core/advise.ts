/**
 * The whole advice for one rider: scope, sums, verdicts, notes, working. Plain objects in, plain object out; the same input gives the same
 * object, key for key. Nothing here reads a clock, rounds for display or knows a language.
 */
import { fillAnswers, frontShareOf, type Answers, type Filled } from './answers.ts'
import { aeroAdvice } from './aero-advice.ts'
import { aeroReasons } from './aero-reasons.ts'
import type { RimHeatAdvice } from './brake-heat.ts'
import type { WheelsetFacts } from './catalogue.ts'
import { judgeAll, type Judgement, type Situation } from './judge.ts'
import { frontDesignLoad, systemMass, wheelLoads } from './loads.ts'
import {
  bareNotes,
  catalogueRefusal,
  hooklessOfferNotes,
  note,
  outOfScope,
  pairingRefusal,
  pressureNotes,
  pressureRefusal,
  rimBrakeNotes,
  situationNotes,
  type Note,
} from './notes.ts'
import { loadReason, massReason, pairingReason, pressureReason, type Reason } from './reasons.ts'
import { lookUp, type Rules } from './rules.ts'
import type { TradeOffPoint } from './trade-off.ts'
import { spokeAdvice, type SpokeAdvice } from './spokes.ts'
import { limitReason, spokeReason } from './structure-reasons.ts'
import { wheelPressure, type WheelPressure } from './wheel-pressure.ts'

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
  tradeOff: TradeOffPoint[]
  brakeHeat: RimHeatAdvice | null
  notes: Note[]
  reasons: Record<string, Reason>
}

/** Cautions that go with every answer, and plain information; notes beyond them make it one "with notes". */
const standing = new Set([
  'start-value',
  'lower-maximum-wins',
  'mechanic',
  'makers-and-rules',
  'measure-cold',
  'check-bead',
  'softer-by-taste',
  'bike-unknown',
  'sharpen',
  'rotor-size',
  'race-65',
  'gusts-beyond',
  'deeper-behind',
  'one-step-shallower',
])

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
  const loadsWith = (luggageKg: number) =>
    wheelLoads(filled.bodyKg + filled.kitKg + filled.bikeKg, share, luggageKg, luggageShare)
  const loads = loadsWith(filled.luggageKg)
  const overRear = filled.luggagePlace === 'rear' ? filled.luggageKg * (1 - luggageShare) : 0
  const loadsKg = {
    front: frontDesignLoad(loads.frontKg, loads.rearKg - overRear, rules['front-design-load']),
    rear: loads.rearKg,
  }

  const aero = aeroAdvice(filled, totalKg, catalogue, rules)
  const { depth, brakeHeat } = aero
  const spokes = spokeAdvice(
    { ride: filled.ride, brakes: filled.brakes, assist: filled.assist, totalKg, luggageKg: filled.luggageKg },
    rules,
  )
  const heavier = totalKg / (loads.frontKg + loads.rearKg)
  const situation: Situation = {
    filled,
    totalKg,
    loadsKg,
    // Limits count the heavier reading of a band, so what rests on the axles grows with it.
    restingKg: { front: loads.frontKg * heavier, rear: loads.rearKg * heavier },
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
  const tyreRefused = refusals.some(({ code }) => code !== 'over-every-limit' && code !== 'none-for-bike')
  const pressure = tyreRefused || !front || !rear ? null : { front, rear }

  // The ranked come first.
  const first = wheelsets[0]?.rank === 1 ? wheelsets[0] : undefined
  const offered = new Set<string>()
  for (const { rank, sku } of wheelsets) if (rank !== null) offered.add(sku)
  const offers = catalogue.filter(({ sku }) => offered.has(sku))
  const notes = refusals.concat(pressureNotes(filled, results, pressure !== null, rules))
  if (pressure && seat !== 'hookless')
    notes.push(...hooklessOfferNotes(filled, offers, pressures(filled, loadsKg, 'hookless', rules)))
  if (pressure && filled.luggageKg > 0) {
    const bare = loadsWith(0)
    const bareKg = {
      front: frontDesignLoad(bare.frontKg, bare.rearKg, rules['front-design-load']),
      rear: bare.rearKg,
    }
    notes.push(...bareNotes(filled, pressures(filled, bareKg, seat, rules)))
  }
  notes.push(...rimBrakeNotes(filled, offers), ...situationNotes(filled, aero, spokes, totalKg, rules))
  if (first?.verdict === 'no-margin')
    notes.push(note('no-margin', 'caution', { marginKg: first.marginKg, limitKg: first.limitKg }))
  notes.push(
    note('start-value', 'caution'),
    note('lower-maximum-wins', 'caution'),
    note('mechanic', 'info'),
    note('makers-and-rules', 'info'),
  )
  const outcome =
    refusals.length > 0
      ? 'refuse'
      : notes.some(({ code }) => !standing.has(code))
        ? 'recommend-with-notes'
        : 'recommend'
  // Key by key: spreading a dozen small objects into one costs more than the sums.
  const reasons: Record<string, Reason> = {
    systemMassKg: massReason(filled, totalKg),
    loads: loadReason(filled, loads, share, luggageShare),
  }
  if (results && !tyreRefused) {
    reasons['pressure.front'] = pressureReason(filled, 'front', results.front, seat, loads, rules)
    reasons['pressure.rear'] = pressureReason(filled, 'rear', results.rear, seat, loads, rules)
  }
  if (filled.tyre) reasons.pairing = pairingReason(filled, filled.tyre, seat, wheelsets, rules)
  aeroReasons(reasons, filled, aero, totalKg, rules)
  reasons['spokes.front'] = spokeReason(filled, totalKg, 'front', spokes.front, rules)
  reasons['spokes.rear'] = spokeReason(filled, totalKg, 'rear', spokes.rear, rules)
  reasons.limit = limitReason(
    filled,
    totalKg,
    situation.restingKg,
    first,
    first && catalogue.find(({ sku }) => sku === first.sku),
    rules,
  )
  return {
    rulesVersion,
    assumed: filled.assumed,
    systemMassKg: totalKg,
    parts,
    outcome,
    loads: { frontN: loads.frontN, rearN: loads.rearN, frontShare: loads.frontShare },
    pressure,
    rimDepthMm: { front: depth.front, rear: depth.rear },
    spokes,
    wheelsets,
    tradeOff: aero.tradeOff,
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
