/** The working behind each value: formula in symbols, the rider's inputs, the constants, the source with its label. The words live with the pages. */
import type { Filled } from './answers.ts'
import type { Loads } from './loads.ts'
import type { Rules } from './rules.ts'
import {
  CHART_DROP,
  dropAtPressure,
  dropFactor,
  DROP_CONSTANT,
  interpolate,
  PRESSURE_MODEL,
  publishedFits,
  type DecidingRow,
} from './tyre-pressure.ts'
import { chartRows, edgeOf, pairTyre } from './tyre-rim.ts'
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

export const loadReason = (f: Filled, loads: Loads, frontShare: number, luggageFrontShare: number): Reason => ({
  formula: 'm_f = share · (rider + kit + bike) + bags in front; m_r = m − m_f; F = m · g',
  inputs: {
    position: f.position,
    frontShare,
    unladenKg: loads.frontKg + loads.rearKg - f.luggageKg,
    luggageKg: f.luggageKg,
    luggagePlace: f.luggagePlace,
    luggageFrontShare,
    frontKg: loads.frontKg,
    rearKg: loads.rearKg,
    frontN: loads.frontN,
    rearN: loads.rearN,
  },
  constants: { g: 9.80665 },
  source:
    f.frontLoadShare === null
      ? 'Static split by position: midpoints of reported scale and force-plate figures, with the dummy of TBIS 4210-3; bags by the moments about the axles'
      : 'Measured on scales by the rider; the share holds for everything on the bike',
  label: f.frontLoadShare === null ? 'derived' : 'read',
  uncertainty: f.frontLoadShare === null ? '±3 points' : '±1 point',
  wouldChangeIf: [
    'bodyMassKg',
    'kitMassKg',
    'bikeMassKg',
    'luggageKg',
    'position',
    'ride',
    'luggagePlace',
    'frontLoadShare',
  ],
})

/** What the front rule made of the standing load, in symbols; null where it did nothing. */
function frontRule(standingKg: number, designKg: number, rule: Rules['front-design-load']): string | null {
  if (designKg === standingKg) return null
  return designKg === rule.mostOfOwn * standingKg
    ? `m_f* = ${rule.mostOfOwn} · m_f`
    : `m_f* = ${rule.leastOfRear} · m_r`
}

/** The whole working of one wheel's start value: what went in, each step, what bound it and where each part comes from. */
export function pressureReason(
  f: Filled,
  position: 'front' | 'rear',
  result: PressureResult,
  seat: string,
  loads: Loads,
  rules: Rules,
): Reason {
  const { loadKg, nominalMm, effectiveMm, ceilingRow, pressure, targetDrop } = result
  const measured = f.tyre?.measured ?? false
  const standingKg = position === 'front' ? loads.frontKg : loads.rearKg
  const design = rules['front-design-load']
  const measuring = rules['measuring-rims']
  const fits = publishedFits(loadKg, effectiveMm)
  const ceilings = rules['hookless-ceilings']
  return {
    formula:
      'p = 17.3 · m / w^1.5 · √((311 + w)/(BSD/2 + w)) · (0.15/s)^1.5, at least the minimum, at most min(tyre, rim, hookless cap)',
    inputs: {
      model: PRESSURE_MODEL,
      standingLoadKg: standingKg,
      ...(position === 'front' ? { frontRule: frontRule(standingKg, loadKg, design) } : {}),
      loadKg,
      nominalWidthMm: nominalMm,
      measured,
      innerWidthMm: f.innerWidthMm,
      measuringRimMm: measured || f.innerWidthMm === null ? null : interpolate(measuring.rows, nominalMm),
      effectiveWidthMm: effectiveMm,
      beadSeatMm: f.beadSeatMm,
      setup: f.tyre?.setup ?? null,
      seat,
      targetDrop,
      p15Bar: result.p15Bar,
      wantedBar: result.wantedBar,
      startDrop: pressure ? dropAtPressure(result.p15Bar, pressure.startBar) : null,
      casingTensionNPerMm: result.tensionNPerMm,
      tyreMaxBar: f.tyre?.maxBar ?? null,
      rimMaxBar: f.rimMaxBar,
      tyreMinBar: f.tyre?.minBar ?? null,
    },
    constants: {
      dropConstant: DROP_CONSTANT,
      chartDrop: CHART_DROP,
      dropFactor: dropFactor(targetDrop),
      fitKBar: f.beadSeatMm === 622 ? fits.k : null,
      fitBBar: f.beadSeatMm === 622 ? fits.b : null,
      ...(measured ? {} : { widthGrowth: measuring.growthPerMm }),
      ...(position === 'front' ? { frontLeast: design.leastOfRear, frontMost: design.mostOfOwn } : {}),
      ceilingBar: result.ceilingBar,
      ceilingFrom: result.ceilingFrom,
      ceilingRow: ceilingRow?.row ?? null,
      floorBar: result.floorBar,
      ...(seat === 'hookless'
        ? { hooklessBar: ceilings.road.maxBar, hooklessTensionNPerMm: ceilings.tension.maxNPerMm }
        : {}),
    },
    source: [
      'F. Berto, "All About Tire Inflation" (15 % drop); the constant lies between two later fits of his chart; exponent: Renart & Roura-Grabulosa 2019, Am. J. Phys. 87, 102',
      'drop by use and front rule: judgement, common practice',
      ...(ceilingRow ? [`maximum: ${ceilingRow.source}`] : []),
      ...(result.ceilingFrom === 'tyre-assumed' ? ['maximum: usual printed maximum for this width, from memory'] : []),
    ].join('; '),
    // The drop by use is practice, and a number made of several sources takes the weakest label among them.
    label: 'practice',
    uncertainty: result.bandHalf === null ? 'outside the model' : percent(result.bandHalf),
    wouldChangeIf: [
      'bodyMassKg',
      `tyre.${position}WidthMm`,
      'tyre.measured',
      'tyre.setup',
      'tyre.maxBar',
      'tyre.minBar',
      'rim.seat',
      'rim.innerWidthMm',
      'rim.maxBar',
      'ride',
      'position',
      'frontLoadShare',
      'beadSeatMm',
      'bikeMassKg',
      'kitMassKg',
      'luggageKg',
      'luggagePlace',
    ],
  }
}

