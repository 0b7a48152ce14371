import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { tyreSetups } from '#contract/advisor.ts'
import { inToMm, mmToIn } from '#core/units.ts'
import type { Draft } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { Choices } from '../../ui/Choices.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { NumberField } from '../../ui/NumberField.tsx'
import { LEAST_TYRE_MM, MOST_TYRE_MM, usualSetup, usualWidths } from './tyre-widths.ts'
import { SidewallPicture, TyrePicture } from './TyrePicture.tsx'

interface TyreQuestionProps {
  draft: Draft
  onChange: (tyre: Draft['tyre']) => void
  error: string | undefined
}

/** Width from a short list or typed, front and rear apart where they differ; how the tyre is set up; or none of it. */
export function TyreQuestion({ draft, onChange, error }: TyreQuestionProps) {
  const { t } = useTranslation('advisor')
  const format = useFormat()
  const { length } = usePreferences()
  const { tyre } = draft
  const usual = usualWidths[draft.ride ?? 'road-long']
  const setup = tyre?.setup ?? usualSetup(draft)
  const listed = tyre && tyre.frontWidthMm === tyre.rearWidthMm && usual.includes(tyre.frontWidthMm)
  const [other, setOther] = useState(tyre !== undefined && tyre !== null && !listed)
  const [typed, setTyped] = useState({ front: tyre?.frontWidthMm ?? null, rear: tyre?.rearWidthMm ?? null })
  const value = other ? 'other' : tyre === null ? 'unknown' : tyre ? String(tyre.frontWidthMm) : null

  const take = (frontWidthMm: number, rearWidthMm: number) => {
    onChange({ ...(tyre ?? {}), setup, frontWidthMm, rearWidthMm })
  }
  const inRange = (mm: number | null): mm is number => mm !== null && mm >= LEAST_TYRE_MM && mm <= MOST_TYRE_MM
  const type = (change: Partial<typeof typed>) => {
    const next = { ...typed, ...change }
    setTyped(next)
    const rear = next.rear ?? next.front
    if (inRange(next.front) && inRange(rear)) take(next.front, rear)
    else onChange(undefined)
  }
  // Inches are kept as typed to two digits; the sums use millimetres.
  const shown = (mm: number | null) =>
    mm === null ? null : length === 'in' ? Math.round(mmToIn(mm) * 100) / 100 : Math.round(mm * 10) / 10
  const read = (number: number | null) =>
    number === null ? null : length === 'in' ? Math.round(inToMm(number) * 100) / 100 : number
  const outside = (mm: number | null) =>
    mm !== null && !inRange(mm)
      ? t('fitting.tyre.range', {
          from: format.width(LEAST_TYRE_MM, 'up').value,
          to: format.width(MOST_TYRE_MM, 'down').text,
        })
      : undefined
  return (
    <div className="grid gap-6">
      <figure className="border border-line bg-ground/40 px-4 pt-3 pb-2">
        <SidewallPicture marking={`${usual[1] ?? 28}-622`} className="mx-auto block w-full max-w-sm" />
      </figure>
      <Choices
        legend={t('fitting.tyre.title')}
        legendHidden
        name="tyre"
        columns={2}
        value={value}
        error={error}
        onChange={(chosen) => {
          setOther(chosen === 'other')
          if (chosen === 'unknown') onChange(null)
          else if (chosen === 'other') type({})
          else take(Number(chosen), Number(chosen))
        }}
        choices={[
          ...usual.map((mm) => ({
            value: String(mm),
            label: format.width(mm).text,
            ...(mm >= 50 && length === 'mm' ? { hint: `${format.number(mmToIn(mm), 2)}\u00a0in` } : {}),
            picture: <TyrePicture widthMm={mm} className="h-9 w-10 flex-none text-soft" />,
          })),
          { value: 'other', label: t('fitting.tyre.other'), hint: t('fitting.tyre.otherHint') },
          { value: 'unknown', label: t('unknown'), hint: t('fitting.tyre.unknownHint') },
        ]}
      />
      {other && (
        <div className="flex flex-wrap gap-x-5 gap-y-3">
          {(['front', 'rear'] as const).map((position) => (
            <NumberField
              key={position}
              id={`tyre-${position}`}
              className="w-40"
              label={t(`fitting.tyre.${position}`)}
              unit={length}
              value={shown(typed[position])}
              error={outside(typed[position])}
              onChange={(number) => {
                type({ [position]: read(number) })
              }}
            />
          ))}
        </div>
      )}
      {tyre === null && !other && <Notice>{t('fitting.tyre.unknownSaid')}</Notice>}
      {tyre && (
        <div>
          <Choices
            legend={t('fitting.tyre.setup')}
            name="setup"
            columns={3}
            value={tyre.setup}
            onChange={(chosen) => {
              onChange({ ...tyre, setup: chosen })
            }}
            choices={tyreSetups.map((one) => ({
              value: one,
              label: t(`setup.${one}.label`),
              hint: t(`setup.${one}.hint`),
            }))}
          />
          <p className="mt-2 text-sm text-soft">
            {t('fitting.tyre.setupUsual', { usual: t(`setup.${usualSetup(draft)}.label`) })}
          </p>
        </div>
      )}
    </div>
  )
}
