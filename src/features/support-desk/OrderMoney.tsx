import { useTranslation } from 'react-i18next'
import type { DeskMoney } from '#contract/support-desk.ts'
import { useFormat } from '../../lib/format.ts'

/** The sums of the order beside the ledger they came to: what was taken, what went back, what is left. */
export function OrderMoney({ money }: { money: DeskMoney }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  const amount = (cents: number) => f.number(cents / 100, 2)
  const sums = [
    ['goods', money.goodsCents],
    ['delivery', money.deliveryCents],
    [money.taxIncluded ? 'taxWithin' : 'taxOnTop', money.taxCents],
  ] as const
  return (
    <div className="grid gap-x-10 gap-y-4 sm:grid-cols-2">
      <dl className="grid content-start">
        {sums.map(([name, cents]) => (
          <div key={name} className="flex justify-between border-b border-line py-1">
            <dt className={name === 'taxWithin' ? 'text-soft' : ''}>{t(`money.${name}`)}</dt>
            <dd className={name === 'taxWithin' ? 'text-soft' : ''}>{amount(cents)}</dd>
          </div>
        ))}
        <div className="flex justify-between border-b border-ink py-1 font-bold">
          <dt>{t('money.total', { currency: money.currency })}</dt>
          <dd>{amount(money.totalCents)}</dd>
        </div>
      </dl>
      <div>
        {money.ledger.length === 0 && money.refunds.length === 0 && (
          <p className="py-1 text-soft">{t('money.nothingMoved')}</p>
        )}
        <ul>
          {money.ledger.map(({ ref, kind, amountCents, createdAt }) => (
            <li key={ref} className="flex justify-between gap-4 border-b border-line py-1">
              <span>
                {t(`money.${kind}`)} <span className="text-soft">{f.time(createdAt)}</span>
                <span className="block text-xs break-all text-soft">{ref}</span>
              </span>
              <span className="whitespace-nowrap">{amount(amountCents)}</span>
            </li>
          ))}
          {money.refunds
            .filter(({ state }) => state !== 'done')
            .map(({ id, state, amountCents, createdAt }) => (
              <li key={id} className="flex justify-between gap-4 border-b border-line py-1 text-near">
                <span>
                  {t(`money.refund.${state}`)} <span className="text-soft">{f.time(createdAt)}</span>
                </span>
                <span className="whitespace-nowrap">{amount(-amountCents)}</span>
              </li>
            ))}
        </ul>
        <p className="flex justify-between border-b border-ink py-1 font-bold">
          <span>{t('money.left', { currency: money.currency })}</span>
          <span>{amount(money.leftToRefundCents)}</span>
        </p>
        {money.refunds.length > 0 && (
          <ul className="mt-2 text-xs text-soft">
            {money.refunds.map(({ id, reason, authorName, amountCents }) => (
              <li key={id}>
                {t('money.refundWhy', {
                  amount: amount(amountCents),
                  reason: authorName === null ? t([`cause.${reason}`, 'cause.other'], { cause: reason }) : reason,
                  name: authorName ?? t('nobody'),
                })}
              </li>
            ))}
          </ul>
        )}
      </div>
    </div>
  )
}
