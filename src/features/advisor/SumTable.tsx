import { useTranslation } from 'react-i18next'
import type { Advice } from '#contract/advisor.ts'
import { useFormat } from '../../lib/format.ts'

const lines = [
  ['body', 'bodyMassKg'],
  ['kit', 'kitMassKg'],
  ['bike', 'bikeMassKg'],
  ['luggage', 'luggageKg'],
] as const

export interface Parts extends Omit<Advice['parts'], 'bodyMassKg'> {
  /** null while the rider has not said. */
  bodyMassKg: number | null
}

interface SumTableProps {
  parts: Parts | null
  /** Paths of answers that took a default. */
  assumed: readonly string[]
  banded?: boolean
  /** The server's own total where there is one. */
  totalKg?: number
}

/** The ready-to-ride total as a sum on paper: own values in red, assumed ones said. */
export function SumTable({ parts, assumed, banded = false, totalKg }: SumTableProps) {
  const { t } = useTranslation('advisor')
  const format = useFormat()
  const unit = format.mass(0).unit
  const others = parts ? parts.kitMassKg + parts.bikeMassKg + parts.luggageKg : null
  const whole = parts && parts.bodyMassKg !== null && others !== null ? parts.bodyMassKg + others : null
  const sum = totalKg ?? whole ?? others
  const complete = totalKg !== undefined || whole !== null
  return (
    <table className="w-full text-[0.9375rem]">
      <caption className="sr-only">{t('fitting.sum.title')}</caption>
      <tbody>
        {lines.map(([name, field]) => {
          const value = parts?.[field] ?? null
          const guessed = field !== 'bodyMassKg' && assumed.includes(field)
          return (
            <tr key={name} className="border-b border-line">
              <th scope="row" className="py-1.5 pe-3 text-start font-medium text-soft">
                {t(name === 'body' && banded ? 'fitting.sum.bodyBand' : `fitting.sum.${name}`)}
                {guessed && parts && (
                  <span className="block text-xs leading-tight sm:ms-2 sm:inline">
                    {t(name === 'bike' ? 'fitting.sum.assumedBike' : 'fitting.sum.assumed')}
                  </span>
                )}
              </th>
              <td
                className={`py-1.5 text-end align-top ${value === null ? 'text-sm text-soft' : guessed ? 'font-semibold' : 'font-bold text-own'}`}
              >
                {value === null
                  ? t(name === 'body' ? 'fitting.sum.open' : 'fitting.sum.byRide')
                  : format.mass(value, 'up').value}
              </td>
            </tr>
          )
        })}
      </tbody>
      <tfoot>
        <tr className="border-t border-ink">
          <th scope="row" className="pt-2.5 text-start text-base font-bold">
            {t(complete ? 'fitting.sum.total' : 'fitting.sum.soFar')}
          </th>
          <td className={`pt-2.5 text-end ${complete ? 'text-own' : 'text-soft'}`}>
            {sum === null ? (
              <span className="text-sm">{t('fitting.sum.open')}</span>
            ) : (
              <>
                <span className="figure text-2xl">{format.mass(sum, 'up').value}</span>{' '}
                <span className="font-semibold">{unit}</span>
              </>
            )}
          </td>
        </tr>
      </tfoot>
    </table>
  )
}
