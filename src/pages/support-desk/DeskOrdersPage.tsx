import { useInfiniteQuery } from '@tanstack/react-query'
import { useCallback } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { orderState } from '#contract/checkout.ts'
import { OrderSearchForm } from '../../features/support-desk/OrderSearchForm.tsx'
import { OrderTable } from '../../features/support-desk/OrderTable.tsx'
import { ordersQuery, type OrderSearch } from '../../features/support-desk/queries.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useTitle } from '../../lib/title.ts'
import { Button } from '../../ui/Button.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

/** Searches that are made many times a day. */
const savedViews = ['', 'query', 'placed', 'on-bench'] as const

/** Finding an order. The address holds what was searched for, so a result can be sent to a colleague. */
export function DeskOrdersPage() {
  const { t } = useTranslation('support-desk')
  useTitle(t('orders.title'))
  const [params, setParams] = useSearchParams()
  const search: OrderSearch = { q: params.get('q') ?? '', state: orderState.safeParse(params.get('state')).data ?? '' }
  const change = useCallback(
    ({ q, state }: OrderSearch) => {
      setParams({ ...(q ? { q } : {}), ...(state ? { state } : {}) }, { replace: true })
    },
    [setParams],
  )
  const { data, error, isPending, isPlaceholderData, hasNextPage, fetchNextPage, isFetchingNextPage, refetch } =
    useInfiniteQuery(ordersQuery(search))
  const orders = data?.pages.flatMap(({ items }) => items) ?? []
  return (
    <>
      <div className="mb-4 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h1 className="text-2xl!">{t('orders.title')}</h1>
        <ul className="no-print flex flex-wrap gap-x-5 text-sm">
          {savedViews.map((state) => (
            <li key={state}>
              <Link
                to={state === '' ? '?' : `?state=${state}`}
                aria-current={search.q === '' && search.state === state ? 'true' : undefined}
                className="quiet-link inline-flex min-h-9 items-center aria-current:font-bold aria-current:text-ink aria-current:no-underline"
              >
                {t(`orders.view.${state || 'all'}`)}
              </Link>
            </li>
          ))}
        </ul>
      </div>
      <OrderSearchForm search={search} onChange={change} />
      <p role="status" className="mt-3 mb-1 text-sm text-soft">
        {data && !isPlaceholderData && t(hasNextPage ? 'orders.foundMore' : 'orders.found', { count: orders.length })}
      </p>
      {isPending && <Waiting label={t('common:waiting')} rows={8} />}
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} />}
      {data && orders.length === 0 && <Notice title={t('orders.none')}>{t('orders.noneHint')}</Notice>}
      {orders.length > 0 && (
        <div className={isPlaceholderData ? 'opacity-60' : ''}>
          <OrderTable orders={orders} />
        </div>
      )}
      {hasNextPage && (
        <Button
          kind="plain"
          small
          className="no-print mt-4"
          busy={isFetchingNextPage}
          onClick={() => void fetchNextPage()}
        >
          {t('orders.more')}
        </Button>
      )}
    </>
  )
}
