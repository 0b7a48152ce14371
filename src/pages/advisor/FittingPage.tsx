import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef, useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import { useNavigate } from 'react-router-dom'
import { brakeKinds, rides, type Ride } from '#contract/advisor.ts'
import { BrakePicture } from '../../features/advisor/BrakePicture.tsx'
import { FittingWheel } from '../../features/advisor/FittingWheel.tsx'
import { MassQuestion } from '../../features/advisor/MassQuestion.tsx'
import { useOtherParts } from '../../features/advisor/queries.ts'
import { RidePicture } from '../../features/advisor/RidePicture.tsx'
import { StepStrip } from '../../features/advisor/StepStrip.tsx'
import { readStep, stepDone, steps, type Step } from '../../features/advisor/steps.ts'
import { SumTable } from '../../features/advisor/SumTable.tsx'
import { TyreQuestion } from '../../features/advisor/TyreQuestion.tsx'
import { usualWidths } from '../../features/advisor/tyre-widths.ts'
import { adviceQuery, rememberFitting, useFitting, writeDraft } from '../../lib/fitting.ts'
import { useTitle } from '../../lib/title.ts'
import { Button } from '../../ui/Button.tsx'
import { Choices } from '../../ui/Choices.tsx'
import { ErrorSummary } from '../../ui/ErrorSummary.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'

