/** What the answer says beside its numbers: refusals with a way on, cautions, and what would sharpen it. Codes and data; the words live with the pages. */
import { mountainRide, offRoad, type Filled } from './answers.ts'
import type { AeroAdvice } from './aero-advice.ts'
import { rotorHintMm } from './brake-heat.ts'
import type { WheelsetFacts } from './catalogue.ts'
import { onlyTyreAgainst, type Judgement } from './judge.ts'
import { SHALLOWEST_MM } from './rim-depth.ts'
import type { Rules } from './rules.ts'
import type { SpokeAdvice } from './spokes.ts'
import { gaugeAfter } from './air-density.ts'
import { isoMinimumBar, preferenceFactor, type DecidingRow } from './tyre-pressure.ts'
import { pairTyre, type Pairing } from './tyre-rim.ts'
import type { PressureResult, WheelPressure } from './wheel-pressure.ts'

export interface Note {
  code: string
  severity: 'info' | 'caution' | 'stop'
  data: Record<string, unknown>
}

export const note = (code: string, severity: Note['severity'], data: Record<string, unknown> = {}): Note => ({
  code,
  severity,
  data,
})

/** One rider, at most 25 km/h of assistance, adult wheel sizes: what lies beyond gets no number at all. */
export function outOfScope(filled: Filled): Note | null {
  if (filled.ridersOnBike > 1) return note('tandem', 'stop', { riders: filled.ridersOnBike })
  if (filled.assist === '45') return note('speed-assist', 'stop')
  if (![622, 584, 571, 559].includes(filled.beadSeatMm))
    return note('wheel-size', 'stop', { beadSeatMm: filled.beadSeatMm })
  return null
}

/** The row of a table that decided, as data: its name, its source and how well that is known. */
const decidedBy = (row: DecidingRow | null) => (row ? { row: row.row, rowSource: row.source, rowLabel: row.label } : {})

const positions = ['front', 'rear'] as const

/** The pair on the rider's own rim, front and rear; none where no rim is named. */
function ownPairs({ tyre, innerWidthMm, seat: named }: Filled, seat: 'hooked' | 'hookless', rules: Rules) {
  if (!tyre || innerWidthMm === null || named === 'any') return []
  const { setup } = tyre
  const hooklessApproved = tyre.hooklessApproved ?? null
  return positions.map((position) => {
    const widthMm = position === 'front' ? tyre.frontWidthMm : tyre.rearWidthMm
    const pair = { seat, innerWidthMm, widthMm, setup, hooklessApproved }
    return { position, widthMm, innerWidthMm, pairing: pairTyre(pair, rules['tyre-rim-pairing']) }
  })
}

/** Widest hooked rim, in whole mm of inner width, that takes this tyre; 0 where none does. */
function widestHookedInner(widthMm: number, rules: Rules): number {
  let innerWidthMm = Math.floor(widthMm)
  const takes = (): Pairing =>
    pairTyre(
      { seat: 'hooked', innerWidthMm, widthMm, setup: 'tubeless', hooklessApproved: null },
      rules['tyre-rim-pairing'],
    )
  while (innerWidthMm > 0 && takes().code === 'tyre-too-narrow-for-rim') innerWidthMm -= 1
  return innerWidthMm
}

/** The rider's own rim, where one is named: a pair that does not go together is refused, whoever the rider is. */
export function pairingRefusal(filled: Filled, seat: 'hooked' | 'hookless', rules: Rules): Note[] {
  return ownPairs(filled, seat, rules).flatMap(({ position, widthMm, innerWidthMm, pairing }) =>
    pairing.verdict === 'no'
      ? [
          note(pairing.code, 'stop', {
            position,
            widthMm,
            innerWidthMm,
            seat,
            leastTyreMm: pairing.leastTyreMm,
            widestTyreMm: pairing.widestTyreMm,
            widestHookedInnerMm: widestHookedInner(widthMm, rules),
            ...decidedBy(pairing.row),
          }),
        ]
      : [],
  )
}

