/** Tyre pressure from load, width and the drop that the use wants. Loads in kg on one wheel, widths in mm, pressures in bar gauge. */

import { barToPsi } from './units.ts'

/** bar · mm^1.5 / kg; between the two published fits of the 15 % drop chart. DERIVED, tyres reference 5.3: judgement, not a measurement. */
export const DROP_CONSTANT = 17.3
/** Casing tension up to which straight-side rims are used, N/mm. DERIVED from the cap table of ISO 5775-1:2023 (itself second-hand). */
export const HOOKLESS_TENSION = 8.1
/** Highest pressure on a road hookless rim, bar. PRACTICE, tyres reference 3.9. */
export const HOOKLESS_BAR = 5

/**
 * Pressure at which the tyre drops by 15 % of its width. p = 17.3 · m / w^1.5 · √((311 + w) / (BSD/2 + w))
 * @param loadKg load on this wheel, > 0
 * @param widthMm effective width, > 0
 * @param beadSeatMm bead-seat diameter
 * @returns bar
 * @throws RangeError for a load or width that is not positive
 * @source tyres reference step 4: F. Berto's chart through two fits (PRACTICE), exponent from Renart & Roura-Grabulosa 2019 (READ, abstract)
 * @example pressureAt15(50, 28) // 5.838
 */
export function pressureAt15(loadKg: number, widthMm: number, beadSeatMm = 622): number {
  if (!(loadKg > 0 && widthMm > 0 && beadSeatMm > 0)) throw new RangeError('pressureAt15: out of range')
  return ((DROP_CONSTANT * loadKg) / widthMm ** 1.5) * Math.sqrt((311 + widthMm) / (beadSeatMm / 2 + widthMm))
}

/** Pressure for another drop. p = p15 · (0.15/s)^1.5. @source tyres reference 3.5, DERIVED @example pressureAtDrop(4, 0.2) // 2.598 */
export const pressureAtDrop = (p15: number, drop: number) => p15 * (0.15 / drop) ** 1.5

/** Drop at a given pressure. s = 0.15 · (p15/p)^(2/3). @source tyres reference 3.5, DERIVED */
export const dropAtPressure = (p15: number, bar: number) => 0.15 * (p15 / bar) ** (2 / 3)

/** Casing tension, N/mm: T = p/10 · w/2. @source thin-wall hoop law, tyres reference 3.13, DERIVED @example casingTension(5, 28) // 7 */
export const casingTension = (bar: number, widthMm: number) => ((bar / 10) * widthMm) / 2

/**
 * Width of the tyre as it stands on its rim: 0.4 mm wider for each mm of rim beyond the one it was measured on.
 * @param measuringRims [tyre width, inner width of its measuring rim] in ascending order; read between the points, so that a wider tyre never
 *   comes out narrower
 * @source tyres reference step 3 and 3.14 (READ for motorcycles, ISO 5751-2:2010; PRACTICE for bicycles); measuring rims MEMORY low-medium
 * @example effectiveWidth(28, 23, rims) // 29.6 with a 28 mm tyre measured on 19 mm
 */
export function effectiveWidth(
  nominalMm: number,
  innerWidthMm: number | null,
  measuringRims: readonly (readonly [number, number])[],
): number {
  if (innerWidthMm === null) return nominalMm
  return nominalMm + 0.4 * (innerWidthMm - interpolate(measuringRims, nominalMm))
}

/** Straight lines between points in ascending order of x; beyond the ends the end values. */
export function interpolate(points: readonly (readonly [number, number])[], x: number): number {
  const first = points[0]
  const last = points.at(-1)
  if (!first || !last) throw new RangeError('interpolate: no points')
  if (x <= first[0]) return first[1]
  if (x >= last[0]) return last[1]
  const next = points.findIndex(([at]) => at >= x)
  const [x0, y0] = points[next - 1] ?? first
  const [x1, y1] = points[next] ?? last
  return y0 + ((y1 - y0) * (x - x0)) / (x1 - x0)
}

/** First row whose upper width holds the tyre: `[[29, 5.0], [34, 4.5]]` gives 4.5 from just above 29 mm on. Null past the last row. */
export const byWidth = (rows: readonly (readonly [number, number])[], widthMm: number): number | null =>
  rows.find(([upTo]) => widthMm <= upTo)?.[1] ?? null

export type CeilingFrom = 'tyre' | 'tyre-assumed' | 'rim' | 'hookless' | 'casing'

