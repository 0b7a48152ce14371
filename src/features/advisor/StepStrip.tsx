import { useTranslation } from 'react-i18next'
import type { Draft } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { steps, type Step } from './steps.ts'

interface StepStripProps {
  step: Step
  draft: Draft
  massKnown: boolean
  onGo: (step: Step) => void
}

/** The four answers as the boxes of a drawing's title block: what is answered stands there in red and leads back to its question. */
export function StepStrip({ step, draft, massKnown, onGo }: StepStripProps) {
  const { t } = useTranslation('advisor')
  const format = useFormat()
  const { ride, brakes, tyre } = draft
  const said: Record<Step, string | null> = {
    ride: ride ? t(`ride.${ride}.label`) : null,
    brakes: brakes ? t(`fitting.short.${brakes}`) : null,
    tyre:
      tyre === undefined
        ? null
        : tyre === null
          ? t('fitting.short.unknown')
          : tyre.frontWidthMm === tyre.rearWidthMm
            ? format.width(tyre.frontWidthMm).text
            : `${format.width(tyre.frontWidthMm).value} / ${format.width(tyre.rearWidthMm).text}`,
    // The number itself stays in its own box.
    mass: massKnown ? t('fitting.short.massKnown') : null,
  }
  return (
    <nav aria-label={t('fitting.stepsLabel')}>
      <ol className="grid grid-cols-4 border border-strong text-[0.8125rem]">
        {steps.map((one, index) => {
          const here = one === step
          const box = (
            <>
              <span className="block text-xs text-soft">
                {index + 1} {t(`fitting.steps.${one}`)}
              </span>
              <span
                className={`block truncate font-semibold max-sm:sr-only ${said[one] === null ? 'text-soft' : 'text-own'}`}
              >
                {said[one] ?? t('fitting.open')}
              </span>
            </>
          )
          return (
            <li
              key={one}
              className={`relative min-w-0 border-line not-first:border-s ${here ? 'bg-ground' : ''}`}
              aria-current={here ? 'step' : undefined}
            >
              <span
                aria-hidden
                className={`absolute inset-x-0 -bottom-px h-[3px] ${here ? 'bg-ink' : said[one] !== null ? 'bg-own' : ''}`}
              />
              {here || said[one] === null ? (
                <span className="block px-2.5 py-2">{box}</span>
              ) : (
                <button
                  type="button"
                  className="block w-full px-2.5 py-2 text-start hover:bg-own-wash"
                  onClick={() => {
                    onGo(one)
                  }}
                >
                  {box}
                </button>
              )}
            </li>
          )
        })}
      </ol>
    </nav>
  )
}