export function pressureRefusal(results: { front: PressureResult; rear: PressureResult } | null): Note[] {
  if (!results) return []
  return (['rear', 'front'] as const).flatMap((position) => {
    const { verdict, nominalMm, ceilingBar, ceilingFrom, ceilingRow, loadKg, widthThatWouldDoMm } = results[position]
    return verdict === 'not-suitable'
      ? [
          note('pressure-not-suitable', 'stop', {
            position,
            widthMm: nominalMm,
            ceilingBar,
            ceilingFrom,
            loadKg,
            widthThatWouldDoMm,
            ...decidedBy(ceilingRow),
          }),
        ]
      : []
  })
}

/** Nothing to offer: the tyre goes on no rim that carries the total, or the total is over every limit, or nothing is made for this bike. */
export function catalogueRefusal(wheelsets: readonly Judgement[], totalKg: number): Note[] {
  if (wheelsets.some(({ rank }) => rank !== null)) return []
  const carrying = wheelsets.filter(onlyTyreAgainst)
  if (carrying.length > 0) return [note('none-for-tyre', 'stop', { totalKg, wheelsets: carrying.length })]
  const over = wheelsets.filter(({ verdict }) => verdict === 'over-limit')
  if (over.length === 0)
    return [note('none-for-bike', 'stop', { codes: [...new Set(wheelsets.flatMap(({ codes }) => codes))].sort() })]
  const bestLimitKg = Math.max(...over.map(({ limitKg }) => limitKg))
  return [
    note('over-every-limit', 'stop', { totalKg, limitKg: bestLimitKg, gapKg: totalKg - bestLimitKg }),
    note('metal-rim-36', 'info', { totalKg }),
  ]
}

const lowestCeiling = (results: readonly PressureResult[]) =>
  results.reduce((low, one) => (one.ceilingBar < low.ceilingBar ? one : low))

/** Start values as the page shows them, with the bounds that rounding must not pass. */
const start = ({ startBar, floorBar, ceilingBar }: WheelPressure) => ({ startBar, floorBar, ceilingBar })

/**
 * What the pressures need said: assumed maxima, caps, wider tyres, widths, minima, pairs to check, and how to set and check them.
 * @param shown whether pressures stand in the answer
 */
export function pressureNotes(
  filled: Filled,
  results: { front: PressureResult; rear: PressureResult } | null,
  shown: boolean,
  rules: Rules,
): Note[] {
  if (!filled.tyre || !results) return [note('sharpen', 'info', { field: 'tyre.rearWidthMm' })]
  const { tyre, seat } = filled
  const both = [results.front, results.rear]
  const lowest = lowestCeiling(both)
  const found: Note[] = []
  if (both.some(({ verdict }) => verdict === 'outside-model'))
    found.push(note('outside-model', 'caution', { ceilingBar: lowest.ceilingBar }))
  if (!shown) return found
  if (both.some(({ ceilingFrom }) => ceilingFrom === 'tyre-assumed') || (tyre.maxBar ?? null) === null)
    found.push(note('tyre-max-assumed', 'info', { field: 'tyre.maxBar' }))
  if (seat === 'hookless')
    found.push(note('hookless-limit', 'caution', { ceilingBar: lowest.ceilingBar, ...decidedBy(lowest.ceilingRow) }))
  if (seat === 'hookless' && (tyre.hooklessApproved ?? null) === null)
    found.push(note('confirm-hookless-tyre', 'caution'))
  const wider = both.find(({ verdict }) => verdict === 'wider-tyre')
  if (wider)
    found.push(
      note('wider-tyre', 'caution', {
        widthMm: wider.nominalMm,
        widthThatWouldDoMm: wider.widthThatWouldDoMm,
        loadKg: wider.loadKg,
        ceilingBar: wider.ceilingBar,
        ceilingFrom: wider.ceilingFrom,
        ...decidedBy(wider.ceilingRow),
      }),
    )
  if (both.some(({ verdict }) => verdict === 'at-ceiling')) found.push(note('at-ceiling', 'caution'))
  if (both.some(({ verdict }) => verdict === 'at-floor'))
    found.push(note('at-floor', 'caution', { floorBar: Math.max(...both.map(({ floorBar }) => floorBar)) }))
  const { warnBeyondMm } = rules['measuring-rims']
  const differs = both.find(({ nominalMm, effectiveMm }) => Math.abs(effectiveMm - nominalMm) > warnBeyondMm)
  if (differs)
    found.push(note('width-differs', 'caution', { nominalMm: differs.nominalMm, effectiveMm: differs.effectiveMm }))
  const isoBar = ({ nominalMm }: PressureResult) => isoMinimumBar(nominalMm, offRoad(filled.ride), rules['tyre-minima'])
  const low = both.find((one) => one.pressure && one.pressure.startBar < isoBar(one))
  if (low && tyre.setup === 'tube') found.push(note('below-iso-minimum', 'caution', { minimumBar: isoBar(low) }))
  for (const { pairing, widthMm, innerWidthMm } of ownPairs(
    filled,
    seat === 'hookless' ? 'hookless' : 'hooked',
    rules,
  )) {
    const { code, row, leastTyreMm } = pairing
    const named = code === 'narrow-pairing' || code === 'wide-pairing'
    if (named && !found.some((one) => one.code === code))
      found.push(note(code, 'caution', { widthMm, innerWidthMm, ...decidedBy(row) }))
    // The tables go by the printed width; a tyre that a wide rim has spread may measure enough and be printed too little.
    if (tyre.measured && widthMm < leastTyreMm + 2 && !found.some((one) => one.code === 'printed-width-counts'))
      found.push(note('printed-width-counts', 'caution', { widthMm, leastTyreMm, innerWidthMm }))
  }
  return [...found, ...settingNotes(filled, results, rules)]
}

