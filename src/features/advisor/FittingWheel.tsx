import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import type { Draft } from '../../lib/fitting.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { WheelDrawing } from '../../ui/WheelDrawing.tsx'
import { drawn } from '../../lib/drawn.ts'
import { wheelsetsQuery } from '../../lib/wheelsets.ts'

/** How far the answers so far have narrowed the range, and one that is left, drawn with the rider's own tyre. */
export function FittingWheel({ draft, className }: { draft: Draft; className?: string }) {
  const { t } = useTranslation('advisor')
  const { language } = usePreferences()
  const { data } = useQuery(wheelsetsQuery({ lng: language }))
  const { ride, brakes, tyre } = draft
  const made = (data?.items ?? []).filter(
    (set) =>
      (ride === undefined || set.rides.includes(ride)) &&
      (brakes === undefined || set.brake === brakes) &&
      (!tyre || (takes(set, 'front', tyre.frontWidthMm) && takes(set, 'rear', tyre.rearWidthMm))),
  )
  const one = made.find(({ rides }) => rides[0] === ride) ?? made[0]
  if (!one) return null
  const { rear } = one
  return (
    <figure className={className}>
      <figcaption>
        <span className="block text-lg font-bold">
          {t(ride === undefined ? 'fitting.drawn.all' : 'fitting.drawn.made', { count: made.length })}
        </span>
        <span className="text-sm text-soft">{t('fitting.drawn.one', { name: one.name })}</span>
      </figcaption>
      <WheelDrawing
        className="mt-2"
        label={t('fitting.drawn.label', { name: one.name, depth: rear.depthMm, spokes: rear.spokeCount })}
        wheel={{ ...drawn(one, 'rear'), ...(tyre ? { tyreWidthMm: tyre.rearWidthMm } : {}) }}
      />
    </figure>
  )
}

const takes = (set: Wheelset, position: 'front' | 'rear', widthMm: number) =>
  widthMm >= set[position].tyreMinMm && widthMm <= set[position].tyreMaxMm
