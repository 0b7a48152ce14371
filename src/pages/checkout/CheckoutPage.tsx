import { useRef } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, Navigate } from 'react-router-dom'
import type { OrderRequest } from '#contract/checkout.ts'
import { DeliveryForm, type DeliveryInput } from '../../features/checkout/DeliveryForm.tsx'
import { usePlaceOrder } from '../../features/checkout/queries.ts'
import { ApiError } from '../../lib/api.ts'
import { useBasket } from '../../lib/basket.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { useSession } from '../../lib/session.ts'
import { Sums } from '../../lib/Sums.tsx'
import { useTitle } from '../../lib/title.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

export function CheckoutPage() {
  const { t } = useTranslation('checkout')
  const format = useFormat()
  const { language } = usePreferences()
  const session = useSession()
  const basket = useBasket()
  const place = usePlaceOrder()
  const attempt = useRef({ fingerprint: '', idempotencyKey: '' })
  useTitle(t('title'))
  const { data } = basket
  if (basket.isPending || session.isPending)
    return <Waiting label={t('common:waiting')} className="mx-auto max-w-sheet p-5" />
  if (!data)
    return <ErrorNotice error={basket.error} onRetry={() => void basket.refetch()} className="mx-auto max-w-sheet" />
  if (data.basketId === null || data.lines.length === 0) return <Navigate to="/basket" replace />

  const { basketId, market, totalCents, currency, lines } = data
  const submit = ({ email, limitAcknowledged, ...address }: DeliveryInput) => {
    const request: OrderRequest = {
      basketId,
      email,
      delivery: { ...address, country: market },
      locale: language,
      expectedTotalCents: totalCents,
      ...(limitAcknowledged === true ? { limitAcknowledged } : {}),
    }
    const fingerprint = JSON.stringify(request)
    if (attempt.current.fingerprint !== fingerprint)
      attempt.current = { fingerprint, idempotencyKey: crypto.randomUUID() }
    place.mutate(
      { request, idempotencyKey: attempt.current.idempotencyKey },
      {
        onSuccess: ({ payUrl }) => {
          window.location.assign(payUrl)
        },
        // The server saw another basket than this page: what it sees now is fetched, and the shopper decides again.
        onError: () => void basket.refetch(),
      },
    )
  }
  const changed = place.error instanceof ApiError && place.error.problem.code === 'price-changed'
  return (
    <Sheet>
      <div className="grid lg:grid-cols-[minmax(0,1.25fr)_minmax(0,1fr)]">
        <section className="px-5 py-8 md:px-9">
          <h1>{t('title')}</h1>
          <p className="mt-1.5 mb-6 text-soft">{t('lede')}</p>
          {place.error && <ErrorNotice error={place.error} className="mb-5" />}
          {changed && <p className="mb-5 font-[650]">{t('newTotal', { total: format.money(totalCents, currency) })}</p>}
          <DeliveryForm
            country={market}
            email={session.data?.user?.email ?? null}
            mustAcknowledge={lines.some(({ limitCheck }) => limitCheck === 'unconfirmed')}
            limits={format.list(lines.map(({ name, limitKg }) => `${name}: ${format.mass(limitKg, 'down').text}`))}
            payLabel={t('pay', { total: format.money(totalCents, currency) })}
            busy={place.isPending || place.isSuccess}
            onSubmit={submit}
          />
          <p className="mt-3 max-w-[60ch] text-sm text-soft">{t('payNote')}</p>
        </section>
        <aside
          className="border-line px-5 py-8 max-lg:order-first max-lg:border-b md:px-9 lg:border-s"
          aria-label={t('yourOrder')}
        >
          <h2>{t('yourOrder')}</h2>
          <ul className="mt-3 border-t border-ink">
            {lines.map((line) => (
              <li key={line.sku} className="flex justify-between gap-4 border-b border-line py-2">
                <span>
                  {line.quantity} × {line.name}
                </span>
                <span>{format.money(line.lineCents, currency)}</span>
              </li>
            ))}
          </ul>
          <div className="mt-5">
            <Sums {...data} />
          </div>
          <p className="mt-3 text-sm text-soft">
            {t('basket:days', { from: data.deliveryDaysFrom, to: data.deliveryDaysTo })}
          </p>
          <p className="text-sm text-soft">{t('basket:returnRight')}</p>
          <p className="mt-3">
            <Link to="/basket" className="quiet-link">
              {t('backToBasket')}
            </Link>
          </p>
          {!data.canOrder && (
            <Notice tone="stop" title={t('basket:notYet.title')} className="mt-5">
              {t('basket:notYet.text')}
            </Notice>
          )}
          <Notice tone="caution" title={t('caution.title')} className="mt-5">
            {t('caution.text')}
          </Notice>
        </aside>
      </div>
    </Sheet>
  )
}
