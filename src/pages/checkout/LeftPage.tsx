import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { useTranslation } from 'react-i18next'
import { useParams, useSearchParams } from 'react-router-dom'
import { cancelOrder } from '../../features/checkout/queries.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useTitle } from '../../lib/title.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

/** Left the payment page without paying: the stock is let go, the basket is open again, nothing was charged. */
export function LeftPage() {
  const { t } = useTranslation('checkout')
  const { orderNumber = '' } = useParams()
  const [params] = useSearchParams()
  const key = params.get('key')
  const client = useQueryClient()
  // Leaving twice is the same as leaving once, so this may run as often as the page is shown.
  const { data, error, isPending, refetch } = useQuery({
    queryKey: ['checkout', 'left', orderNumber, key],
    queryFn: () => cancelOrder(orderNumber, key),
    retry: false,
  })
  useEffect(() => {
    if (data) void client.invalidateQueries({ queryKey: ['basket'] })
  }, [data, client])
  useTitle(t('left.title'))
  if (isPending) return <Waiting label={t('common:waiting')} className="mx-auto max-w-sheet p-5" />
  const order = `/orders/${orderNumber}${key === null ? '' : `?key=${key}`}`
  const paid = data ? data.state !== 'dropped' : false
  return (
    <Sheet className="md:max-w-3xl">
      <div className="grid justify-items-start gap-4 px-5 py-12 md:px-10">
        <h1>{t(paid ? 'left.paidTitle' : 'left.title')}</h1>
        <p className="max-w-[56ch] text-soft">{t(paid ? 'left.paidText' : 'left.text')}</p>
        {error && <ErrorNotice error={error} onRetry={() => void refetch()} />}
        {paid || error ? (
          <ButtonLink to={order}>{t('left.order')}</ButtonLink>
        ) : (
          <ButtonLink to="/basket">{t('left.basket')}</ButtonLink>
        )}
      </div>
    </Sheet>
  )
}
