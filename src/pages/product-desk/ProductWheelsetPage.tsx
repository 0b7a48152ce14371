import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { Link, useParams } from 'react-router-dom'
import { AuditTrail } from '../../features/product-desk/AuditTrail.tsx'
import { PriceHistory } from '../../features/product-desk/PriceHistory.tsx'
import { productQuery } from '../../features/product-desk/queries.ts'
import { WheelsetForm } from '../../features/product-desk/WheelsetForm.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { useTitle } from '../../lib/title.ts'
import { TitleBlock } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

/** One wheelset: what may be edited on the left, what it rests on at the right. */
export function ProductWheelsetPage() {
  const { t } = useTranslation(['product-desk', 'common'])
  const f = useFormat()
  const { sku = '' } = useParams()
  const { data, error, isPending, refetch } = useQuery(productQuery(sku))
  useTitle(data?.name ?? sku)
  if (isPending) return <Waiting label={t('common:waiting')} rows={6} />
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />
  return (
    <>
      <Link to="/product/wheelsets" className="quiet-link no-print text-sm">
        {t('wheelsets.back')}
      </Link>
      <div className="mt-1 mb-5 flex flex-wrap items-baseline gap-x-6">
        <h1 className="text-2xl!">{data.name}</h1>
        <p className="text-soft">{data.sku}</p>
        <Link to={`/range/${data.slug}`} className="quiet-link no-print ms-auto text-sm">
          {t('wheelsets.asRiders')}
        </Link>
      </div>
      <div className="grid gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,1.7fr)_minmax(0,1fr)]">
        <WheelsetForm key={data.sku} wheelset={data} />
        <div className="grid content-start gap-7">
          <section>
            <h2 className="mb-2 border-b border-ink pb-1 text-base!">{t('limits.one')}</h2>
            <TitleBlock
              items={[
                {
                  label: t('column.limit'),
                  value:
                    data.limitKg === null
                      ? t('limits.noneShort')
                      : `${f.number(data.limitKg, Number.isInteger(data.limitKg) ? 0 : 1)}\u00a0kg`,
                },
                {
                  label: t('limits.since'),
                  value: data.limitInForceFrom === null ? '–' : f.date(data.limitInForceFrom),
                },
                { label: t('field.version'), value: f.number(data.version) },
              ]}
            />
            <p className="mt-2 text-sm break-words">{data.limitProof}</p>
            <Link to={`/product/limits?sku=${data.sku}`} className="quiet-link no-print mt-2 inline-block text-sm">
              {t('limits.changeThis')}
            </Link>
          </section>
          <section>
            <h2 className="mb-1 border-b border-ink pb-1 text-base!">{t('prices.title')}</h2>
            <PriceHistory prices={data.priceHistory} />
          </section>
          <section>
            <h2 className="mb-1 border-b border-ink pb-1 text-base!">{t('audit.title')}</h2>
            <AuditTrail subjectId={data.sku} />
          </section>
        </div>
      </div>
    </>
  )
}
