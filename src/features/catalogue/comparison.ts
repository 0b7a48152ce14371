/** Rows of the side-by-side table, and which of them decides. */
import { useMemo } from 'react'
import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import type { WheelsetVerdict } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { useLimitText } from './limit-text.ts'
import { bothOf, stockWord, useWheelRows } from './wheel-rows.ts'

export interface ComparisonRow {
  id: string
  label: string
  values: string[]
  /** Some value is unlike the others. */
  differs: boolean
}

/** What a rider asks first stands first. */
const order = [
  'limit', 'depth', 'spokes', 'pairMass', 'price', 'stock', 'tyres', 'inner', 'seat', 'maxPressure', 'brake', 'size', 'axles', 'freehubs',
  'rotor', 'material', 'outer', 'lacing', 'spoke', 'tension', 'hub', 'rides', 'condition', 'assist',
] // prettier-ignore

export function useComparisonRows(sets: readonly Wheelset[]): ComparisonRow[] {
  const { t } = useTranslation(['catalogue', 'advisor'])
  const format = useFormat()
  const limitText = useLimitText()
  const { currency } = usePreferences()
  const { rows } = useWheelRows()
  return useMemo(() => {
    // Long lists stand one below the other.
    const pair = (values: { front: string; rear: string }) =>
      t(values.front.length > 18 ? 'value.pairLong' : 'value.pair', values)
    const own: Record<string, (set: Wheelset) => string> = {
      limit: ({ limitKg }) => limitText(limitKg).text,
      pairMass: ({ massG }) => format.grams(massG),
      price: ({ prices }) => {
        const price = prices[currency]
        return price === undefined ? '–' : format.money(price, currency)
      },
      stock: (set) => t(`stock.${stockWord(set)}`, { count: set.available }),
      brake: ({ brake }) => t(`value.${brake}`),
      size: ({ beadSeatMm }) => `${beadSeatMm}\u00a0mm`,
      rides: ({ rides }) => format.list(rides.map((ride) => t(`advisor:ride.${ride}.label`))),
      condition: ({ useCondition }) => t(`wheelset.conditions.${useCondition}`),
      assist: ({ assistRated }) => t(assistRated ? 'wheelset.assistYes' : 'wheelset.assistNo'),
    }
    const wheels = new Map(rows.map((row) => [row.id, row]))
    return order.flatMap((id) => {
      const wheel = wheels.get(id)
      const of = own[id] ?? (wheel ? (set: Wheelset) => bothOf(wheel.of(set.front), wheel.of(set.rear), pair) : null)
      if (!of) return []
      const values = sets.map(of)
      return [{ id, label: t(`row.${id}`), values, differs: new Set(values).size > 1 }]
    })
  }, [sets, t, format, limitText, currency, rows])
}

/** Which row each rule of the advice speaks of. */
const spokenOf: Record<string, string> = {
  'system-mass': 'limit',
  brake: 'brake',
  'brake-heat': 'material',
  'wheel-size': 'size',
  'front-axle': 'axles',
  'rear-axle': 'axles',
  freehub: 'freehubs',
  'rotor-mount': 'rotor',
  caliper: 'outer',
  clearance: 'tyres',
  use: 'rides',
  assist: 'assist',
  'rim-seat': 'seat',
  tubular: 'seat',
  'tyre-not-for-hookless': 'seat',
  'tube-on-hookless': 'seat',
  'tyre-too-narrow-for-rim': 'tyres',
  'tyre-too-wide-for-rim': 'tyres',
  'pressure-not-suitable': 'maxPressure',
}
export const rowOfCode = (code: string) => spokenOf[code] ?? null

const ruledOut = ({ verdict }: WheelsetVerdict) =>
  verdict === 'over-limit' || verdict === 'mismatch' || verdict === 'pressure'

/**
 * The row that decides: with a fitting, the one that the first rule speaks of which rules one of them out;
 * else the limit where limits differ, else the depth. Null where neither differs.
 */
export function decidingRow(
  sets: readonly Wheelset[],
  rows: readonly ComparisonRow[],
  verdicts: ReadonlyMap<string, WheelsetVerdict> | null,
): { id: string; byRule: boolean } | null {
  for (const { sku } of sets) {
    const one = verdicts?.get(sku)
    if (!one || !ruledOut(one)) continue
    const id = rowOfCode(one.codes[0] ?? '')
    if (id !== null) return { id, byRule: true }
  }
  const id = ['limit', 'depth'].find((name) => rows.some((row) => row.id === name && row.differs))
  return id === undefined ? null : { id, byRule: false }
}
