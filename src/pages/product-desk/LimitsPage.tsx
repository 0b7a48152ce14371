import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { useSearchParams } from 'react-router-dom'
import { AuditTrail } from '../../features/product-desk/AuditTrail.tsx'
import { LimitDecision } from '../../features/product-desk/LimitDecision.tsx'
import { LimitDraftForm } from '../../features/product-desk/LimitDraftForm.tsx'
import { LimitTable } from '../../features/product-desk/LimitTable.tsx'
import { limitsQuery } from '../../features/product-desk/queries.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useTitle } from '../../lib/title.ts'
import { Waiting } from '../../ui/Waiting.tsx'

/** Limits: what waits for a second person, what holds, and a new draft. `?sku=` names the wheelset to draft for. */
export function LimitsPage() {
  const { t } = useTranslation(['product-desk', 'common'])
  useTitle(t('limits.title'))
  const [params] = useSearchParams()
  const { data, error, isPending, refetch } = useQuery(limitsQuery())
  if (isPending) return <Waiting label={t('common:waiting')} rows={8} />
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />
  const waiting = data.items.flatMap((row) =>
    row.versions
      .filter(({ standing }) => standing === 'drafted' || standing === 'seconded')
      .map((change) => ({ row, change })),
  )
  return (
    <>
      <h1 className="text-2xl!">{t('limits.title')}</h1>
      <p className="mt-1 mb-5 max-w-[72ch] text-sm text-soft">{t('limits.lede')}</p>
      {waiting.length > 0 && (
        <section aria-labelledby="waiting" className="mb-8">
          <h2 id="waiting" className="mb-3 border-b border-ink pb-1 text-base!">
            {t('limits.waiting', { count: waiting.length })}
          </h2>
          <div className="grid gap-4">
            {waiting.map(({ row, change }) => (
              <LimitDecision key={change.id} row={row} change={change} />
            ))}
          </div>
        </section>
      )}
      <div className="grid gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,1.6fr)_minmax(0,1fr)]">
        <section aria-labelledby="in-force" className="max-lg:order-2">
          <h2 id="in-force" className="text-base!">
            {t('limits.inForce')}
          </h2>
          <LimitTable rows={data.items} />
        </section>
        <div className="grid content-start gap-8">
          <section aria-labelledby="draft" className="no-print">
            <h2 id="draft" className="mb-3 border-b border-ink pb-1 text-base!">
              {t('limits.draftTitle')}
            </h2>
            <LimitDraftForm rows={data.items} sku={params.get('sku') ?? ''} />
          </section>
          <section aria-labelledby="limit-audit" className="max-lg:hidden">
            <h2 id="limit-audit" className="mb-1 border-b border-ink pb-1 text-base!">
              {t('audit.title')}
            </h2>
            <AuditTrail subjectType="limit-change" />
          </section>
        </div>
      </div>
    </>
  )
}
