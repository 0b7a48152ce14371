import { useQuery } from '@tanstack/react-query'
import { useCallback, useMemo } from 'react'
import { Trans, useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import type { Wheelset } from '#contract/catalogue.ts'
import { ActiveFilters } from '../../features/catalogue/ActiveFilters.tsx'
import { FilterForm } from '../../features/catalogue/FilterForm.tsx'
import {
  readFilters,
  readSort,
  sorts,
  withFilters,
  withoutFilters,
  type FilterName,
  type Sort,
} from '../../features/catalogue/filters.ts'
import { wheelsetsQuery } from '../../lib/wheelsets.ts'
import { SideBySideTray } from '../../features/catalogue/SideBySideTray.tsx'
import { WheelsetCard } from '../../features/catalogue/WheelsetCard.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFittingVerdicts, useKeptFitting, type WheelsetVerdict } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { useTitle } from '../../lib/title.ts'
import { Button } from '../../ui/Button.tsx'
import { Select } from '../../ui/Field.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

type Verdicts = ReadonlyMap<string, WheelsetVerdict> | null

/** The range: narrowed and ordered by the address, each wheelset marked by the rider's fitting where there is one. */
export function RangePage() {
  const { t } = useTranslation('catalogue')
  const [params, setParams] = useSearchParams()
  const { language, currency } = usePreferences()
  const verdicts = useFittingVerdicts()
  const filters = useMemo(() => readFilters(params), [params])
  const sort = readSort(params) ?? (verdicts ? 'fit' : 'name')
  const asked = { ...filters, lng: language, currency, ...(sort === 'fit' ? {} : { sort }) }
  const range = useQuery(wheelsetsQuery(asked))
  const all = useQuery(wheelsetsQuery({ lng: language }))
  const sets = useMemo(() => ordered(range.data?.items ?? [], sort, verdicts), [range.data, sort, verdicts])
  useTitle(t('range.pageTitle'))

  const change = useCallback(
    (next: Partial<Record<FilterName | 'sort', string>>, typing = false) => {
      setParams((before) => withFilters(before, next), { replace: typing, preventScrollReset: true })
    },
    [setParams],
  )
  const clear = () => {
    setParams((before) => withoutFilters(before), { preventScrollReset: true })
  }
  const count = Object.keys(filters).length
  return (
    <Sheet>
      <Head sets={range.data ? sets : null} verdicts={verdicts} />
      <div className="grid border-t border-ink lg:grid-cols-[17.5rem_minmax(0,1fr)]">
        <aside className="border-line px-5 py-4 max-lg:border-b md:px-9 lg:border-e lg:py-6 lg:pe-4">
          <div className="lg:sticky lg:top-4">
            <h2 className="mb-3 max-lg:hidden">{t('filter.title')}</h2>
            <details className="group lg:hidden">
              <summary className="flex min-h-11 items-center justify-between gap-3 text-lg font-bold">
                {t('filter.open', { count })}
                <svg
                  aria-hidden
                  viewBox="0 0 10 6"
                  className="w-3 group-open:rotate-180"
                  fill="none"
                  stroke="currentColor"
                  strokeWidth="1.6"
                >
                  <path d="m1 1 4 4 4-4" />
                </svg>
              </summary>
              <div className="pt-3 pb-2">
                <FilterForm filters={filters} onChange={change} />
              </div>
            </details>
            <div className="-ms-1 max-h-[calc(100dvh-4rem)] overflow-y-auto py-1 ps-1 pe-2 max-lg:hidden">
              <FilterForm filters={filters} onChange={change} />
            </div>
          </div>
        </aside>
        <section aria-labelledby="range-list" className="min-w-0 md:pe-[8px]">
          <h2 id="range-list" className="sr-only">
            {t('range.list')}
          </h2>
          <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-3 px-5 py-4 md:px-6">
            <p role="status" className="font-[650]">
              {range.data && !range.isPlaceholderData ? t('range.found', { count: sets.length }) : ''}
            </p>
            <label className="flex items-center gap-2.5 text-sm text-soft">
              <span className="whitespace-nowrap">{t('range.sort')}</span>
              <Select
                className="min-h-11! py-1.5! text-[0.9375rem]!"
                value={sort}
                onChange={(event) => {
                  change({ sort: event.target.value })
                }}
              >
                {sorts
                  .filter((one) => one !== 'fit' || verdicts !== null)
                  .map((one) => (
                    <option key={one} value={one}>
                      {t(`range.sorts.${one}`)}
                    </option>
                  ))}
              </Select>
            </label>
            <div className="w-full empty:hidden">
              <ActiveFilters filters={filters} onRemove={(name) => change({ [name]: '' })} onClear={clear} />
            </div>
          </div>
          {range.isPending ? (
            <Waiting label={t('range.waiting')} rows={6} className="px-5 pb-8 md:px-6" />
          ) : range.error ? (
            <ErrorNotice error={range.error} onRetry={() => void range.refetch()} className="mx-5 mb-8 md:mx-6" />
          ) : sets.length === 0 ? (
            <div className="border-t border-line px-5 py-10 md:px-6">
              <p className="mb-4 max-w-[48ch] text-soft">{t('range.emptyText')}</p>
              <Button kind="plain" onClick={clear}>
                {t('range.clearAll')}
              </Button>
            </div>
          ) : (
            <ul
              className={`grid border-t border-line sm:grid-cols-2 xl:grid-cols-3 ${range.isPlaceholderData ? 'opacity-60' : ''}`}
              aria-busy={range.isPlaceholderData}
            >
              {sets.map((set) => (
                <li
                  key={set.sku}
                  className="row-span-7 grid grid-rows-subgrid gap-y-0 border-b border-line sm:border-e sm:nth-[2n]:border-e-0 xl:nth-[2n]:border-e xl:nth-[3n]:border-e-0"
                >
                  <WheelsetCard set={set} verdict={verdicts?.get(set.sku) ?? null} />
                </li>
              ))}
            </ul>
          )}
        </section>
      </div>
      <SideBySideTray sets={all.data?.items ?? sets} />
    </Sheet>
  )
}

/** The finding as the page's name, then how to read it, or whose margin it shows. */
function Head({ sets, verdicts }: { sets: readonly Wheelset[] | null; verdicts: Verdicts }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const { address } = useKeptFitting()
  const depths = (sets ?? []).flatMap(({ front, rear }) => [front.depthMm, rear.depthMm])
  const [from, to] = [Math.min(...depths), Math.max(...depths)]
  const title =
    sets === null
      ? t('range.titleFirst')
      : sets.length === 0
        ? t('range.titleNone')
        : t(from === to ? 'range.titleOneDepth' : 'range.title', { count: sets.length, from, to })
  const known = verdicts ? [...verdicts.values()][0] : undefined
  return (
    <div className="grid gap-x-12 gap-y-4 px-5 py-7 md:px-9 md:pt-10 md:pb-8 lg:grid-cols-[minmax(0,1.25fr)_minmax(0,1fr)] lg:items-end">
      <div>
        <h1>{title}</h1>
        <p className="mt-2 max-w-[62ch] text-soft">{t('range.lede')}</p>
      </div>
      <p className={`border-s-[3px] ps-4 text-[0.9375rem] ${known ? 'border-own' : 'border-strong'}`}>
        {known ? (
          <>
            <Trans
              t={t}
              i18nKey="range.seen"
              values={{ total: format.mass(known.limitKg - known.marginKg, 'up').text }}
              components={{ own: <b className="text-own" /> }}
            />{' '}
            <Link to={`/findings?${address}`} className="font-[650] whitespace-nowrap">
              {t('range.toFindings')}
            </Link>
          </>
        ) : (
          <>
            {t('range.unseen')}{' '}
            <Link to="/fitting" className="font-[650] whitespace-nowrap">
              {t('range.toFitting')}
            </Link>
          </>
        )}
      </p>
    </div>
  )
}

/** The server's order; for `fit` the rider's: those that fit by rank, then without margin, then the ruled-out ones. */
function ordered(sets: readonly Wheelset[], sort: Sort, verdicts: Verdicts): readonly Wheelset[] {
  if (sort !== 'fit' || !verdicts) return sets
  const weight = ({ sku }: Wheelset) => {
    const one = verdicts.get(sku)
    if (!one) return 3000
    return one.rank ?? (one.verdict === 'no-margin' ? 1000 : 2000)
  }
  return [...sets].sort((a, b) => weight(a) - weight(b))
}
