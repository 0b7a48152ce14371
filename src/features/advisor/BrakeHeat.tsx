import { useTranslation } from 'react-i18next'
import type { Advice } from '#contract/advisor.ts'
import { useAdviceWords } from './words.ts'
import { WithWorking } from './Working.tsx'

/** Rim brakes only: where carbon and alloy rims end up on the rider's worst descent, on one scale with our limit. */
export function BrakeHeat({ advice: { brakeHeat, reasons } }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  if (!brakeHeat) return null
  const { carbonC, alloyC, limitC, verdict, gradient, lowC, highC } = brakeHeat
  const end = Math.max(carbonC, alloyC, limitC) * 1.08
  const degrees = (celsius: number) => `${format.number(celsius)}\u00a0°C`
  const title = t(`findings.heat.title_${verdict}`, { limit: degrees(limitC) })
  return (
    <section>
      <h2>{title}</h2>
      <div className="mt-3">
        <WithWorking
          label={t('findings.heat.limit', { limit: degrees(limitC) })}
          name={title}
          reasons={[{ key: 'brakeHeat', reason: reasons.brakeHeat }]}
        >
          <ul className="relative mt-2 grid gap-2 text-sm">
            {[
              { name: t('findings.heat.carbon'), at: carbonC },
              { name: t('findings.heat.alloy'), at: alloyC },
            ].map(({ name, at }) => (
              <li key={name} className="grid grid-cols-[8.5rem_minmax(0,1fr)_4.5rem] items-center gap-2">
                <span>{name}</span>
                <span aria-hidden className="relative h-5">
                  <span
                    className={`absolute top-1.5 h-2 ${at > limitC ? 'bg-stop' : 'bg-near/45'}`}
                    style={{ width: `${(at / end) * 100}%` }}
                  />
                  <span className="absolute top-0 h-5 w-0.5 bg-ink" style={{ left: `${(limitC / end) * 100}%` }} />
                </span>
                <span className="text-end font-semibold">{degrees(at)}</span>
              </li>
            ))}
          </ul>
        </WithWorking>
      </div>
      <p className="mt-2 text-sm text-soft">
        {t('findings.heat.text', { gradient: format.percent(gradient) })}
        {lowC !== undefined && highC !== undefined && (
          <> {t('findings.heat.band', { low: format.number(lowC), high: degrees(highC) })}</>
        )}
      </p>
    </section>
  )
}
