import { useEffect } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { BasketView } from '#contract/basket.ts'
import { marketCodes, type MarketCode } from '#contract/common.ts'
import { BasketLineItem } from '../../features/basket/BasketLineItem.tsx'
import { linesOf, useBasket, usePutLines } from '../../lib/basket.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { usePreferences } from '../../lib/preferences.tsx'
import { Sums } from '../../lib/Sums.tsx'
import { useTitle } from '../../lib/title.ts'
import { Button, ButtonLink } from '../../ui/Button.tsx'
import { Field, Select } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

export function BasketPage() {
  const { t, i18n } = useTranslation('basket')
  const preferences = usePreferences()
  const { data, error, isPending, refetch } = useBasket()
  const put = usePutLines()
  useTitle(t('title'))
  const countries = new Intl.DisplayNames([i18n.language], { type: 'region' })

  // The country was changed after the basket was priced: the same lines are priced again for the new one.
  const stale = data !== undefined && data.basketId !== null && data.market !== preferences.market
  const { mutate, isPending: busy } = put
  useEffect(() => {
    if (stale && !busy && !put.isError) mutate(linesOf(data))
  }, [stale, busy, put.isError, mutate, data])

  if (isPending) return <Waiting label={t('common:waiting')} className="mx-auto max-w-sheet p-5" />
  if (!data) return <ErrorNotice error={error} onRetry={() => void refetch()} className="mx-auto max-w-sheet" />
  const lines = linesOf(data)
  if (lines.length === 0) {
    return (
      <Sheet className="md:max-w-4xl">
        <div className="grid justify-items-start gap-4 px-5 py-14 md:px-10">
          <h1>{t('empty.title')}</h1>
          <p className="max-w-[52ch] text-soft">{t('empty.text')}</p>
          <p className="flex flex-wrap gap-3">
            <ButtonLink to="/fitting">{t('empty.fitting')}</ButtonLink>
            <ButtonLink kind="plain" to="/range">
              {t('empty.range')}
            </ButtonLink>
          </p>
        </div>
      </Sheet>
    )
  }
  const change = (index: number, next: Partial<(typeof lines)[number]>) => {
    mutate(lines.map((line, at) => (at === index ? { ...line, ...next } : line)))
  }
  return (
    <Sheet>
      <div className="px-5 pt-8 md:px-9">
        <h1>{t('title')}</h1>
        {put.error && <ErrorNotice error={put.error} className="mt-4" />}
        {data.heldOrder && <HeldOrder {...data.heldOrder} />}
        {data.problems.length > 0 && (
          <Notice tone="caution" title={t('remains.title')} className="mt-4">
            {data.problems.map(({ code, path }) => (
              <p key={code + path}>{t([`problem.${code}`, 'problem.other'])}</p>
            ))}
            <Button
              kind="plain"
              small
              busy={busy}
              className="mt-2.5"
              onClick={() => {
                mutate(lines)
              }}
            >
              {t('remains.take')}
            </Button>
          </Notice>
        )}
      </div>
      <div className="grid lg:grid-cols-[minmax(0,1fr)_22rem]">
        <ul className="px-5 pb-6 md:px-9" aria-busy={busy}>
          {data.lines.map((line, index) => (
            <BasketLineItem
              key={line.sku}
              line={line}
              currency={data.currency}
              busy={busy}
              onChange={(next) => {
                change(index, next)
              }}
              onRemove={() => {
                mutate(lines.filter((_, at) => at !== index))
              }}
            />
          ))}
        </ul>
        <aside
          className="border-line px-5 py-6 max-lg:border-t md:px-9 lg:border-s lg:px-7"
          aria-label={t('sums.heading')}
        >
          <Field label={t('deliverTo')}>
            {(ids) => (
              <Select
                {...ids}
                value={preferences.market}
                disabled={busy}
                onChange={(event) => {
                  preferences.set({ market: event.target.value as MarketCode })
                }}
              >
                {marketCodes.map((code) => (
                  <option key={code} value={code}>
                    {countries.of(code)}
                  </option>
                ))}
              </Select>
            )}
          </Field>
          <div className="mt-5" aria-live="polite">
            <Sums {...data} />
          </div>
          <p className="mt-3 text-sm text-soft">
            {t('days', { from: data.deliveryDaysFrom, to: data.deliveryDaysTo })}
          </p>
          <p className="text-sm text-soft">{t('returnRight')}</p>
          {data.canOrder ? (
            <ButtonLink to="/checkout" className="mt-5 w-full">
              {t('toTill')}
            </ButtonLink>
          ) : (
            <Notice tone="caution" title={t('notYet.title')} className="mt-5">
              {t('notYet.text')}
            </Notice>
          )}
          <p className="mt-5 border-s-[3px] border-near bg-near-wash px-3.5 py-2.5 text-sm">{t('caution')}</p>
        </aside>
      </div>
    </Sheet>
  )
}

/** The unpaid order that this basket became: its wheels are held, and it can still be paid or left. */
function HeldOrder({ orderNumber, orderUrl }: NonNullable<BasketView['heldOrder']>) {
  const { t } = useTranslation('basket')
  const { pathname, search } = new URL(orderUrl)
  return (
    <Notice title={t('held.title', { number: orderNumber })} className="mt-4">
      <p>{t('held.text')}</p>
      <Link to={pathname + search} className="quiet-link">
        {t('held.open')}
      </Link>
    </Notice>
  )
}
