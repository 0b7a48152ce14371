import { useTranslation } from 'react-i18next'
import type { Wheelset, WheelsetDetail } from '#contract/catalogue.ts'
import { useFormat } from '../../lib/format.ts'
import { useWheelRows } from './wheel-rows.ts'

/** Every fact of both wheels. */
export function SpecTable({ set }: { set: Wheelset }) {
  const { t } = useTranslation('catalogue')
  const { rows } = useWheelRows()
  return (
    <FactTable
      caption={t('wheelset.specCaption', { name: set.name })}
      rows={rows.map(({ id, label, of }) => ({ id, label, front: of(set.front), rear: of(set.rear) }))}
    />
  )
}

/** What the structural model found of both wheels; nothing while they are not solved. */
export function StructureTable({ set }: { set: WheelsetDetail }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const { front, rear } = set.structure
  if (!front || !rear) return null
  type Solved = typeof front
  const newton = (value: number) => `${format.number(value)}\u00a0N`
  const pair = (left: string, right: string) => t('structure.pair', { left, right })
  const facts: Record<string, (one: Solved) => string> = {
    tension: ({ tensionN }) => pair(format.number(tensionN.left), newton(tensionN.right)),
    length: ({ spokeLengthMm }) =>
      pair(format.number(spokeLengthMm.left, 1), `${format.number(spokeLengthMm.right, 1)}\u00a0mm`),
    share: ({ share }) => format.percent(share, 1),
    slack: ({ firstSlackN }) => newton(Math.floor(firstSlackN / 10) * 10),
    lateral: ({ lateralNPerMm }) => `${format.number(lateralNPerMm.mean)}\u00a0N/mm`,
    broken: ({ brokenSpoke: { left, right } }) => `${format.number(Math.max(left.shiftMm, right.shiftMm), 1)}\u00a0mm`,
    buckling: ({ bucklingTensionN }) => newton(Math.floor(bucklingTensionN / 100) * 100),
  }
  return (
    <FactTable
      caption={t('structure.caption', { name: set.name })}
      rows={Object.entries(facts).map(([id, of]) => ({
        id,
        label: t(`structure.${id}`),
        front: of(front),
        rear: of(rear),
      }))}
    />
  )
}

interface Fact {
  id: string
  label: string
  front: string
  rear: string
}

function FactTable({ caption, rows }: { caption: string; rows: readonly Fact[] }) {
  const { t } = useTranslation('catalogue')
  return (
    <table className="w-full border-t border-ink text-[0.9375rem]">
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr className="border-b border-line text-start text-sm text-soft">
          <th scope="col" className="w-[30%] py-2 pe-3 text-start font-medium">
            {t('wheelset.fact')}
          </th>
          <th scope="col" className="w-[35%] py-2 pe-3 text-start font-medium">
            {t('drawing.front')}
          </th>
          <th scope="col" className="py-2 text-start font-medium">
            {t('drawing.rear')}
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ id, label, front, rear }) => (
          <tr key={id} className="border-b border-line align-top">
            <th scope="row" className="py-2 pe-3 text-start font-medium hyphens-auto text-soft">
              {label}
            </th>
            <td className="py-2 pe-3 font-semibold">
              {front === '' ? <span className="text-soft">{'–'}</span> : front}
            </td>
            <td className="py-2 font-semibold">{rear}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
