import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { Verdict } from '../../ui/Verdict.tsx'
import { Waiting } from '../../ui/Waiting.tsx'
import { impactQuery } from './queries.ts'

const counts = ['openBaskets', 'unpaidOrders', 'placedOrders', 'deliveredOrders'] as const
/** More would hide the decision; the count says how many there are. */
const LISTED = 12

/** Whom a limit change touches, before anybody decides. */
export function LimitImpactView({ id }: { id: number }) {
  const { t } = useTranslation(['product-desk', 'common'])
  const f = useFormat()
  const { data, error, isPending } = useQuery(impactQuery(id))
  if (isPending) return <Waiting label={t('common:waiting')} rows={1} />
  if (error) return <ErrorNotice error={error} />
  const touched = counts.reduce((sum, name) => sum + data[name], 0)
  return (
    <div className="text-sm">
      <Verdict standing={touched === 0 ? 'within' : 'near'}>{t('impact.touched', { count: touched })}</Verdict>
      {touched > 0 && (
        <>
          <dl className="mt-2 grid grid-cols-2 border border-strong sm:grid-cols-4">
            {counts.map((name) => (
              <div key={name} className="border-line px-2.5 py-1.5 not-first:border-s">
                <dt className="text-xs text-soft">{t(`impact.${name}`)}</dt>
                <dd className="text-lg font-bold">{f.number(data[name])}</dd>
              </div>
            ))}
          </dl>
          <ul className="mt-2 grid gap-x-6 sm:grid-cols-2">
            {data.over.slice(0, LISTED).map(({ kind, orderNumber, overKg }, index) => (
              <li
                key={`${orderNumber ?? ''}${String(index)}`}
                className="flex justify-between border-b border-line py-0.5"
              >
                <span>
                  {orderNumber ?? t('impact.basket')} <span className="text-soft">{t(`impact.kind.${kind}`)}</span>
                </span>
                <span className="font-[650]">{t('impact.over', { kg: f.number(Math.ceil(overKg * 10) / 10, 1) })}</span>
              </li>
            ))}
          </ul>
          {touched > LISTED && (
            <p className="mt-1 text-xs text-soft">{t('impact.more', { count: touched - LISTED })}</p>
          )}
          {data.deliveredOrders > 0 && <p className="mt-2">{t('impact.notice')}</p>}
        </>
      )}
    </div>
  )
}
