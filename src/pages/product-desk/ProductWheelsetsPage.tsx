import { useQuery } from '@tanstack/react-query'
import { useRef } from 'react'
import { useTranslation } from 'react-i18next'
import { useSearchParams } from 'react-router-dom'
import type { ProductRow } from '#contract/product-desk.ts'
import { productsQuery } from '../../features/product-desk/queries.ts'
import { WheelsetTable } from '../../features/product-desk/WheelsetTable.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useSlashKey } from '../../lib/slash-key.ts'
import { useTitle } from '../../lib/title.ts'
import { focusFirstRow } from '../../ui/DataTable.tsx'
import { Select, TextInput } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

const filters: Record<string, (row: ProductRow) => boolean> = {
  all: () => true,
  'on-sale': (row) => row.onSale,
  'off-sale': (row) => !row.onSale,
  'sold-out': (row) => row.onHand <= row.reserved,
  'limit-waiting': (row) => row.draftedLimits > 0,
  'words-missing': (row) => row.missingTexts.length > 0,
}

const plain = (text: string) => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()

/** The whole range, on sale or not. It is small enough to filter here; the address holds the filter. */
export function ProductWheelsetsPage() {
  const { t } = useTranslation('product-desk')
  useTitle(t('wheelsets.title'))
  const [params, setParams] = useSearchParams()
  const field = useRef<HTMLInputElement>(null)
  useSlashKey(field)
  const { data, error, isPending, refetch } = useQuery(productsQuery())
  const q = params.get('q') ?? ''
  const show = params.get('show') ?? 'all'
  const change = (next: { q: string; show: string }) => {
    setParams(
      { ...(next.q ? { q: next.q } : {}), ...(next.show !== 'all' ? { show: next.show } : {}) },
      { replace: true },
    )
  }
  if (isPending) return <Waiting label={t('common:waiting')} rows={8} />
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />
  const rows = data.items.filter(
    (row) => (filters[show] ?? filters.all)?.(row) && plain(`${row.name} ${row.sku}`).includes(plain(q)),
  )
  return (
    <>
      <h1 className="mb-4 text-2xl!">{t('wheelsets.title')}</h1>
      <form
        role="search"
        className="no-print flex flex-wrap items-end gap-3"
        onSubmit={(event) => event.preventDefault()}
      >
        <label className="min-w-0 flex-1 basis-72 text-sm font-[650]">
          {t('wheelsets.search')}
          <TextInput
            ref={field}
            type="search"
            value={q}
            maxLength={80}
            autoComplete="off"
            className="mt-1 min-h-10! py-1.5!"
            onChange={(event) => change({ q: event.target.value, show })}
            onKeyDown={(event) => {
              if (event.key !== 'ArrowDown') return
              event.preventDefault()
              focusFirstRow()
            }}
          />
        </label>
        <label className="text-sm font-[650] max-sm:w-full">
          {t('wheelsets.show')}
          <Select
            value={show}
            className="mt-1 min-h-10! py-1.5!"
            onChange={(event) => change({ q, show: event.target.value })}
          >
            {Object.keys(filters).map((key) => (
              <option key={key} value={key}>
                {t(`wheelsets.filter.${key}`)}
              </option>
            ))}
          </Select>
        </label>
      </form>
      <p role="status" className="mt-3 mb-1 text-sm text-soft">
        {t('wheelsets.found', { count: rows.length, of: data.items.length })}
      </p>
      {rows.length === 0 ? <Notice title={t('wheelsets.none')} /> : <WheelsetTable rows={rows} />}
    </>
  )
}
