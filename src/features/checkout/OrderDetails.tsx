import { useTranslation } from 'react-i18next'
import type { OrderView } from '#contract/checkout.ts'
import { useFormat } from '../../lib/format.ts'
import { Sums } from '../../lib/Sums.tsx'
import { Verdict } from '../../ui/Verdict.tsx'

const standing = { within: 'within', 'no-margin': 'near', unconfirmed: 'mismatch' } as const

/** Lines, money, address, what happened, mails: everything the buyer has a right to see of an order. */
export function OrderDetails({ order }: { order: OrderView }) {
  const { t, i18n } = useTranslation(['checkout', 'account'])
  const format = useFormat()
  const { delivery, money, currency } = order
  const country = new Intl.DisplayNames([i18n.language], { type: 'region' }).of(delivery.country)
  return (
    <div className="grid border-t border-ink lg:grid-cols-2">
      <section className="px-5 py-7 md:px-9">
        <h2>{t('order.lines')}</h2>
        <ul className="mt-3 border-t border-ink">
          {order.lines.map((line) => (
            <li key={line.id} className="border-b border-line py-3">
              <p className="flex justify-between gap-4 font-[650]">
                <span>
                  {line.quantity} × {line.title}
                </span>
                <span>{format.money(line.lineCents, currency)}</span>
              </p>
              <p className="text-sm text-soft">
                {Object.values(line.options)
                  .filter((value) => typeof value === 'string')
                  .map((value) => t([`account:bike.values.${value}`, value]))
                  .join(' · ')}
              </p>
              <p className="mt-1.5">
                <Verdict standing={standing[line.limitCheck]}>
                  {t(`order.limit.${line.limitCheck}`, { limit: format.mass(line.limitKg, 'down').text })}
                </Verdict>
              </p>
            </li>
          ))}
        </ul>
        <div className="mt-6">
          <Sums {...money} currency={currency} taxIncluded={order.market !== 'US'} />
        </div>
        <p className="mt-3 text-sm text-soft">{t('basket:returnRight')}</p>
      </section>
      <section className="border-line px-5 py-7 max-lg:border-t md:px-9 lg:border-s">
        <h2>{t('order.history')}</h2>
        <ol className="mt-3 border-t border-ink">
          {order.timeline.map(({ kind, at }) => (
            <li key={kind + at} className="flex justify-between gap-4 border-b border-line py-2">
              <span>{t([`event.${kind}`, 'event.other'])}</span>
              <time dateTime={at} className="text-sm text-soft">
                {format.time(at)}
              </time>
            </li>
          ))}
        </ol>
        <h2 className="mt-7">{t('deliveryTo')}</h2>
        <address className="mt-2 not-italic">
          {[
            delivery.name,
            delivery.line1,
            delivery.line2,
            `${delivery.postcode} ${delivery.city}`,
            delivery.region,
            country,
          ]
            .filter((line) => line !== undefined && line !== '')
            .map((line) => (
              <span key={line} className="block">
                {line}
              </span>
            ))}
        </address>
        <h2 className="mt-7">{t('order.mails')}</h2>
        {order.mails.length === 0 && <p className="mt-2 text-soft">{t('order.noMails')}</p>}
        <ul className="mt-3 border-t border-ink empty:border-0">
          {order.mails.map((mail) => (
            <li key={mail.id} className="border-b border-line">
              <details>
                <summary className="flex flex-wrap justify-between gap-x-4 py-2.5">
                  <span className="underline underline-offset-4">{mail.subject}</span>
                  <span className="text-sm text-soft">
                    {t([`order.mailState.${mail.state}`, mail.state])}, {format.time(mail.at)}
                  </span>
                </summary>
                <p className="border-s-2 border-line pb-3 ps-4 text-sm wrap-anywhere whitespace-pre-line">
                  {mail.text}
                </p>
              </details>
            </li>
          ))}
        </ul>
      </section>
    </div>
  )
}
