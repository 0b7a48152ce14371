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

const tubular = { verdict: 'no', code: 'tubular' } as const
const notApproved = { verdict: 'no', code: 'tyre-not-for-hookless' } as const
const tubeInside = { verdict: 'no', code: 'tube-on-hookless' } as const
const confirm = { verdict: 'check', code: 'confirm-hookless-tyre' } as const
const fitting = { verdict: 'ok', code: 'pairing-ok' } as const

/** Width at which a row begins to speak, mm. */
export const edgeOf = ({ by, value }: Pick<PairingRow, 'by' | 'value'>, innerWidthMm: number) =>
  by === 'inner-plus' ? innerWidthMm + value : by === 'inner-times' ? innerWidthMm * value : value

/** A float's last bit must not move a tyre over an edge. */
const GUARD_MM = 1e-9

/** A row as numbers: edge = inner · times + plus. */
interface Edge {
  innerFromMm: number
  times: number
  plus: number
  below: boolean
  refuses: boolean
  row: PairingRow
}
interface Edges {
  edges: readonly Edge[]
  fits: PairingRow | null
}
const prepared = new WeakMap<PairingTable, Record<'hooked' | 'hookless', Edges>>()

/** The rows of each bead wall as numbers, worked out once a table: a range of rims is asked with every rider. */
function edgesOf(table: PairingTable): Record<'hooked' | 'hookless', Edges> {
  const known = prepared.get(table)
  if (known) return known
  const of = (seat: 'hooked' | 'hookless'): Edges => {
    const rows = table.rows.filter((row) => row.seat === seat)
    return {
      edges: rows
        .filter(({ side }) => side !== 'within')
        .map((row) => ({
          innerFromMm: row.innerFromMm,
          times: row.by === 'inner-times' ? row.value : row.by === 'inner-plus' ? 1 : 0,
          plus: row.by === 'inner-times' ? 0 : row.value,
          below: row.side === 'below',
          refuses: row.verdict === 'no',
          row,
        }))
        // Of two rows with one edge the one that speaks of wider rims alone, which comes later, is named.
        .sort((a, b) => a.innerFromMm - b.innerFromMm),
      fits: rows.find(({ side }) => side === 'within') ?? null,
    }
  }
  const made = { hooked: of('hooked'), hookless: of('hookless') }
  prepared.set(table, made)
  return made
}

/**
 * The strictest row wins: too narrow, then the demands on the tyre, then too wide, then what has to be checked.
 * @param pair widthMm: printed tyre width; hooklessApproved: null when nobody knows
 * @param table rows speak for rims from their inner width on; the largest least width and the smallest widest width count
 * @throws RangeError for widths that are not positive
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
  if (!(innerWidthMm > 0 && widthMm > 0)) throw new RangeError('pairTyre: out of range')
  const { edges, fits } = edgesOf(table)[seat]
  let leastTyreMm = 0
  let widestTyreMm = Infinity
  let least: PairingRow | null = null
  let widest: PairingRow | null = null
  let check: Edge | null = null
  for (const edge of edges) {
    if (innerWidthMm < edge.innerFromMm) continue
    const edgeMm = innerWidthMm * edge.times + edge.plus
    if (edge.refuses) {
      if (edge.below) {
        if (edgeMm >= leastTyreMm) {
          leastTyreMm = edgeMm
          least = edge.row
        }
      } else if (edgeMm <= widestTyreMm) {
        widestTyreMm = edgeMm
        widest = edge.row
      }
    } else if (edge.below ? widthMm < edgeMm - GUARD_MM : widthMm > edgeMm + GUARD_MM) check ??= edge
  }
  let said: { verdict: Pairing['verdict']; code: string }
  let row: DecidingRow | null
  const hookless = seat === 'hookless'
  if (setup === 'tubular') {
    said = tubular
    row = table.demands.tubular
  } else if (hookless && hooklessApproved === false) {
    said = notApproved
    row = table.demands.notApproved
  } else if (widthMm < leastTyreMm - GUARD_MM) {
    said = sayings.below.no
    row = least
  } else if (hookless && setup === 'tube' && hooklessApproved !== true) {
    said = tubeInside
    row = table.demands.tube
  } else if (widthMm > widestTyreMm + GUARD_MM) {
    said = sayings.above.no
    row = widest
  } else if (check) {
    said = check.below ? sayings.below.check : sayings.above.check
    row = check.row
  } else if (hookless && hooklessApproved === null) {
    said = confirm
    row = table.demands.confirm
  } else {
    said = fitting
    row = fits
  }
  return { verdict: said.verdict, code: said.code, leastTyreMm, widestTyreMm, row: row ?? table.otherwise }
}

/** Refusals that no other width would lift. */
export const notOfWidth = (code: string) =>
  code === tubular.code || code === notApproved.code || code === tubeInside.code

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
