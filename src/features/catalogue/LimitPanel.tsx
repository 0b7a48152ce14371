import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import type { WheelsetVerdict } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { useLimitText } from './limit-text.ts'
import { RiderVerdict } from './RiderVerdict.tsx'

/** What the limit counts, and the rider's own total drawn against it; without a fitting, the way to one. */
export function LimitPanel({ set, verdict }: { set: Wheelset; verdict: WheelsetVerdict | null }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const limit = useLimitText()(set.limitKg).text
  const totalKg = verdict ? verdict.limitKg - verdict.marginKg : null
  const total = totalKg === null ? '' : format.mass(totalKg, 'up').text
  return (
    <section aria-labelledby="limit" className="border-t border-ink px-5 py-7 md:px-9">
      <div className="grid gap-x-12 gap-y-5 lg:grid-cols-[minmax(0,1fr)_minmax(0,1.15fr)]">
        <div>
          <h2 id="limit">{t('wheelset.limitTitle', { limit })}</h2>
          <p className="mt-1.5 max-w-[58ch] text-[0.9375rem] text-soft">{t('wheelset.limitText', { limit })}</p>
          <p className="mt-3 text-sm text-soft">
            <span className="font-[650] text-ink">{t('wheelset.proof')}:</span> {set.limitProof}
          </p>
        </div>
        <div>
          <LimitBeam limitKg={set.limitKg} totalKg={totalKg} limit={limit} total={total} />
          {verdict ? (
            <p className="mt-3 flex flex-wrap items-center gap-x-4 gap-y-1.5">
              <RiderVerdict verdict={verdict} />
              <span className="text-[0.9375rem]">
                {verdict.marginKg < 0
                  ? t('wheelset.limitYoursOver', { total, over: format.mass(-verdict.marginKg, 'up').text })
                  : t('wheelset.limitYours', { total, margin: format.mass(verdict.marginKg, 'down').text })}
              </span>
            </p>
          ) : (
            <div className="mt-4">
              <h3>{t('wheelset.unseenTitle')}</h3>
              <p className="mt-1 mb-3 max-w-[56ch] text-[0.9375rem] text-soft">{t('wheelset.unseenText', { limit })}</p>
              <ButtonLink kind="plain" to="/fitting">
                {t('range.toFitting')}
              </ButtonLink>
            </div>
          )}
        </div>
      </div>
    </section>
  )
}

const parts = ['rider', 'clothes', 'bike', 'bags'] as const
/** The bar reaches a little past the limit, so that a total over it can be seen. */
const REACH = 1.18

/** A bar up to the limit; the rider's total stands on it as a red stroke. Without one, the bar names what counts in it. */
function LimitBeam({
  limitKg,
  totalKg,
  limit,
  total,
}: {
  limitKg: number
  totalKg: number | null
  limit: string
  total: string
}) {
  const { t } = useTranslation('catalogue')
  const reach = Math.max(limitKg * REACH, (totalKg ?? 0) * 1.06)
  const at = (kg: number) => `${(kg / reach) * 100}%`
  return (
    <div
      className="relative h-24 forced-color-adjust-none"
      {...(totalKg === null
        ? { 'aria-hidden': true }
        : { role: 'img', 'aria-label': t('wheelset.limitBeam', { total, limit }) })}
    >
      <div
        className="absolute start-0 top-9 flex h-7 overflow-hidden border border-within bg-within-wash"
        style={{ width: at(limitKg) }}
      >
        {totalKg === null &&
          parts.map((part, index) => (
            <span
              key={part}
              className={`flex items-center px-2.5 text-xs whitespace-nowrap text-ink ${index === 0 ? 'flex-[5]' : 'flex-auto border-s border-dashed border-within'}`}
            >
              {t(`wheelset.parts.${part}`)}
            </span>
          ))}
        {totalKg !== null && (
          <span className="bg-ink/15" style={{ width: `${Math.min(100, (totalKg / limitKg) * 100)}%` }} />
        )}
      </div>
      <div className="absolute top-5 h-15 w-[3px] -translate-x-1/2 bg-within" style={{ left: at(limitKg) }} />
      <span
        className="absolute top-[4.9rem] -translate-x-1/2 text-sm font-[650] whitespace-nowrap text-within"
        style={{ left: at(limitKg) }}
      >
        {limit}
      </span>
      {totalKg !== null && (
        <>
          <div className="absolute top-6 h-13 w-[3px] -translate-x-1/2 bg-own" style={{ left: at(totalKg) }} />
          <span
            className="absolute top-0 -translate-x-1/2 text-sm font-bold whitespace-nowrap text-own"
            style={{ left: at(totalKg) }}
          >
            {total}
          </span>
        </>
      )}
      <div className="absolute inset-x-0 top-16 border-t border-strong" />
    </div>
  )
}
