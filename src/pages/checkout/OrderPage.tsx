import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { useNavigate, useParams, useSearchParams } from 'react-router-dom'
import { OrderDetails } from '../../features/checkout/OrderDetails.tsx'
import { cancelOrder, orderQuery, payOrder, refreshOrder } from '../../features/checkout/queries.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useTitle } from '../../lib/title.ts'
import { Button } from '../../ui/Button.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

const TRIES = 5

/** One order, for its owner or for whoever holds the link from the mail. Coming back from the payment page, it first finds out how that went. */
export function OrderPage() {
  const { t } = useTranslation('checkout')
  const { orderNumber = '' } = useParams()
  const [params, setParams] = useSearchParams()
  const key = params.get('key')
  const back = params.get('paid') === '1'
  const client = useQueryClient()
  const navigate = useNavigate()
  const [tries, setTries] = useState(0)
  const query = orderQuery(orderNumber, key)
  const { data, error, isPending, refetch } = useQuery(query)
  useTitle(t('order.title', { number: orderNumber }))

  const settling = back && data?.state === 'holding' && tries < TRIES
  useEffect(() => {
    if (!settling) return
    const timer = setTimeout(
      () => {
        refreshOrder(orderNumber, key)
          .then((fresh) => {
            client.setQueryData(query.queryKey, fresh)
            void client.invalidateQueries({ queryKey: ['basket'] })
          })
          .catch(() => null)
          .finally(() => {
            setTries((count) => count + 1)
          })
      },
      tries === 0 ? 0 : 1_500,
    )
    return () => {
      clearTimeout(timer)
    }
  }, [settling, tries, orderNumber, key, client, query.queryKey])

  const placed = data !== undefined && data.state !== 'holding'
  useEffect(() => {
    if (!back || !placed) return
    // The order is written: the address needs no more than its key, and the basket is another one now.
    setParams(key === null ? {} : { key }, { replace: true })
    void client.invalidateQueries({ queryKey: ['basket'] })
  }, [back, placed, key, setParams, client])

  const pay = useMutation({
    mutationFn: () => payOrder(orderNumber, key),
    onSuccess: ({ payUrl }) => {
      window.location.assign(payUrl)
    },
  })
  const leave = useMutation({
    mutationFn: () => cancelOrder(orderNumber, key),
    onSuccess: async () => {
      await client.invalidateQueries()
      await navigate('/basket')
    },
  })

  if (isPending) return <Waiting label={t('common:waiting')} rows={5} className="mx-auto max-w-sheet p-5" />
  if (!data) {
    return (
      <Sheet className="md:max-w-3xl">
        <div className="grid gap-4 px-5 py-12 md:px-10">
          <h1>{t('order.hiddenTitle')}</h1>
          <p className="text-soft">{t('order.hiddenText')}</p>
          <ErrorNotice error={error} onRetry={() => void refetch()} />
        </div>
      </Sheet>
    )
  }
  return (
    <Sheet>
      <div className="px-5 py-8 md:px-9">
        <p className="text-sm text-soft">{t('order.title', { number: data.orderNumber })}</p>
        <div role="status">
          <h1 className="mt-1">{settling ? t('order.writing') : t(`heading.${data.state}`)}</h1>
          <p className="mt-2 max-w-[62ch] text-soft">
            {settling ? t('order.writingText') : t(`next.${data.state}`, { email: data.email })}
          </p>
        </div>
        {data.state === 'holding' && !settling && (
          <div className="mt-5">
            {(pay.error ?? leave.error) && <ErrorNotice error={pay.error ?? leave.error} className="mb-4" />}
            <p className="flex flex-wrap gap-3">
              <Button
                busy={pay.isPending}
                onClick={() => {
                  pay.mutate()
                }}
              >
                {t('order.pay')}
              </Button>
              <Button
                kind="plain"
                busy={leave.isPending}
                onClick={() => {
                  leave.mutate()
                }}
              >
                {t('order.leave')}
              </Button>
            </p>
          </div>
        )}
        {data.state !== 'holding' && data.state !== 'dropped' && (
          <Notice tone="caution" title={t('caution.title')} className="mt-5 max-w-[62ch]">
            {t('caution.text')}
          </Notice>
        )}
      </div>
      <OrderDetails order={data} />
    </Sheet>
  )
}