/** How to set a pressure and what to look at, with what warmth and height do to it, and what some like on rough ground. */
function settingNotes(
  { surface }: Filled,
  { front, rear }: { front: PressureResult; rear: PressureResult },
  rules: Rules,
): Note[] {
  if (!front.pressure || !rear.pressure) return []
  const { startBar } = rear.pressure
  const warmer = gaugeAfter(startBar, { fromC: 20, toC: 30, fromM: 0, toM: 0 })
  const higher = gaugeAfter(startBar, { fromC: 20, toC: 20, fromM: 0, toM: 1000 })
  const found = [
    note('measure-cold', 'info', { perTenDegreesBar: warmer - startBar, perThousandMetresBar: higher - startBar }),
    note('check-bead', 'info'),
  ]
  if (surface !== 'rough') return found
  const factor = preferenceFactor(['rough'], rules['pressure-preferences'])
  const softer = (pressure: WheelPressure) => ({
    ...start(pressure),
    startBar: Math.max(pressure.floorBar, pressure.startBar * factor),
  })
  return [
    ...found,
    note('softer-by-taste', 'info', { factor, front: softer(front.pressure), rear: softer(rear.pressure) }),
  ]
}

/**
 * The pressures shown were worked for a hooked rim, as none was named, but wheelsets with straight bead walls are on offer: their cap and
 * their demand on the tyre have to be said as well.
 */
export function hooklessOfferNotes(
  { tyre }: Filled,
  offers: readonly WheelsetFacts[],
  onHookless: { front: PressureResult; rear: PressureResult } | null,
): Note[] {
  if (!tyre || !onHookless || !offers.some(({ front, rear }) => [front.seat, rear.seat].includes('hookless'))) return []
  const { ceilingBar, ceilingRow } = lowestCeiling([onHookless.front, onHookless.rear])
  return [
    note('hookless-limit', 'caution', { ceilingBar, ...decidedBy(ceilingRow) }),
    ...((tyre.hooklessApproved ?? null) === null ? [note('confirm-hookless-tyre', 'caution')] : []),
  ]
}

/** Start values for the ride without the bags. */
export function bareNotes({ luggageKg }: Filled, bare: { front: PressureResult; rear: PressureResult } | null): Note[] {
  if (luggageKg === 0 || !bare?.front.pressure || !bare.rear.pressure) return []
  return [
    note('bare-ride-lower-pressure', 'info', {
      front: start(bare.front.pressure),
      rear: start(bare.rear.pressure),
    }),
  ]
}

