/** Tyre pressure from load, width and the drop that the use wants. Loads in kg on one wheel, widths in mm, pressures in bar gauge. */
import type { Rules } from './rules.ts'
import { barToPsi, PA_PER_BAR, PA_PER_PSI, kgToLb } from './units.ts'

/** Names the model in every working, so that an old answer can be told from a newer one. */
export const PRESSURE_MODEL = 'tyre-drop-1'
/** bar · mm^1.5 / kg; between the two published fits of the 15 % drop chart. DERIVED, tyres reference 5.3: judgement, not a measurement. */
export const DROP_CONSTANT = 17.3
/** Drop that the chart was drawn for, as a part of the section height. READ: F. Berto, "All About Tire Inflation". */
export const CHART_DROP = 0.15
/** Outer radius less width of the wheel the chart was drawn for, mm: half of 622. DERIVED, tyres reference 3.6. */
const CHART_RADIUS_MM = 311

/**
 * Pressure at which the tyre drops by 15 % of its width. p = 17.3 · m / w^1.5 · √((311 + w) / (BSD/2 + w))
 * @param loadKg load on this wheel, > 0
 * @param widthMm effective width, > 0
 * @param beadSeatMm bead-seat diameter, > 0
 * @returns bar
 * @throws RangeError for a load, width or diameter that is not positive
 * @source tyres reference step 4: F. Berto's chart through two fits (PRACTICE), exponent from Renart & Roura-Grabulosa 2019 (READ, abstract)
 * @example pressureAt15(50, 28) // 5.838
 */
export function pressureAt15(loadKg: number, widthMm: number, beadSeatMm = 622): number {
  if (!(loadKg > 0 && widthMm > 0 && beadSeatMm > 0)) throw new RangeError('pressureAt15: out of range')
  return (
    ((DROP_CONSTANT * loadKg) / (widthMm * Math.sqrt(widthMm))) *
    Math.sqrt((CHART_RADIUS_MM + widthMm) / (beadSeatMm / 2 + widthMm))
  )
}

/** What another drop makes of the 15 % pressure: (0.15/s)^1.5. @param drop > 0 @source tyres reference 3.5, DERIVED @example dropFactor(0.2) // 0.650 */
export function dropFactor(drop: number): number {
  if (!(drop > 0)) throw new RangeError('dropFactor: out of range')
  const part = CHART_DROP / drop
  return part * Math.sqrt(part)
}

/** Pressure for another drop. p = p15 · (0.15/s)^1.5. @source tyres reference 3.5, DERIVED @example pressureAtDrop(4, 0.2) // 2.598 */
export const pressureAtDrop = (p15: number, drop: number) => p15 * dropFactor(drop)

/** Drop at a given pressure. s = 0.15 · (p15/p)^(2/3). @param bar > 0 @source tyres reference 3.5, DERIVED */
export function dropAtPressure(p15: number, bar: number): number {
  if (!(bar > 0)) throw new RangeError('dropAtPressure: out of range')
  const part = p15 / bar
  return CHART_DROP * Math.cbrt(part * part)
}

/** Casing tension, N/mm: T = p/10 · w/2. @source thin-wall hoop law, tyres reference 3.13, DERIVED @example casingTension(5, 28) // 7 */
export const casingTension = (bar: number, widthMm: number) => ((bar / 10) * widthMm) / 2

/** Pressure at which the casing pulls with this tension, bar: the same law turned round. @example pressureAtTension(8.1, 32) // 5.0625 */
export const pressureAtTension = (tensionNPerMm: number, widthMm: number) => (tensionNPerMm * 20) / widthMm

/**
 * What the two published fits of the chart say at 15 %, bar; the model's constant lies between them.
 * K: P = 120 · L / W^1.5; B: P = 153.6 · L / W^1.5785 − 7.1685; P in psi, L in lb, W in mm, wheel 622.
 * @returns b: null above 40 mm and below 40 kg, where its constant term spoils it
 * @source tyres reference 5.3, PRACTICE (two riders' fits of F. Berto's chart)
 * @example publishedFits(50, 28) // k 6.15 bar (89 psi), b 5.57 bar (81 psi)
 */
export function publishedFits(loadKg: number, widthMm: number): { k: number; b: number | null } {
  const lb = kgToLb(loadKg)
  const bar = (psi: number) => (psi * PA_PER_PSI) / PA_PER_BAR
  return {
    k: bar((120 * lb) / widthMm ** 1.5),
    b: widthMm > 40 || loadKg < 40 ? null : bar((153.6 * lb) / widthMm ** 1.5785 - 7.1685),
  }
}

