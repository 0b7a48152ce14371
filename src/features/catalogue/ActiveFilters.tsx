import { useTranslation } from 'react-i18next'
import { useFormat } from '../../lib/format.ts'
import { filterNames, type FilterName, type Filters } from './filters.ts'
import { useLimitText } from './limit-text.ts'

interface ActiveFiltersProps {
  filters: Filters
  onRemove: (name: FilterName) => void
  onClear: () => void
}

/** What narrows the list now, each to be taken away by itself. */
export function ActiveFilters({ filters, onRemove, onClear }: ActiveFiltersProps) {
  const { t } = useTranslation(['catalogue', 'advisor'])
  const format = useFormat()
  const limitText = useLimitText()
  const active = filterNames.flatMap((name) => {
    const value = filters[name]
    return value === undefined ? [] : [{ name, value }]
  })
  if (active.length === 0) return null
  const shown: Partial<Record<FilterName, (value: string) => string>> = {
    brake: (value) => t(`filter.brakes.${value}`),
    material: (value) => t(`filter.materials.${value}`),
    seat: (value) => t(`filter.seats.${value}`),
    depthFromMm: (value) => format.depth(Number(value)).text,
    depthToMm: (value) => format.depth(Number(value)).text,
    limitFromKg: (value) => limitText(Number(value)).text,
    tyreMm: (value) => format.width(Number(value)).text,
  }
  const word = (name: FilterName, value: string) =>
    name === 'ride'
      ? t(`advisor:ride.${value}.label`)
      : t(`filter.chip.${name}`, { value: shown[name]?.(value) ?? value })
  return (
    <ul aria-label={t('filter.active')} className="flex flex-wrap items-center gap-2">
      {active.map(({ name, value }) => (
        <li key={name}>
          <button
            type="button"
            aria-label={t('filter.remove', { name: word(name, value) })}
            className="inline-flex min-h-9 items-center gap-2 border border-own bg-own-wash px-2.5 text-sm font-semibold hover:border-ink"
            onClick={() => {
              onRemove(name)
            }}
          >
            {word(name, value)}
            <svg aria-hidden viewBox="0 0 10 10" className="size-2.5" stroke="currentColor" strokeWidth="1.6">
              <path d="m1 1 8 8M9 1 1 9" />
            </svg>
          </button>
        </li>
      ))}
      <li>
        <button type="button" className="quiet-link min-h-9 px-1 text-sm" onClick={onClear}>
          {t('range.clearAll')}
        </button>
      </li>
    </ul>
  )
}