/** Carbon rims under rim brakes are allowed down long descents only with the right pads, tubes and braking (aero reference 2.6, policy). */
export function rimBrakeNotes({ brakes, terrain }: Filled, offers: readonly WheelsetFacts[]): Note[] {
  const carbon = offers.some(({ front, rear }) => [front.material, rear.material].includes('carbon'))
  return brakes === 'rim' && terrain === 'mountain' && carbon ? [note('carbon-rim-brakes', 'caution')] : []
}

/** Answers that seldom go together: counted as given, but named, as one of them may be a slip. */
function unusual({ bodyKg, bikeKg, assumed, ride, tyre, seat, brakes }: Filled): string[] {
  const fields: string[] = []
  if (bikeKg > bodyKg && !assumed.includes('bikeMassKg')) fields.push('bodyMassKg', 'bikeMassKg')
  if (tyre && mountainRide(ride) && Math.min(tyre.frontWidthMm, tyre.rearWidthMm) < 40)
    fields.push('ride', 'tyre.widthMm')
  if (seat === 'hookless' && brakes === 'rim') fields.push('rim.seat', 'brakes')
  return fields
}

/** What the depths need said: wind beyond the sums, who should go a step shallower, a deeper rear, the rule of races. */
function depthNotes(filled: Filled, { given, depth, pair }: AeroAdvice, rules: Rules): Note[] {
  const found: Note[] = []
  const { lightBelowKg, stepMm } = given.method
  const { front } = depth
  if (depth.shallow) found.push(note('shallowest-stocked', 'info', { depthMm: SHALLOWEST_MM }))
  else found.push(note('gusts-beyond', 'info', { gustMs: given.gustMs }))
  if (given.flatSpeedKmh !== filled.flatSpeedKmh)
    found.push(note('speed-held', 'info', { flatSpeedKmh: given.flatSpeedKmh }))
  if (pair.rearMm > pair.frontMm)
    found.push(
      note('deeper-behind', 'info', {
        depthMm: pair.rearMm,
        wattsMore: pair.wattsSaved - pair.matchedWattsSaved,
      }),
    )
  const { race } = rules['depth-clamps']
  if (filled.ride === 'road-fast')
    found.push(note('race-65', 'info', { depthMm: race.depthMm, from: race.from, ...decidedBy(race) }))
  if (filled.bodyKg < lightBelowKg) found.push(note('light-rider', 'info'))
  const panniers = filled.luggageKg > 0 && ['front', 'rear', 'spread'].includes(filled.luggagePlace)
  if ((panniers || filled.bodyKg < lightBelowKg) && front.to - stepMm >= SHALLOWEST_MM)
    found.push(note('one-step-shallower', 'info', { depthMm: front.to - stepMm }))
  return found
}

export function situationNotes(
  filled: Filled,
  aero: AeroAdvice,
  spokes: { front: SpokeAdvice; rear: SpokeAdvice },
  totalKg: number,
  rules: Rules,
): Note[] {
  const found: Note[] = []
  const { brakeHeat: heat } = aero
  const fields = unusual(filled)
  if (fields.length > 0) found.push(note('look-again', 'caution', { fields }))
  if (filled.luggageKg > 0)
    found.push(note('luggage-counted', 'info', { luggageKg: filled.luggageKg, bareKg: totalKg - filled.luggageKg }))
  found.push(...depthNotes(filled, aero, rules))
  if (heat && heat.verdict !== 'fine')
    found.push(
      note('brake-heat', 'caution', {
        carbonC: heat.carbonC,
        alloyC: heat.alloyC,
        limitC: heat.limitC,
        verdict: heat.verdict,
        bandShare: rules['brake-heat'].bandShare,
      }),
    )
  if (spokes.front.beyondTable || spokes.rear.beyondTable)
    found.push(note('spokes-beyond-table', 'caution', { totalKg }))
  const rotorMm =
    filled.brakes === 'disc' ? rotorHintMm(totalKg, filled.terrain === 'mountain', rules['brake-heat']) : null
  if (rotorMm !== null) found.push(note('rotor-size', 'info', { rotorMm }))
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
