import { useId } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { Wheelset } from '#contract/catalogue.ts'
import type { WheelsetVerdict } from '../../lib/fitting.ts'
import { PairDrawing } from '../../ui/PairDrawing.tsx'
import { decidingRow, useComparisonRows } from './comparison.ts'
import { drawn } from '../../lib/drawn.ts'
import { RiderVerdict } from './RiderVerdict.tsx'

interface ComparisonTableProps {
  sets: readonly Wheelset[]
  verdicts: ReadonlyMap<string, WheelsetVerdict> | null
  onlyDiffer: boolean
  onRemove: (slug: string) => void
}

const side = 'sticky start-0 z-10 bg-sheet'

/** The facts of up to four wheelsets in columns. On a narrow screen the table moves sideways in its own region; the facts' names stay. */
export function ComparisonTable({ sets, verdicts, onlyDiffer, onRemove }: ComparisonTableProps) {
  const { t } = useTranslation('catalogue')
  const id = useId()
  const rows = useComparisonRows(sets)
  const decides = sets.length > 1 ? decidingRow(sets, rows, verdicts) : null
  const first = rows.filter((row) => row.id === decides?.id)
  const rest = rows.filter((row) => row.id !== decides?.id && (row.differs || !onlyDiffer || sets.length < 2))
  const shown = [...first, ...rest]
  return (
    <>
      <div
        role="region"
        aria-labelledby={id}
        // A region that scrolls has to be reachable by keyboard.
        // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
        tabIndex={0}
        className="relative overflow-x-auto border-t border-ink focus-visible:-outline-offset-3"
      >
        <table
          className="w-full table-fixed border-collapse text-[0.9375rem]"
          style={{ minWidth: `${6.75 + sets.length * 10.5}rem` }}
        >
          <caption id={id} className="sr-only">
            {t('sideBySide.caption', { count: sets.length })}. {t('sideBySide.scroll')}
          </caption>
          {/* Columns of one width, so that all drawings share one scale. */}
          <colgroup>
            <col className="w-[6.75rem] sm:w-48" />
            {sets.map(({ sku }) => (
              <col key={sku} />
            ))}
          </colgroup>
          <thead>
            <tr className="align-top">
              <td className={side} />
              {sets.map((set) => (
                <th
                  key={set.sku}
                  scope="col"
                  className="border-s border-line px-3 pt-4 pb-3 text-start font-medium sm:px-5"
                >
                  <PairDrawing front={drawn(set, 'front')} rear={drawn(set, 'rear')} label="" className="max-w-72" />
                  <span className="flex items-baseline justify-between gap-2">
                    <Link
                      to={`/range/${set.slug}`}
                      className="text-lg leading-tight font-bold no-underline hover:underline"
                    >
                      {set.name}
                    </Link>
                    <button
                      type="button"
                      className="-me-2 grid size-9 flex-none place-items-center text-soft hover:text-ink print:hidden"
                      aria-label={t('compare.remove', { name: set.name })}
                      onClick={() => {
                        onRemove(set.slug)
                      }}
                    >
                      <svg aria-hidden viewBox="0 0 10 10" className="size-3" stroke="currentColor" strokeWidth="1.5">
                        <path d="m1 1 8 8M9 1 1 9" />
                      </svg>
                    </button>
                  </span>
                  <span className="block text-sm leading-snug text-soft">{set.tagline}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {verdicts && (
              <tr className="border-t border-line align-top">
                <th scope="row" className={`${side} ${label}`}>
                  {t('row.verdict')}
                </th>
                {sets.map(({ sku }) => {
                  const verdict = verdicts.get(sku)
                  return (
                    <td key={sku} className={cell}>
                      {verdict ? <RiderVerdict verdict={verdict} /> : '–'}
                    </td>
                  )
                })}
              </tr>
            )}
            {shown.map((row) => {
              const marked = row.id === decides?.id
              return (
                <tr key={row.id} className={`align-top ${marked ? 'border-y-2 border-ink' : 'border-t border-line'}`}>
                  <th scope="row" className={`${side} ${label}`}>
                    <span className={marked ? 'font-bold text-ink' : ''}>{row.label}</span>
                    {marked && (
                      <span className="mt-1 block">
                        <span className="bg-stop px-1.5 py-0.5 text-xs font-bold text-stop-ink">
                          {t('sideBySide.decides')}
                        </span>
                      </span>
                    )}
                  </th>
                  {row.values.map((value, index) => (
                    <td
                      key={sets[index]?.sku ?? index}
                      className={`${cell} ${marked ? 'figure text-2xl' : row.differs || sets.length === 1 ? 'font-semibold' : 'text-soft'}`}
                    >
                      {value}
                    </td>
                  ))}
                </tr>
              )
            })}
          </tbody>
        </table>
      </div>
      {shown.length === 0 && <p className="border-t border-line px-5 py-6 md:px-9">{t('sideBySide.allAlike')}</p>}
      {decides && (
        <p className="border-t border-line px-5 py-3 text-sm text-soft md:px-9">
          {t(decides.byRule ? 'sideBySide.decidesNote' : 'sideBySide.decidesNoteFree')}
        </p>
      )}
    </>
  )
}

const label = 'py-2.5 ps-5 pe-3 text-start text-sm leading-snug font-medium text-soft md:ps-9'
const cell = 'border-s border-line px-3 py-2.5 break-words whitespace-pre-line sm:px-5'
