/** What the answer says beside its numbers: refusals with a way on, cautions, and what would sharpen it. Codes and data; the words live with the pages. */
import { mountainRide, offRoad, type Filled } from './answers.ts'
import type { RimHeatAdvice } from './brake-heat.ts'
import type { WheelsetFacts } from './catalogue.ts'
import { onlyTyreAgainst, type Judgement } from './judge.ts'
import { SHALLOWEST_MM, type DepthInputs } from './rim-depth.ts'
import type { Rules } from './rules.ts'
import type { SpokeAdvice } from './spokes.ts'
import { isoMinimumBar } from './tyre-pressure.ts'
import { pairTyre } from './tyre-rim.ts'
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

/** The rider's own rim, where one is named: a pair that does not go together is refused, whoever the rider is. */
export function pairingRefusal(
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

export function pressureRefusal(results: { front: PressureResult; rear: PressureResult } | null): Note[] {
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

export function pressureNotes(
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
  const { innerWidthMm } = filled
  if (innerWidthMm !== null && seat !== 'any') {
    const [least, most] = [Math.min(tyre.frontWidthMm, tyre.rearWidthMm), Math.max(tyre.frontWidthMm, tyre.rearWidthMm)]
    if (least / innerWidthMm < 1.4) found.push(note('narrow-pairing', 'caution', { widthMm: least, innerWidthMm }))
    if (most / innerWidthMm > 2.25) found.push(note('wide-pairing', 'caution', { widthMm: most, innerWidthMm }))
  }
  return found
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
  const ceilingBar = Math.min(onHookless.front.ceilingBar, onHookless.rear.ceilingBar)
  return [
    note('hookless-limit', 'caution', { ceilingBar }),
    ...((tyre.hooklessApproved ?? null) === null ? [note('confirm-hookless-tyre', 'caution')] : []),
  ]
}

/** Start values for the ride without the bags. */
export function bareNotes({ luggageKg }: Filled, bare: { front: PressureResult; rear: PressureResult } | null): Note[] {
  if (luggageKg === 0 || !bare?.front.pressure || !bare.rear.pressure) return []
  const start = ({ startBar, floorBar, ceilingBar }: WheelPressure) => ({ startBar, floorBar, ceilingBar })
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

export function situationNotes(
  filled: Filled,
  given: DepthInputs,
  shallow: boolean,
  heat: RimHeatAdvice | null,
  spokes: { front: SpokeAdvice; rear: SpokeAdvice },
  totalKg: number,
  rules: Rules,
): Note[] {
  const found: Note[] = []
  const fields = unusual(filled)
  if (fields.length > 0) found.push(note('look-again', 'caution', { fields }))
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
