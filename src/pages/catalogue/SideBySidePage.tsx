import { useQuery } from '@tanstack/react-query'
import { useMemo, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Navigate, useSearchParams } from 'react-router-dom'
import type { Wheelset } from '#contract/catalogue.ts'
import { ComparisonTable } from '../../features/catalogue/ComparisonTable.tsx'
import { wheelsetsQuery } from '../../lib/wheelsets.ts'
import { MOST, readSlugs, sideBySidePath, useSideBySide } from '../../features/catalogue/side-by-side.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFittingVerdicts } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { useTitle } from '../../lib/title.ts'
import { Button, ButtonLink } from '../../ui/Button.tsx'
import { Field, Select } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

/** Up to four wheelsets in one table. The address says which; without one, those chosen in this browser. */
export function SideBySidePage() {
  const { t } = useTranslation('catalogue')
  const [params, setParams] = useSearchParams()
  const { language } = usePreferences()
  const kept = useSideBySide()
  const verdicts = useFittingVerdicts()
  const range = useQuery(wheelsetsQuery({ lng: language }))
  const text = params.get('sets')
  const slugs = useMemo(() => readSlugs((text ?? '').split(',')), [text])
  const all = range.data?.items
  const sets = useMemo(() => slugs.flatMap((slug) => all?.find((one) => one.slug === slug) ?? []), [slugs, all])
  useTitle(t('sideBySide.title', { count: 0 }))
  if (text === null && kept.slugs.length > 0) return <Navigate replace to={sideBySidePath(kept.slugs)} />

  const change = (next: readonly string[]) => {
    kept.set(next)
    setParams(
      (before) => {
        const after = new URLSearchParams(before)
        if (next.length === 0) after.delete('sets')
        else after.set('sets', next.join(','))
        return after
      },
      { preventScrollReset: true },
    )
  }
  const onlyDiffer = params.get('differ') === 'yes'
  const unknown = all ? slugs.length - sets.length : 0
  const shownSlugs = sets.map(({ slug }) => slug)
  return (
    <Sheet>
      <Head sets={sets} />
      {range.isPending ? (
        <Waiting label={t('range.waiting')} rows={6} className="px-5 pb-8 md:px-9" />
      ) : range.error ? (
        <ErrorNotice error={range.error} onRetry={() => void range.refetch()} className="mx-5 mb-8 md:mx-9" />
      ) : (
        <>
          <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4 px-5 pb-5 md:px-9">
            {sets.length < MOST && (
              <AddOne
                sets={range.data.items.filter(({ slug }) => !shownSlugs.includes(slug))}
                onAdd={(slug) => change([...shownSlugs, slug])}
              />
            )}
            {sets.length > 1 && (
              <label className="flex min-h-12 items-center gap-3 font-[650]">
                <input
                  type="checkbox"
                  role="switch"
                  className="size-5 flex-none accent-own"
                  checked={onlyDiffer}
                  onChange={(event) => {
                    const { checked } = event.target
                    setParams(
                      (before) => {
                        const after = new URLSearchParams(before)
                        if (checked) after.set('differ', 'yes')
                        else after.delete('differ')
                        return after
                      },
                      { replace: true, preventScrollReset: true },
                    )
                  }}
                />
                {t('sideBySide.onlyDiffer')}
              </label>
            )}
          </div>
          {unknown > 0 && (
            <Notice className="mx-5 mb-5 md:mx-9">
              <p>{t('sideBySide.unknown', { count: unknown })}</p>
            </Notice>
          )}
          {sets.length === 0 ? (
            <Empty />
          ) : (
            <ComparisonTable
              sets={sets}
              verdicts={verdicts}
              onlyDiffer={onlyDiffer}
              onRemove={(slug) => {
                change(shownSlugs.filter((one) => one !== slug))
              }}
            />
          )}
        </>
      )}
    </Sheet>
  )
}

function Head({ sets }: { sets: readonly Wheelset[] }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  return (
    <div className="px-5 pt-7 pb-5 md:px-9 md:pt-10">
      <h1>{t('sideBySide.title', { count: sets.length, names: format.list(sets.map(({ name }) => name)) })}</h1>
      <p className="mt-2 max-w-[62ch] text-soft">{t('sideBySide.lede')}</p>
    </div>
  )
}

function AddOne({ sets, onAdd }: { sets: readonly Wheelset[]; onAdd: (slug: string) => void }) {
  const { t } = useTranslation('catalogue')
  const [slug, setSlug] = useState('')
  return (
    <form
      className="flex min-w-0 items-end gap-2"
      onSubmit={(event) => {
        event.preventDefault()
        if (slug === '') return
        onAdd(slug)
        setSlug('')
      }}
    >
      <Field label={<span className="text-sm">{t('sideBySide.add')}</span>} className="min-w-0">
        {(ids) => (
          <Select
            {...ids}
            value={slug}
            onChange={(event) => {
              setSlug(event.target.value)
            }}
          >
            <option value="">{t('sideBySide.addChoose')}</option>
            {sets.map((set) => (
              <option key={set.slug} value={set.slug}>
                {`${set.name}, ${t(`filter.brakes.${set.brake}`)}, ${set.beadSeatMm}`}
              </option>
            ))}
          </Select>
        )}
      </Field>
      <Button type="submit" kind="plain" className="flex-none" aria-label={t('sideBySide.add')} disabled={slug === ''}>
        <svg aria-hidden viewBox="0 0 12 12" className="size-4" stroke="currentColor" strokeWidth="1.8">
          <path d="M6 1V11M1 6H11" />
        </svg>
      </Button>
    </form>
  )
}

function Empty() {
  const { t } = useTranslation('catalogue')
  return (
    <div className="border-t border-ink px-5 py-10 md:px-9">
      <h2>{t('sideBySide.emptyTitle')}</h2>
      <p className="mt-1.5 mb-5 max-w-[52ch] text-soft">{t('sideBySide.emptyText')}</p>
      <ButtonLink to="/range">{t('sideBySide.toRange')}</ButtonLink>
    </div>
  )
}