/** Four questions, one a screen. Which one stands in the address, so do the answers; the mass does not. */
export function FittingPage() {
  const { t } = useTranslation('advisor')
  const { draft, setDraft, mass, setMass, answers, params } = useFitting()
  const navigate = useNavigate()
  const step = readStep(params)
  const index = steps.indexOf(step)
  const title = t(`fitting.${step}.title`)
  useTitle(title)
  const [asked, setAsked] = useState<{ step: Step; time: number } | null>(null)
  const [unknown, setUnknown] = useState<Step | null>(null)
  const wrong = asked?.step === step && !stepDone(step, draft, mass)
  const error = wrong ? t(`fitting.${step}.missing`) : undefined
  const parts = useOtherParts(draft)
  // Worked out while the rider looks at the sum, so that the findings stand at once.
  useQuery({ ...adviceQuery(answers ?? { ride: 'road-long', brakes: 'disc', tyre: null }), enabled: answers !== null })
  const heading = useHeadingFocus(step)

  const go = (to: Step) => {
    setAsked(null)
    setDraft({}, { step: to })
  }
  const next = () => {
    if (!stepDone(step, draft, mass)) {
      setAsked({ step, time: Date.now() })
      return
    }
    const open = steps.find((one) => !stepDone(one, draft, mass))
    if (open === undefined && index === steps.length - 1) {
      rememberFitting(draft)
      const kept = new URLSearchParams(params)
      kept.delete('step')
      void navigate(`/findings?${writeDraft(draft, kept).toString()}`)
    } else go(steps[index + 1] ?? open ?? 'ride')
  }
  const bodyMassKg = !mass ? null : 'bodyMassKg' in mass ? mass.bodyMassKg : mass.bodyMassBandKg.to
  const questions: Record<Step, ReactNode> = {
    ride: (
      <Choices<Ride | 'unknown'>
        legend={title}
        legendHidden
        name="ride"
        columns={2}
        error={error}
        value={unknown === 'ride' && draft.ride === 'road-long' ? 'unknown' : (draft.ride ?? null)}
        onChange={(ride) => {
          setUnknown(ride === 'unknown' ? 'ride' : null)
          setDraft({ ride: ride === 'unknown' ? 'road-long' : ride })
        }}
        choices={[
          ...rides.map((ride) => ({
            value: ride,
            label: t(`ride.${ride}.label`),
            hint: t(`ride.${ride}.hint`),
            picture: <RidePicture ride={ride} className="h-8 w-14 flex-none text-soft" />,
          })),
          { value: 'unknown' as const, label: t('unknown'), hint: t('fitting.ride.unknownHint') },
        ]}
      />
    ),
    brakes: (
      <Choices<'rim' | 'disc' | 'unknown'>
        legend={title}
        legendHidden
        name="brakes"
        error={error}
        value={draft.brakes ?? (unknown === 'brakes' ? 'unknown' : null)}
        onChange={(brakes) => {
          setUnknown(brakes === 'unknown' ? 'brakes' : null)
          setDraft({ brakes: brakes === 'unknown' ? undefined : brakes })
        }}
        choices={[
          ...brakeKinds.toReversed().map((kind) => ({
            value: kind,
            label: t(`brakes.${kind}.label`),
            hint: t(`brakes.${kind}.hint`),
            picture: <BrakePicture kind={kind} className="h-16 w-20 flex-none text-soft" />,
          })),
          { value: 'unknown' as const, label: t('unknown'), hint: t('fitting.brakes.unknownHint') },
        ]}
      />
    ),
    tyre: (
      <TyreQuestion
        key={draft.ride}
        draft={draft}
        error={error}
        onChange={(tyre) => {
          setDraft({ tyre })
        }}
      />
    ),
    mass: <MassQuestion mass={mass} onChange={setMass} asked={wrong} controlName="body-mass" />,
  }
  return (
    <Sheet>
      <div className="grid lg:grid-cols-[minmax(0,1.35fr)_minmax(0,1fr)]">
        <form
          noValidate
          className="px-5 pt-6 pb-8 md:px-9 md:pt-9"
          onSubmit={(event) => {
            event.preventDefault()
            next()
          }}
        >
          <StepStrip step={step} draft={draft} massKnown={mass !== null} onGo={go} />
          <p className="mt-6 text-sm font-[650] text-soft">
            {t('fitting.progress', { step: index + 1, of: steps.length })}
          </p>
          <h1 ref={heading} tabIndex={-1} className="mt-1">
            {title}
          </h1>
          <p className="mt-2 max-w-[60ch] text-soft">
            {t(`fitting.${step}.lede`, { example: `${usualWidths[draft.ride ?? 'road-long'][1] ?? 28}-622` })}
          </p>
          {wrong && (
            <div className="mt-5" key={asked.time}>
              <ErrorSummary
                title={t('fitting.wrong')}
                problems={[{ controlId: step === 'mass' ? 'body-mass' : null, message: error ?? '' }]}
              />
            </div>
          )}
          <div className="mt-6">{questions[step]}</div>
          {step === 'ride' && unknown === 'ride' && draft.ride === 'road-long' && (
            <Notice className="mt-4">{t('fitting.ride.unknownSaid')}</Notice>
          )}
          {step === 'brakes' && unknown === 'brakes' && !draft.brakes && (
            <Notice title={t('fitting.brakes.lookTitle')} className="mt-4">
              <p className="mt-1">{t('fitting.brakes.look')}</p>
              <div className="mt-3 flex flex-wrap gap-2">
                {(['disc', 'rim'] as const).map((kind) => (
                  <Button
                    key={kind}
                    kind="plain"
                    small
                    onClick={() => {
                      setDraft({ brakes: kind })
                    }}
                  >
                    {t(kind === 'disc' ? 'fitting.brakes.lookDisc' : 'fitting.brakes.lookRim')}
                  </Button>
                ))}
              </div>
            </Notice>
          )}
          <div className="sticky bottom-0 z-10 -mx-5 mt-7 flex items-center gap-3 border-t border-line bg-sheet px-5 py-3 md:static md:mx-0 md:border-0 md:px-0 [@media(max-height:30rem)]:static">
            <Button type="submit" className="max-md:flex-1">
              {t(index === steps.length - 1 ? 'fitting.last' : 'fitting.next')}
            </Button>
            {index > 0 && (
              <Button
                kind="plain"
                onClick={() => {
                  go(steps[index - 1] ?? 'ride')
                }}
              >
                {t('fitting.back')}
              </Button>
            )}
          </div>
        </form>
        <aside className="border-line px-5 py-7 max-lg:border-t md:px-9 lg:border-s lg:pt-9">
          <h2>{t('fitting.sum.title')}</h2>
          <p className="mt-1 mb-3 text-sm text-soft">{t('fitting.sum.note')}</p>
          <SumTable
            parts={parts ? { ...parts.parts, bodyMassKg } : null}
            assumed={parts?.assumed ?? []}
            banded={mass !== null && 'bodyMassBandKg' in mass}
          />
          <FittingWheel draft={draft} className="mt-9 hidden lg:block" />
        </aside>
      </div>
    </Sheet>
  )
}

/** The question takes the focus when it changes, so that a screen reader says it; not on the first sight of the page. */
function useHeadingFocus(step: Step) {
  const ref = useRef<HTMLHeadingElement>(null)
  const seen = useRef(step)
  useEffect(() => {
    if (seen.current === step) return
    seen.current = step
    ref.current?.focus({ preventScroll: true })
    window.scrollTo({ top: 0 })
  }, [step])
  return ref
}
