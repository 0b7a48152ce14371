import { Trans, useTranslation } from 'react-i18next'
import type { Advice, RiderAnswers } from '#contract/advisor.ts'
import { decidingNote } from './Refusal.tsx'
import { useAdviceWords } from './words.ts'

/** What the findings come to, in one sentence. */
export function useHeadline(advice: Advice | undefined): string {
  const { t } = useTranslation('advisor')
  const { format, start } = useAdviceWords()
  if (!advice) return t('findings.title')
  const total = format.mass(advice.systemMassKg, 'up').text
  if (advice.outcome === 'out-of-scope') return t('findings.headline.scope')
  if (advice.outcome === 'refuse') {
    const code = decidingNote(advice)?.code
    return t(
      code === 'over-every-limit'
        ? 'findings.headline.over'
        : code === 'none-for-bike'
          ? 'findings.headline.none'
          : code === 'none-for-tyre'
            ? 'findings.headline.tyre'
            : code === 'pressure-not-suitable'
              ? 'findings.headline.pressure'
              : 'findings.headline.pairing',
      { total },
    )
  }
  const { rimDepthMm, pressure, spokes } = advice
  if (!rimDepthMm) return t('findings.title')
  const { from, to } = rimDepthMm.front
  const one = from === to ? 'One' : ''
  if (!pressure) return t(`findings.headline.noPressure${one}`, { from, to, spokes: spokes?.rear.min ?? '' })
  const { value, unit } = start(pressure.rear)
  return t(`findings.headline.full${one}`, { from, to, pressure: `${value}\u00a0${unit}` })
}

/** For whom it was worked out: the rider's own answers in red, everything else said as assumed further down. */
export function Lede({ answers, figures }: { answers: RiderAnswers; figures: boolean }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const { bodyMassKg, bodyMassBandKg, ride, brakes, tyre } = answers
  const mass =
    bodyMassKg !== undefined
      ? format.mass(bodyMassKg).text
      : t('findings.massBand', {
          from: format.mass(bodyMassBandKg?.from ?? 0).value,
          to: format.mass(bodyMassBandKg?.to ?? 0).text,
        })
  const width = (mm: number) => format.width(mm)
  const tyres = tyre
    ? `${tyre.frontWidthMm === tyre.rearWidthMm ? '' : `${width(tyre.frontWidthMm).value} / `}${width(tyre.rearWidthMm).text}, ${t(`setup.${tyre.setup}.label`).toLocaleLowerCase()}`
    : t('findings.tyresUnknown')
  const own = <span className="font-bold text-own" />
  return (
    <p className="mt-3 max-w-[58ch] text-soft">
      <Trans
        t={t}
        i18nKey={tyre ? 'findings.lede' : 'findings.ledeNoTyre'}
        values={{
          mass,
          ride: t(`ride.${ride}.label`).toLocaleLowerCase(),
          brakes: t(`brakes.${brakes}.label`).toLocaleLowerCase(),
          tyres,
        }}
        components={{ own }}
      />{' '}
      {figures && t('findings.ledeWorking')}
    </p>
  )
}
