/** One wheel's answer: band, start, ceiling and floor, and whether the ceiling lets the tyre carry its load well. Steps 3 to 11 of the method. */
import type { Filled } from './answers.ts'
import { offRoad } from './answers.ts'
import type { Rules } from './rules.ts'
import { lookUp } from './rules.ts'
import {
  bandHalfWidth,
  byWidth,
  casingTension,
  dropAtPressure,
  effectiveWidth,
  pressureAt15,
  pressureAtDrop,
  pressureCeiling,
  widthThatWouldDo,
  type CeilingFrom,
} from './tyre-pressure.ts'

export type PressureVerdict = 'ok' | 'at-ceiling' | 'wider-tyre' | 'not-suitable' | 'at-floor' | 'outside-model'

export interface WheelPressure {
  lowBar: number
  startBar: number
  highBar: number
  ceilingBar: number
  ceilingFrom: CeilingFrom
  floorBar: number
}

export interface PressureResult {
  verdict: PressureVerdict
  /** Null outside the model and where the tyre cannot carry the load: then no number is better than a wrong one. */
  pressure: WheelPressure | null
  ceilingBar: number
  ceilingFrom: CeilingFrom
  floorBar: number
  loadKg: number
  nominalMm: number
  effectiveMm: number
  p15Bar: number
  targetDrop: number
  bandHalf: number | null
  tensionNPerMm: number
  /** Narrowest tyre that would do on this rim; only where the present one does not. */
  widthThatWouldDoMm: number | null
}

export interface RimFacts {
  seat: 'hooked' | 'hookless'
  innerWidthMm: number | null
  maxBar: number | null
}

/** Drop the use asks for. @source rule table target-drops, PRACTICE */
export function targetDrop(ride: string, setup: string, widthMm: number, rules: Rules): number {
  const drops = rules['target-drops']
  return ride === 'road-fast' && setup === 'tubeless' && widthMm >= 28
    ? drops.fastTubelessFrom28
    : lookUp(drops.byRide, ride)
}

/** @param loadKg load this wheel is set for (the front's design load in front) */
export function wheelPressure(
  filled: Filled & { tyre: NonNullable<Filled['tyre']> },
  position: 'front' | 'rear',
  loadKg: number,
  rim: RimFacts,
  rules: Rules,
): PressureResult {
  const { tyre, ride, beadSeatMm } = filled
  const nominalMm = position === 'front' ? tyre.frontWidthMm : tyre.rearWidthMm
  const measured = tyre.measured ?? false
  const effectiveMm = measured ? nominalMm : effectiveWidth(nominalMm, rim.innerWidthMm, rules['measuring-rims'].rows)
  const assumed = rules['assumed-tyre-maxima']
  const ceilingAt = (width: number, effective: number) =>
    pressureCeiling({
      seat: rim.seat,
      nominalMm: width,
      effectiveMm: effective,
      tyreMaxBar: tyre.maxBar ?? null,
      rimMaxBar: rim.maxBar,
      assumedMaxBar: byWidth(assumed.rows, width) ?? assumed.beyondBar,
      capsBar: rules['hookless-caps'].rows,
    })
  const { bar: ceilingBar, from: ceilingFrom } = ceilingAt(nominalMm, effectiveMm)
  const floorBar = tyre.minBar ?? 1
  const p15Bar = pressureAt15(loadKg, effectiveMm, beadSeatMm)
  const drop = targetDrop(ride, tyre.setup, nominalMm, rules)
  const wanted = pressureAtDrop(p15Bar, drop)
  const bandHalf = bandHalfWidth(loadKg, effectiveMm, measured)
  const base = {
    ceilingBar,
    ceilingFrom,
    floorBar,
    loadKg,
    nominalMm,
    effectiveMm,
    p15Bar,
    targetDrop: drop,
    bandHalf,
    tensionNPerMm: casingTension(Math.min(wanted, ceilingBar), effectiveMm),
  }

  const drops = rules['target-drops']
  const dropAtCeiling = dropAtPressure(p15Bar, ceilingBar)
  let verdict: PressureVerdict = 'ok'
  if (wanted > ceilingBar) {
    if (dropAtCeiling <= drop + drops.atLimitSlack) verdict = 'at-ceiling'
    else
      verdict = dropAtCeiling <= (offRoad(ride) ? drops.offRoadMost : drops.onRoadMost) ? 'wider-tyre' : 'not-suitable'
  } else if (wanted < floorBar) verdict = 'at-floor'
  // A tyre whose marked minimum lies above its ceiling cannot be set at all.
  if (floorBar > ceilingBar) verdict = 'not-suitable'

  const needsWider = verdict === 'wider-tyre' || verdict === 'not-suitable'
  const widthThatWouldDoMm = needsWider
    ? widthThatWouldDo(
        loadKg,
        beadSeatMm,
        drop,
        Math.max(nominalMm + 1, rim.seat === 'hookless' ? (rim.innerWidthMm ?? 0) + 4 : 0),
        (width) => {
          const open = { ...tyre, maxBar: null }
          return pressureCeiling({
            seat: rim.seat,
            nominalMm: width,
            effectiveMm: width,
            tyreMaxBar: open.maxBar,
            rimMaxBar: rim.maxBar,
            assumedMaxBar: byWidth(assumed.rows, width) ?? assumed.beyondBar,
            capsBar: rules['hookless-caps'].rows,
          }).bar
        },
      )
    : null
  if (verdict !== 'not-suitable' && bandHalf === null) verdict = 'outside-model'
  if (verdict === 'not-suitable' || bandHalf === null) return { ...base, verdict, pressure: null, widthThatWouldDoMm }

  const clip = (bar: number) => Math.min(ceilingBar, Math.max(floorBar, bar))
  // The band lies around the wanted value and is clipped with it: around the clipped one, more load could lower its edge.
  const startBar = clip(wanted)
  return {
    ...base,
    verdict,
    pressure: {
      lowBar: clip(wanted * (1 - bandHalf)),
      startBar,
      highBar: clip(wanted * (1 + bandHalf)),
      ceilingBar,
      ceilingFrom,
      floorBar,
    },
    widthThatWouldDoMm,
  }
}
