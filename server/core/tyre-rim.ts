/** May this tyre go on this rim? Three answers, each naming the row of the pairing table that gave it. Widths in mm. */
import type { Rules } from './rules.ts'
import type { DecidingRow } from './tyre-pressure.ts'

export interface Pairing {
  verdict: 'ok' | 'check' | 'no'
  code: string
  /** The narrowest and the widest tyre this rim takes. */
  leastTyreMm: number
  widestTyreMm: number
  row: DecidingRow
}

type PairingTable = Rules['tyre-rim-pairing']
type PairingRow = PairingTable['rows'][number]

/** What each kind of row says when it holds; staff edit the rows, never these. */
const sayings = {
  below: {
    no: { verdict: 'no', code: 'tyre-too-narrow-for-rim' },
    check: { verdict: 'check', code: 'narrow-pairing' },
  },
  above: {
    no: { verdict: 'no', code: 'tyre-too-wide-for-rim' },
    check: { verdict: 'check', code: 'wide-pairing' },
  },
} as const

/** Width at which a row begins to speak, mm. */
export const edgeOf = ({ by, value }: Pick<PairingRow, 'by' | 'value'>, innerWidthMm: number) =>
  by === 'inner-plus' ? innerWidthMm + value : by === 'inner-times' ? innerWidthMm * value : value

/** A float's last bit must not move a tyre over an edge. */
const GUARD_MM = 1e-9

/**
 * The strictest row wins: too narrow, then the demands on the tyre, then too wide, then what has to be checked.
 * @param pair widthMm: printed tyre width; hooklessApproved: null when nobody knows
 * @param table rows speak for rims from their inner width on; the largest least width and the smallest widest width count
 * @source tyres reference step 12; each row carries its own source, from READ to judgement
 * @example pairTyre({ seat: 'hookless', innerWidthMm: 25, widthMm: 28, … }, table) // no: needs 29, row hookless-25
 */
export function pairTyre(
  pair: {
    seat: 'hooked' | 'hookless'
    innerWidthMm: number
    widthMm: number
    setup: 'tubeless' | 'tube' | 'tubular'
    hooklessApproved: boolean | null
  },
  table: PairingTable,
): Pairing {
  const { seat, innerWidthMm, widthMm, setup, hooklessApproved } = pair
  let leastTyreMm = 0
  let widestTyreMm = Infinity
  let least: PairingRow | null = null
  let widest: PairingRow | null = null
  let check: PairingRow | null = null
  let fits: PairingRow | null = null
  for (const row of table.rows) {
    if (row.seat !== seat || innerWidthMm < row.innerFromMm) continue
    if (row.side === 'within') {
      fits ??= row
      continue
    }
    const edgeMm = edgeOf(row, innerWidthMm)
    if (row.verdict === 'no') {
      if (row.side === 'below' && edgeMm > leastTyreMm) {
        leastTyreMm = edgeMm
        least = row
      } else if (row.side === 'above' && edgeMm < widestTyreMm) {
        widestTyreMm = edgeMm
        widest = row
      }
    } else if (row.side === 'below' ? widthMm < edgeMm - GUARD_MM : widthMm > edgeMm + GUARD_MM) check ??= row
  }
  const say = ({ verdict, code }: { verdict: Pairing['verdict']; code: string }, row: DecidingRow | null): Pairing => ({
    verdict,
    code,
    leastTyreMm,
    widestTyreMm,
    row: row ?? table.otherwise,
  })
  const { tubular, notApproved, tube, confirm } = table.demands
  if (setup === 'tubular') return say({ verdict: 'no', code: 'tubular' }, tubular)
  const hookless = seat === 'hookless'
  if (hookless && hooklessApproved === false) return say({ verdict: 'no', code: 'tyre-not-for-hookless' }, notApproved)
  if (widthMm < leastTyreMm - GUARD_MM) return say(sayings.below.no, least)
  if (hookless && setup === 'tube' && hooklessApproved !== true)
    return say({ verdict: 'no', code: 'tube-on-hookless' }, tube)
  if (widthMm > widestTyreMm + GUARD_MM) return say(sayings.above.no, widest)
  if (check) return say(sayings[check.side === 'below' ? 'below' : 'above'].check, check)
  if (hookless && hooklessApproved === null) return say({ verdict: 'check', code: 'confirm-hookless-tyre' }, confirm)
  return say({ verdict: 'ok', code: 'pairing-ok' }, fits)
}

/** Rows of the printed charts that speak of this rim, for the working: the class at or below its inner width. */
export function chartRows(
  { rows }: Pick<Rules['rim-tyre-charts'], 'rows'>,
  innerWidthMm: number,
): readonly Rules['rim-tyre-charts']['rows'][number][] {
  const classMm = rows.reduce(
    (found, row) => (row.innerMm <= innerWidthMm && row.innerMm > found ? row.innerMm : found),
    0,
  )
  return rows.filter(({ innerMm }) => innerMm === classMm)
}