/**
 * The lowest of all that limit the pressure, and which one it was.
 * @param capsBar maximum by nominal width on straight-side rims
 * @param nominalMm printed width, which the tables go by; effectiveMm for the casing's tension
 * @returns bar
 * @source tyres reference step 7; table of ISO 5775-1:2023 MEMORY, second-hand; lower-of rule READ (ISO 4210-2 4.11 MEMORY high)
 */
export function pressureCeiling(given: {
  seat: 'hooked' | 'hookless'
  nominalMm: number
  effectiveMm: number
  tyreMaxBar: number | null
  rimMaxBar: number | null
  assumedMaxBar: number
  capsBar: readonly (readonly [number, number])[]
}): { bar: number; from: CeilingFrom } {
  const { seat, nominalMm, effectiveMm, tyreMaxBar, rimMaxBar, assumedMaxBar, capsBar } = given
  const limits: { bar: number; from: CeilingFrom }[] = [
    tyreMaxBar !== null ? { bar: tyreMaxBar, from: 'tyre' } : { bar: assumedMaxBar, from: 'tyre-assumed' },
  ]
  if (rimMaxBar !== null) limits.push({ bar: rimMaxBar, from: 'rim' })
  if (seat === 'hookless') {
    // Past the table's end the casing rule alone would allow more than 2 bar; the reference asks for 2 bar at most.
    limits.push({ bar: Math.min(HOOKLESS_BAR, byWidth(capsBar, nominalMm) ?? 2), from: 'hookless' })
    limits.push({ bar: (HOOKLESS_TENSION * 20) / effectiveMm, from: 'casing' })
  }
  return limits.reduce((low, one) => (one.bar < low.bar ? one : low))
}

/**
 * Half-width of the band around the start value, as a part of it; null outside the model (20-60 mm, 25-80 kg).
 * Between the reference's classes it ramps over 1 mm or 3 kg, so that a heavier rider or a narrower tyre never lowers an edge of the band.
 * @source tyres reference step 11: judgement (PRACTICE), root sum of squares of fit, width and load errors
 */
export function bandHalfWidth(loadKg: number, widthMm: number, measured: boolean): number | null {
  if (widthMm < 20 || widthMm > 60 || loadKg < 25 || loadKg > 80) return null
  const inner = measured ? 0.1 : 0.12
  const ramp = (x: number, from: number, to: number) => Math.min(1, Math.max(0, (x - from) / (to - from)))
  const outside = Math.max(
    ramp(widthMm, 37, 38),
    ramp(loadKg, 65, measured ? 70 : 68),
    1 - ramp(loadKg, measured ? 33 : 33.5, 35),
  )
  return inner + (0.15 - inner) * outside
}

/**
 * Narrowest whole tyre width that carries the load at the wanted drop under the ceiling of that width.
 * @param ceilingAt ceiling in bar for a width; widths are stepped through, as hookless caps fall with width
 * @returns mm, or null when none up to 75 mm does
 * @source tyres reference step 8 and 3.11, DERIVED
 */
export function widthThatWouldDo(
  loadKg: number,
  beadSeatMm: number,
  drop: number,
  leastMm: number,
  ceilingAt: (widthMm: number) => number,
): number | null {
  for (let widthMm = Math.max(25, Math.ceil(leastMm)); widthMm <= 75; widthMm += 1) {
    if (pressureAtDrop(pressureAt15(loadKg, widthMm, beadSeatMm), drop) <= ceilingAt(widthMm)) return widthMm
  }
  return null
}

/** ISO minimum inflation of the older edition, bar: a caution, not a floor, for wide tubeless tyres. READ, tyres reference 3.10. */
export const isoMinimumBar = (widthMm: number, offRoad: boolean) => (offRoad ? 1.5 : widthMm <= 25 ? 3 : 2)

/**
 * Highest pressure a rim may be marked with when every rim is proof-inflated at 150 psi and the proof is 110 % of the marking.
 * @source common practice, no source (proof inflation); 16 CFR 1512.10 READ (110 %)
 */
export const HIGHEST_MARKING_PSI = 150 / 1.1
/** May a rim be marked with this maximum? @param bar gauge @source as above @example markedMaximumAllowed(9.4) // true: 136.3 psi */
export const markedMaximumAllowed = (bar: number) => barToPsi(bar) <= HIGHEST_MARKING_PSI
