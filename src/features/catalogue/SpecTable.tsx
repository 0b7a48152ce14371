import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import { useWheelRows } from './wheel-rows.ts'

/** Every fact of both wheels. */
export function SpecTable({ set }: { set: Wheelset }) {
  const { t } = useTranslation('catalogue')
  const { rows } = useWheelRows()
  return (
    <table className="w-full border-t border-ink text-[0.9375rem]">
      <caption className="sr-only">{t('wheelset.specCaption', { name: set.name })}</caption>
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
        {rows.map(({ id, label, of }) => {
          const [front, rear] = [of(set.front), of(set.rear)]
          return (
            <tr key={id} className="border-b border-line align-top">
              <th scope="row" className="py-2 pe-3 text-start font-medium hyphens-auto text-soft">
                {label}
              </th>
              <td className="py-2 pe-3 font-semibold">
                {front === '' ? <span className="text-soft">{'–'}</span> : front}
              </td>
              <td className="py-2 font-semibold">{rear}</td>
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}
