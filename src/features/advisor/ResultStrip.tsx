import { useTranslation } from 'react-i18next'
import type { Advice } from '#contract/advisor.ts'
import { Verdict } from '../../ui/Verdict.tsx'
import { standings, useAdviceWords } from './words.ts'

/** The result in one line, so that an answer's effect is seen where it is given. */
export function ResultStrip({ advice, busy }: { advice: Advice; busy: boolean }) {
  const { t } = useTranslation('advisor')
  const { format, start, verdict } = useAdviceWords()
  const { systemMassKg, pressure, rimDepthMm, spokes, wheelsets, outcome } = advice
  const first = wheelsets.find(({ rank }) => rank === 1)
  const outside = outcome === 'out-of-scope'
  const refused = outcome === 'refuse' || outside
  const none = outside ? ('mismatch' as const) : ('over' as const)
  const noneWord = t(outside ? 'findings.strip.outside' : 'findings.strip.refused')
  // Out of scope no number is given that might be taken for advice.
  const items = [
    ...(outside
      ? []
      : [{ label: t('findings.strip.total'), value: format.mass(systemMassKg, 'up').text, own: true, always: true }]),
    ...(pressure && !refused
      ? [
          {
            label: t('findings.strip.pressure'),
            value: `${start(pressure.front).value} / ${start(pressure.rear).value}\u00a0${start(pressure.rear).unit}`,
            always: true,
          },
        ]
      : []),
    ...(rimDepthMm && !refused
      ? [{ label: t('findings.strip.depth'), value: `${rimDepthMm.front.from}–${rimDepthMm.front.to}\u00a0mm` }]
      : []),
    ...(spokes && !refused
      ? [{ label: t('findings.strip.spokes'), value: `${spokes.front.min} / ${spokes.rear.min}` }]
      : []),
  ]
  return (
    <dl
      className={`flex flex-wrap items-center justify-between gap-x-6 gap-y-1 tabular-nums transition-opacity ${busy ? 'opacity-60' : ''}`}
    >
      {items.map(({ label, value, own, always }: { label: string; value: string; own?: boolean; always?: boolean }) => (
        <div key={label} className={always ? '' : 'max-sm:hidden'}>
          <dt className="text-xs leading-tight text-soft">{label}</dt>
          <dd className={`leading-tight font-bold ${own ? 'text-own' : ''}`}>{value}</dd>
        </div>
      ))}
      <div className="max-sm:hidden">
        <dt className="text-xs leading-tight text-soft">{first?.name ?? t('findings.strip.none')}</dt>
        <dd>
          {first ? (
            <Verdict standing={standings[first.verdict]}>{verdict(first)}</Verdict>
          ) : (
            <Verdict standing={none}>{noneWord}</Verdict>
          )}
        </dd>
      </div>
      <div className="sm:hidden">
        <dt className="sr-only">{first?.name ?? t('findings.strip.none')}</dt>
        <dd>
          <Verdict standing={first ? standings[first.verdict] : none}>{first ? verdict(first) : noneWord}</Verdict>
        </dd>
      </div>
    </dl>
  )
}
