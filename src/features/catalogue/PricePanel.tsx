import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { marketsQuery } from '../../lib/wheelsets.ts'
import { stockWord } from './wheel-rows.ts'

/** Price with its tax in words, delivery, and whether there is one. */
export function PricePanel({ set }: { set: Wheelset }) {
  const { t, i18n } = useTranslation('catalogue')
  const format = useFormat()
  const { currency, market: code } = usePreferences()
  const { data } = useQuery(marketsQuery())
  const market = data?.items.find((one) => one.code === code)
  const price = set.prices[currency]
  const country = new Intl.DisplayNames([i18n.language], { type: 'region' }).of(code) ?? code
  return (
    <div>
      <p className="text-sm text-soft">{t('wheelset.price')}</p>
      <p className="flex flex-wrap items-baseline gap-x-3">
        <span className="figure text-3xl">{price === undefined ? '–' : format.money(price, currency)}</span>
        {market && (
          <span className="text-sm text-soft">
            {market.taxIncluded
              ? t('wheelset.taxIn', { percent: format.percent(market.vatPercent / 100, 1) })
              : t('wheelset.taxOut')}
          </span>
        )}
      </p>
      <p className="mt-1.5 text-sm">
        <span className="font-[650]">{t(`stock.${stockWord(set)}`, { count: set.available })}.</span>{' '}
        <span className="text-soft">
          {market &&
            t('wheelset.delivery', {
              country,
              price: format.money(market.deliveryCents, market.currency),
              from: market.deliveryDaysFrom,
              to: market.deliveryDaysTo,
            })}
        </span>
      </p>
    </div>
  )
}
