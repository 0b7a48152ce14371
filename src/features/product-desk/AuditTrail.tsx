import { useInfiniteQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import type { AuditFilters } from '#contract/product-desk.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { Waiting } from '../../ui/Waiting.tsx'
import { auditQuery } from './queries.ts'

/** Who of the staff changed what here, when and why; before and after, side by side. */
export function AuditTrail(subject: Pick<AuditFilters, 'subjectType' | 'subjectId'>) {
  const { t } = useTranslation(['product-desk', 'common'])
  const f = useFormat()
  const { data, error, isPending, hasNextPage, fetchNextPage, isFetchingNextPage } = useInfiniteQuery(
    auditQuery(subject),
  )
  if (isPending) return <Waiting label={t('common:waiting')} rows={1} />
  if (error) return <ErrorNotice error={error} />
  const rows = data.pages.flatMap(({ items }) => items)
  if (rows.length === 0) return <p className="text-sm text-soft">{t('audit.none')}</p>
  return (
    <>
      <ol className="text-sm">
        {rows.map((row) => (
          <li key={row.id} className="border-b border-line py-1.5">
            <div className="flex flex-wrap justify-between gap-x-4">
              <span className="font-[650]">
                {t([`audit.action.${row.action.replace('.', '-')}`, 'audit.action.other'], { action: row.action })}
              </span>
              <span className="text-soft">
                {row.actorName}, <time dateTime={row.createdAt}>{f.time(row.createdAt)}</time>
              </span>
            </div>
            <p className="break-words">{row.reason}</p>
            {row.after && <Changes before={row.before ?? {}} after={row.after} />}
          </li>
        ))}
      </ol>
      {hasNextPage && (
        <Button
          kind="plain"
          small
          className="no-print mt-3"
          busy={isFetchingNextPage}
          onClick={() => void fetchNextPage()}
        >
          {t('audit.more')}
        </Button>
      )}
    </>
  )
}

function Changes({ before, after }: { before: Record<string, unknown>; after: Record<string, unknown> }) {
  const { t } = useTranslation('product-desk')
  const shown = Object.entries(after).filter(([, value]) => value !== null)
  return (
    <dl className="mt-1 text-xs text-soft">
      {shown.map(([name, value]) => (
        <div key={name} className="flex gap-2">
          <dt className="flex-none">
            {t([`audit.field.${name.replaceAll('.', '-')}`, 'audit.field.other'], { name })}
          </dt>
          <dd className="min-w-0 break-words">
            {name in before && before[name] !== null && <del className="me-1.5">{asText(name, before[name])}</del>}
            <ins className="text-ink no-underline">{asText(name, value)}</ins>
          </dd>
        </div>
      ))}
    </dl>
  )
}

/** Prices are kept in minor units. */
function asText(name: string, value: unknown): string {
  if (/^prices\.|Cents$/.test(name) && typeof value === 'number') return (value / 100).toFixed(2)
  return typeof value === 'string' ? value : JSON.stringify(value)
}