/** From what is best known to what nobody can check. */
const weakness = ['read', 'derived', 'memory', 'practice'] as const
const weakest = (rows: readonly DecidingRow[]): Reason['label'] =>
  rows.reduce<Reason['label']>(
    (low, { label }) => (weakness.indexOf(label) > weakness.indexOf(low) ? label : low),
    'read',
  )

/**
 * Which rows judged tyre and rim, on the rider's own rim where it is named and on the wheelsets: each row with its edge, source and label, and
 * beside them what printed charts say of the rider's rim.
 */
export function pairingReason(
  f: Filled,
  tyre: NonNullable<Filled['tyre']>,
  seat: 'hooked' | 'hookless',
  judged: readonly { pairingRows: { front: string; rear: string } | undefined }[],
  rules: Rules,
): Reason {
  const table = rules['tyre-rim-pairing']
  const inner = f.seat === 'any' ? null : f.innerWidthMm
  const own = (widthMm: number) =>
    inner === null
      ? null
      : pairTyre(
          { seat, innerWidthMm: inner, widthMm, setup: tyre.setup, hooklessApproved: tyre.hooklessApproved ?? null },
          table,
        )
  const [front, rear] = [own(tyre.frontWidthMm), own(tyre.rearWidthMm)]
  const names = new Set<string>()
  if (front && rear) names.add(front.row.row).add(rear.row.row)
  for (const { pairingRows } of judged) if (pairingRows) names.add(pairingRows.front).add(pairingRows.rear)
  const { demands, otherwise, ownRange } = table
  const others: DecidingRow[] = [
    ...Object.values(demands),
    otherwise,
    ownRange,
    ...rules['hookless-ceilings'].rows,
    rules['hookless-ceilings'].road,
    rules['hookless-ceilings'].tension,
  ]
  const used = [...table.rows, ...others].filter(({ row }) => names.has(row))
  const said = Object.fromEntries(used.map(({ row, source, label }) => [row, `${label}: ${source}`]))
  const charts = inner === null ? [] : chartRows(rules['rim-tyre-charts'], inner)
  const edges =
    inner === null
      ? []
      : table.rows.flatMap((row) =>
          names.has(row.row) && row.side !== 'within' ? [[row.row, edgeOf(row, inner)]] : [],
        )
  return {
    formula:
      'the strictest row that holds: no, else check, else ok; the wheel’s own range before what is only to be checked',
    inputs: {
      frontWidthMm: tyre.frontWidthMm,
      rearWidthMm: tyre.rearWidthMm,
      setup: tyre.setup,
      hooklessApproved: tyre.hooklessApproved ?? null,
      seat,
      innerWidthMm: inner,
      frontVerdict: front?.verdict ?? null,
      frontRow: front?.row.row ?? null,
      rearVerdict: rear?.verdict ?? null,
      rearRow: rear?.row.row ?? null,
      leastTyreMm: rear?.leastTyreMm ?? null,
      widestTyreMm: rear?.widestTyreMm ?? null,
    },
    constants: {
      rows: said,
      edgesMm: Object.fromEntries(edges) as Record<string, number>,
      charts: charts.map(({ row, fromMm, toMm, label, source }) => ({ row, fromMm, toMm, label, source })),
    },
    source: 'Dated table of tyre on rim; each row with its own source, named above',
    label: weakest(used),
    uncertainty: 'as good as its rows',
    wouldChangeIf: [
      'tyre.frontWidthMm',
      'tyre.rearWidthMm',
      'tyre.setup',
      'tyre.hooklessApproved',
      'rim.seat',
      'rim.innerWidthMm',
    ],
  }
}
