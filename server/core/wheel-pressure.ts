/** One wheel's answer: band, start, ceiling and floor, and whether the ceiling lets the tyre carry its load well. Steps 3 to 11 of the method. */
import type { Filled } from './answers.ts'
import { offRoad } from './answers.ts'
import type { Rules } from './rules.ts'
import { lookUp } from './rules.ts'
import { pairTyre } from './tyre-rim.ts'
import {
  bandHalfWidth,
  casingTension,
  dropAtPressure,
  dropFactor,
  effectiveWidth,
  interpolate,
  pressureAt15,
  pressureCeiling,
  widthThatWouldDo,
  type CeilingFrom,
  type DecidingRow,
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
  /** The table's row behind the ceiling; null for a maximum printed on tyre or rim. */
  ceilingRow: DecidingRow | null
  floorBar: number
  loadKg: number
  nominalMm: number
  effectiveMm: number
  p15Bar: number
  targetDrop: number
  /** Pressure for the target drop, before ceiling and floor. */
  wantedBar: number
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

/** What one wheel's tyre brings to any rim; worked out once for a rider, as a range of rims is asked with it. */
export interface WheelTyre {
  widthMm: number
  measured: boolean
  /** Inner width of the rim it was measured on, where that is known. */
  measuredOnMm: number | null
  setup: 'tubeless' | 'tube' | 'tubular'
  hooklessApproved: boolean | null
  loadKg: number
  beadSeatMm: number
  targetDrop: number
  /** (0.15/s)^1.5 of that drop. */
  factor: number
  /** Drop at the ceiling up to which the ceiling serves as start, and up to which a wider tyre is advised; beyond: not suitable. */
  slackDrop: number
  mostDrop: number
  maxBar: number | null
  floorBar: number
  /** Inner width of the rim that its printed width stands for. */
  measuringRimMm: number
}

/** Drop the use asks for. @source rule table target-drops, PRACTICE */
export function targetDrop(ride: string, setup: string, widthMm: number, rules: Rules): number {
  const { byRide, fastTubeless } = rules['target-drops']
  return ride === 'road-fast' && setup === 'tubeless' && widthMm >= fastTubeless.fromMm
    ? fastTubeless.drop
    : lookUp(byRide, ride)
}

type WithTyre = Pick<Filled, 'ride' | 'beadSeatMm' | 'innerWidthMm'> & { tyre: NonNullable<Filled['tyre']> }

/**
 * @param loadKg load this wheel is set for (the front's design load in front), > 0
 * @throws RangeError for a load that is not positive
 */
export function wheelTyre(
  { tyre, ride, beadSeatMm, innerWidthMm }: WithTyre,
  position: 'front' | 'rear',
  loadKg: number,
  rules: Rules,
): WheelTyre {
  if (!(loadKg > 0)) throw new RangeError('wheelTyre: out of range')
  const drops = rules['target-drops']
  const widthMm = position === 'front' ? tyre.frontWidthMm : tyre.rearWidthMm
  const drop = targetDrop(ride, tyre.setup, widthMm, rules)
  const measured = tyre.measured ?? false
  return {
    widthMm,
    measured,
    measuredOnMm: measured ? innerWidthMm : null,
    setup: tyre.setup,
    hooklessApproved: tyre.hooklessApproved ?? null,
    loadKg,
    beadSeatMm,
    targetDrop: drop,
    factor: dropFactor(drop),
    slackDrop: drop + drops.atLimitSlack,
    mostDrop: offRoad(ride) ? drops.offRoadMost : drops.onRoadMost,
    maxBar: tyre.maxBar ?? null,
    floorBar: tyre.minBar ?? rules['tyre-minima'].unmarkedFloorBar,
    measuringRimMm: interpolate(rules['measuring-rims'].rows, widthMm),
  }
}

/** Another tyre on the same wheel: its own maximum, minimum and measured width are not known. @param ride what the rider rides */
export function otherWidth(tyre: WheelTyre, widthMm: number, ride: string, rules: Rules): WheelTyre {
  const drops = rules['target-drops']
  const drop = targetDrop(ride, tyre.setup, widthMm, rules)
  return {
    ...tyre,
    widthMm,
    measured: false,
    measuredOnMm: null,
    targetDrop: drop,
    factor: drop === tyre.targetDrop ? tyre.factor : dropFactor(drop),
    slackDrop: drop + drops.atLimitSlack,
    maxBar: null,
    floorBar: rules['tyre-minima'].unmarkedFloorBar,
    measuringRimMm: interpolate(rules['measuring-rims'].rows, widthMm),
  }
}

/**
 * Width at which the tyre stands on a rim. A measured width counts as it is on the rim it was measured on, and grows or shrinks from there.
 * @param innerWidthMm null: unknown, the width stands as given
 * @source tyres reference step 3
 */
export function widthOn(
  tyre: Pick<WheelTyre, 'widthMm' | 'measured' | 'measuredOnMm' | 'measuringRimMm'>,
  innerWidthMm: number | null,
  rules: Rules,
): number {
  const knownOnMm = tyre.measured ? tyre.measuredOnMm : tyre.measuringRimMm
  return innerWidthMm === null || knownOnMm === null
    ? tyre.widthMm
    : tyre.widthMm + rules['measuring-rims'].growthPerMm * (innerWidthMm - knownOnMm)
}

const within = (bar: number, floorBar: number, ceilingBar: number) => Math.min(ceilingBar, Math.max(floorBar, bar))

/**
 * The pressure of one tyre on one rim. p = clip(p15 · (0.15/s)^1.5, floor, ceiling); over the ceiling the drop at the ceiling decides.
 * @returns widthThatWouldDoMm always null here; `wheelPressure` looks for it
 * @source tyres reference steps 3 to 11
 */
export function pressureOn(tyre: WheelTyre, rim: RimFacts, rules: Rules): PressureResult {
  const { widthMm, measured, loadKg, beadSeatMm, factor, floorBar } = tyre
  const effectiveMm = widthOn(tyre, rim.innerWidthMm, rules)
  const ceiling = pressureCeiling(
    { seat: rim.seat, nominalMm: widthMm, effectiveMm, tyreMaxBar: tyre.maxBar, rimMaxBar: rim.maxBar },
    rules,
  )
  const ceilingBar = ceiling.bar
  const p15Bar = pressureAt15(loadKg, effectiveMm, beadSeatMm)
  const wantedBar = p15Bar * factor
  const bandHalf = bandHalfWidth(loadKg, effectiveMm, measured, rules['pressure-bands'])

  let verdict: PressureVerdict = 'ok'
  if (wantedBar > ceilingBar) {
    const drop = dropAtPressure(p15Bar, ceilingBar)
    verdict = drop <= tyre.slackDrop ? 'at-ceiling' : drop <= tyre.mostDrop ? 'wider-tyre' : 'not-suitable'
  } else if (wantedBar < floorBar) verdict = 'at-floor'
  // A tyre whose marked minimum lies above its ceiling cannot be set at all.
  if (floorBar > ceilingBar) verdict = 'not-suitable'
  const suitable = verdict !== 'not-suitable'
  if (suitable && bandHalf === null) verdict = 'outside-model'

  // The band lies around the wanted value and is clipped with it: around the clipped one, more load could lower its edge.
  const startBar = within(wantedBar, floorBar, ceilingBar)
  return {
    verdict,
    pressure:
      suitable && bandHalf !== null
        ? {
            lowBar: within(wantedBar * (1 - bandHalf), floorBar, ceilingBar),
            startBar,
            highBar: within(wantedBar * (1 + bandHalf), floorBar, ceilingBar),
            ceilingBar,
            ceilingFrom: ceiling.from,
            floorBar,
          }
        : null,
    ceilingBar,
    ceilingFrom: ceiling.from,
    ceilingRow: ceiling.row,
    floorBar,
    loadKg,
    nominalMm: widthMm,
    effectiveMm,
    p15Bar,
    targetDrop: tyre.targetDrop,
    wantedBar,
    bandHalf,
    tensionNPerMm: casingTension(startBar, effectiveMm),
    widthThatWouldDoMm: null,
  }
}

/**
 * Narrowest whole width of another tyre that carries this wheel's load on this rim at the wanted drop. Its own maximum is not known, so the
 * usual one for its width counts; the rim has to take it.
 * @source tyres reference step 8
 */
export function widerTyre(tyre: WheelTyre, rim: RimFacts, rules: Rules): number | null {
  const { innerWidthMm, seat } = rim
  const effectiveAt = (widthMm: number) => effectiveWidth(widthMm, innerWidthMm, rules['measuring-rims'])
  return widthThatWouldDo(
    tyre.loadKg,
    tyre.beadSeatMm,
    tyre.targetDrop,
    tyre.widthMm + 1,
    (widthMm) =>
      pressureCeiling(
        { seat, nominalMm: widthMm, effectiveMm: effectiveAt(widthMm), tyreMaxBar: null, rimMaxBar: rim.maxBar },
        rules,
      ).bar,
    effectiveAt,
    (widthMm) =>
      innerWidthMm === null ||
      pairTyre({ seat, innerWidthMm, widthMm, setup: 'tubeless', hooklessApproved: true }, rules['tyre-rim-pairing'])
        .verdict !== 'no',
  )
}

/** @param loadKg load this wheel is set for (the front's design load in front) */
export function wheelPressure(
  filled: WithTyre,
  position: 'front' | 'rear',
  loadKg: number,
  rim: RimFacts,
  rules: Rules,
): PressureResult {
  const tyre = wheelTyre(filled, position, loadKg, rules)
  const result = pressureOn(tyre, rim, rules)
  const tooNarrow =
    result.wantedBar > result.ceilingBar && dropAtPressure(result.p15Bar, result.ceilingBar) > tyre.slackDrop
  if (tooNarrow || result.verdict === 'not-suitable') result.widthThatWouldDoMm = widerTyre(tyre, rim, rules)
  return result
}