/**
 * Width of the tyre as it stands on its rim: 0.4 mm wider for each mm of rim beyond the one it was measured on.
 * @param innerWidthMm null: nobody knows, the printed width stands
 * @param table rows: [tyre width, inner width of its measuring rim] in ascending order; read between the points, so that a wider tyre never
 *   comes out narrower
 * @source tyres reference step 3 and 3.14 (READ for motorcycles, ISO 5751-2:2010; PRACTICE for bicycles); measuring rims MEMORY low-medium
 * @example effectiveWidth(28, 23, table) // 29.6 with a 28 mm tyre measured on 19 mm
 */
export function effectiveWidth(
  nominalMm: number,
  innerWidthMm: number | null,
  table: Pick<Rules['measuring-rims'], 'rows' | 'growthPerMm'>,
): number {
  if (innerWidthMm === null) return nominalMm
  return nominalMm + table.growthPerMm * (innerWidthMm - interpolate(table.rows, nominalMm))
}

/** Straight lines between points in ascending order of x; beyond the ends the end values. @throws RangeError without points */
export function interpolate(points: readonly (readonly [number, number])[], x: number): number {
  let before = points[0]
  if (!before) throw new RangeError('interpolate: no points')
  if (x <= before[0]) return before[1]
  for (const point of points) {
    if (x <= point[0]) return before[1] + ((point[1] - before[1]) * (x - before[0])) / (point[0] - before[0])
    before = point
  }
  return before[1]
}

/** First row whose upper width holds the tyre: `[[29, 5.0], [34, 4.5]]` gives 4.5 from just above 29 mm on. Null past the last row. */
export function byWidth(rows: readonly (readonly [number, number])[], widthMm: number): number | null {
  for (const row of rows) if (widthMm <= row[0]) return row[1]
  return null
}

/** A row of a table that decided, as the working names it. */
export interface DecidingRow {
  row: string
  source: string
  label: 'read' | 'memory' | 'derived' | 'practice'
}

/** Row of the cap table that holds a printed width; past its end the last row, which is the lowest. */
export function hooklessRow(
  { rows }: Pick<Rules['hookless-ceilings'], 'rows'>,
  nominalMm: number,
): Rules['hookless-ceilings']['rows'][number] {
  let last = rows[0]
  for (const row of rows) {
    last = row
    if (nominalMm <= row.upToMm) break
  }
  if (!last) throw new RangeError('hooklessRow: no rows')
  return last
}

export type CeilingFrom = 'tyre' | 'tyre-assumed' | 'rim' | 'hookless' | 'casing'
export interface Ceiling {
  bar: number
  from: CeilingFrom
  /** The row of a table that it was read from; null for a maximum that is printed on tyre or rim. */
  row: DecidingRow | null
}

/**
 * The lowest of all that limit the pressure, and which one it was. min(tyre, rim; on straight-side rims also: cap by width, road cap, tension).
 * @param given nominalMm: printed width, which the tables go by; effectiveMm for the casing's tension; tyreMaxBar null: assumed by width
 * @returns bar
 * @source tyres reference step 7; cap table ISO 5775-1:2023 MEMORY, second-hand; lower-of rule ISO 4210-2 4.11 MEMORY high
 */
export function pressureCeiling(
  given: {
    seat: 'hooked' | 'hookless'
    nominalMm: number
    effectiveMm: number
    tyreMaxBar: number | null
    rimMaxBar: number | null
  },
  rules: Rules,
): Ceiling {
  const { seat, nominalMm, effectiveMm, tyreMaxBar, rimMaxBar } = given
  const assumed = rules['assumed-tyre-maxima']
  let bar = tyreMaxBar ?? byWidth(assumed.rows, nominalMm) ?? assumed.beyondBar
  let from: CeilingFrom = tyreMaxBar === null ? 'tyre-assumed' : 'tyre'
  let row: DecidingRow | null = null
  if (rimMaxBar !== null && rimMaxBar < bar) {
    bar = rimMaxBar
    from = 'rim'
  }
  if (seat === 'hookless') {
    const caps = rules['hookless-ceilings']
    const byTable = hooklessRow(caps, nominalMm)
    if (byTable.maxBar < bar) {
      bar = byTable.maxBar
      from = 'hookless'
      row = byTable
    }
    if (caps.road.maxBar < bar) {
      bar = caps.road.maxBar
      from = 'hookless'
      row = caps.road
    }
    const tensionBar = pressureAtTension(caps.tension.maxNPerMm, effectiveMm)
    if (tensionBar < bar) {
      bar = tensionBar
      from = 'casing'
      row = caps.tension
    }
  }
  return { bar, from, row }
}

const ramp = (x: number, from: number, to: number) => (x <= from ? 0 : x >= to ? 1 : (x - from) / (to - from))

