import { useTranslation } from 'react-i18next'
import type { Currency } from '#contract/common.ts'
import { useFormat } from './format.ts'

interface SumsProps {
  currency: Currency
  goodsCents: number
  deliveryCents: number
  taxCents: number
  /** False where tax and duty are due at the door. */
  taxIncluded: boolean
  totalCents: number
  takenCents?: number
  refundedCents?: number
}

/** What there is to pay, part by part; the same on basket, till and order. */
export function Sums({
  currency,
  goodsCents,
  deliveryCents,
  taxCents,
  taxIncluded,
  totalCents,
  takenCents,
  refundedCents,
}: SumsProps) {
  const { t } = useTranslation('basket')
  const format = useFormat()
  const row = (label: string, value: string, strong = false) => (
    <div
      className={`flex justify-between gap-4 border-b py-2 ${strong ? 'border-ink text-lg font-bold' : 'border-line'}`}
    >
      <dt>{label}</dt>
      <dd>{value}</dd>
    </div>
  )
  return (
    <dl className="border-t border-ink">
      {row(t('sums.goods'), format.money(goodsCents, currency))}
      {row(t('sums.delivery'), format.money(deliveryCents, currency))}
      {row(t('sums.total'), format.money(totalCents, currency), true)}
      {taxIncluded
        ? row(t('sums.taxInside'), format.money(taxCents, currency))
        : row(t('sums.taxAtDoor'), t('sums.atDoor'))}
      {takenCents !== undefined && takenCents > 0 && row(t('sums.taken'), format.money(takenCents, currency))}
      {refundedCents !== undefined &&
        refundedCents > 0 &&
        row(t('sums.refunded'), format.money(refundedCents, currency))}
    </dl>
  )
}
