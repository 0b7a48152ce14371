import { useTranslation } from 'react-i18next'
import { useQuery } from '@tanstack/react-query'
import type { Advice, RiderAnswers } from '#contract/advisor.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { TitleBlock } from '../../ui/Sheet.tsx'
import { WheelDrawing } from '../../ui/WheelDrawing.tsx'
import { drawn } from '../../lib/drawn.ts'
import { wheelsetsQuery } from '../../lib/wheelsets.ts'
import { useAdviceWords } from './words.ts'

/** The rear wheel of the first-ranked wheelset, from its own data and with the rider's tyre, in its title block. */
export function DrawnFirst({ advice, answers }: { advice: Advice; answers: RiderAnswers }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const { language } = usePreferences()
  const { data } = useQuery(wheelsetsQuery({ lng: language }))
  const first = advice.wheelsets.find(({ rank }) => rank === 1)
  const set = data?.items.find(({ sku }) => sku === first?.sku)
  if (!first || !set) return first ? <div aria-hidden className="aspect-square" /> : null
  const wheel = { ...drawn(set, 'rear'), ...(answers.tyre ? { tyreWidthMm: answers.tyre.rearWidthMm } : {}) }
  return (
    <figure>
      <figcaption className="text-sm leading-snug">
        <span className="block font-[650]">{t('findings.drawn.caption')}</span>
        <span className="text-soft">
          {t('findings.drawn.facts', {
            size: set.beadSeatMm,
            tyre: format.width(wheel.tyreWidthMm).text,
            spokes: set.rear.spokeCount,
          })}
        </span>
      </figcaption>
      <WheelDrawing
        wheel={wheel}
        label={t('findings.drawn.label', {
          name: set.name,
          depth: set.rear.depthMm,
          spokes: set.rear.spokeCount,
          tyre: format.width(wheel.tyreWidthMm).text,
        })}
        legend={{ drive: t('findings.drawn.drive'), other: t('findings.drawn.other') }}
      />
      <TitleBlock
        className="mt-4"
        items={[
          {
            label: t('findings.drawn.wheel'),
            value: t('findings.drawn.value', { name: set.name, count: set.rear.spokeCount }),
          },
          { label: t('findings.drawn.total'), value: format.mass(advice.systemMassKg, 'up').text, own: true },
          { label: t('findings.drawn.limit'), value: format.mass(first.limitKg, 'down').text },
          { label: t('findings.drawn.rules'), value: advice.rulesVersion.split('+')[0] },
        ]}
      />
    </figure>
  )
}
