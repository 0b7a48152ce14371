import { useTranslation } from 'react-i18next'
import type { ProductWheelset } from '#contract/product-desk.ts'
import { useFormat } from '../../lib/format.ts'

export function PriceHistory({ prices }: { prices: ProductWheelset['priceHistory'] }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  return (
    <table className="w-full text-sm">
      <caption className="sr-only">{t('prices.title')}</caption>
      <tbody>
        {prices.map(({ currency, priceCents, validFrom }, index) => {
          const before = prices.slice(index + 1).find((one) => one.currency === currency)
          return (
            <tr key={`${currency}${validFrom}${String(index)}`} className="border-b border-line">
              <th scope="row" className="py-1 text-start font-medium text-soft">
                {f.time(validFrom)}
              </th>
              <td className="py-1 text-end text-xs text-soft">
                {before &&
                  t('prices.step', { percent: f.percent((priceCents - before.priceCents) / before.priceCents, 1) })}
              </td>
              <td className="py-1 text-end whitespace-nowrap">
                {f.number(priceCents / 100, 2)} <span className="text-xs text-soft">{currency}</span>
              </td>
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}