/**
 * Half-width of the band around the start value, as a part of it; null outside the model (20-60 mm, 25-80 kg).
 * Between the reference's classes it ramps, so that a heavier rider or a narrower tyre never lowers an edge of the band.
 * @param table loadKg: model from, outer class to, plain class from, plain class to, outer class from, model to; widthMm likewise at its upper end
 * @source tyres reference step 11: judgement (PRACTICE), root sum of squares of fit, width and load errors
 */
export function bandHalfWidth(
  loadKg: number,
  widthMm: number,
  measured: boolean,
  table: Rules['pressure-bands'],
): number | null {
  const { half, loadKg: kg } = measured ? table.measured : table.nominal
  const mm = table.widthMm
  // Read by place: taking the edges apart by pattern costs as much as the rest of the pressure.
  if (widthMm < mm[0] || widthMm > mm[3] || loadKg < kg[0] || loadKg > kg[5]) return null
  if (widthMm <= mm[1] && loadKg >= kg[2] && loadKg <= kg[3]) return half
  const outside = Math.max(ramp(widthMm, mm[1], mm[2]), ramp(loadKg, kg[3], kg[4]), 1 - ramp(loadKg, kg[1], kg[2]))
  return half + (table.outerHalf - half) * outside
}

/**
 * Narrowest whole tyre width that carries the load at the wanted drop under the ceiling of that width.
 * @param ceilingAt ceiling in bar for a printed width; widths are stepped through, as hookless caps fall with width
 * @param effectiveAt width the tyre stands at on this rim
 * @param takes whether the rim takes this width at all
 * @returns mm, or null when none up to 75 mm does
 * @source tyres reference step 8 and 3.11, DERIVED
 */
export function widthThatWouldDo(
  loadKg: number,
  beadSeatMm: number,
  drop: number,
  leastMm: number,
  ceilingAt: (widthMm: number) => number,
  effectiveAt: (widthMm: number) => number = (widthMm) => widthMm,
  takes: (widthMm: number) => boolean = () => true,
): number | null {
  const factor = dropFactor(drop)
  for (let widthMm = Math.max(25, Math.ceil(leastMm)); widthMm <= 75; widthMm += 1) {
    if (takes(widthMm) && pressureAt15(loadKg, effectiveAt(widthMm), beadSeatMm) * factor <= ceilingAt(widthMm))
      return widthMm
  }
  return null
}

/** ISO minimum inflation of the older edition, bar: a caution, not a floor, for wide tubeless tyres. READ, tyres reference 3.10. */
export const isoMinimumBar = (widthMm: number, offRoad: boolean, { iso }: Rules['tyre-minima']) =>
  offRoad ? iso.offRoadBar : widthMm <= iso.narrowUpToMm ? iso.narrowBar : iso.otherBar

/**
 * Factor for wet, rough, tubular or an insert: a preference, never a rule. The strongest single reduction, then held within the bounds.
 * @param chosen rows of the table `pressure-preferences`
 * @returns 1 for none
 * @source tyres reference step 6 and 3.12, MEMORY medium: convention, no measured factors were found
 * @example preferenceFactor(['rough', 'wet'], table) // 0.93, not 0.93 · 0.95
 */
export function preferenceFactor(chosen: readonly string[], table: Rules['pressure-preferences']): number {
  let lower = 1
  let higher = 1
  for (const { row, factor } of table.rows) {
    if (!chosen.includes(row)) continue
    if (factor < lower) lower = factor
    if (factor > higher) higher = factor
  }
  return Math.min(table.most, Math.max(table.least, lower * higher))
}

/**
 * Highest pressure a rim may be marked with, psi, when every rim is proof-inflated and the proof is a multiple of the marking.
 * @source rule table rim-proof: 150 psi with a clincher tyre common practice, no source; 110 % READ (16 CFR 1512.10)
 * @example highestMarkingPsi({ proofPsi: 150, testFactor: 1.1 }) // 136.36; shown rounded down, 136 psi or 9.4 bar
 */
export const highestMarkingPsi = ({ proofPsi, testFactor }: Pick<Rules['rim-proof'], 'proofPsi' | 'testFactor'>) =>
  proofPsi / testFactor

/** May a rim be marked with this maximum? @param bar gauge @source as above @example markedMaximumAllowed(9.4, table) // true: 136.3 psi */
export const markedMaximumAllowed = (bar: number, table: Pick<Rules['rim-proof'], 'proofPsi' | 'testFactor'>) =>
  barToPsi(bar) <= highestMarkingPsi(table)

/** Pressure of the test that a marking calls for, bar. @source 16 CFR 1512.10, READ @example proofBar(5, table) // 5.5 */
export const proofBar = (markedBar: number, { testFactor }: Pick<Rules['rim-proof'], 'testFactor'>) =>
  markedBar * testFactor
