import { keepPreviousData, useQuery } from '@tanstack/react-query'
import { useEffect, useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Advice, RiderAnswers } from '#contract/advisor.ts'
import { Balance } from '../../features/advisor/Balance.tsx'
import { BrakeHeat } from '../../features/advisor/BrakeHeat.tsx'
import { DrawnFirst } from '../../features/advisor/DrawnFirst.tsx'
import { FourAnswers } from '../../features/advisor/FourAnswers.tsx'
import { Lede, useHeadline } from '../../features/advisor/Headline.tsx'
import { MassQuestion } from '../../features/advisor/MassQuestion.tsx'
import { Cautions, Notes } from '../../features/advisor/Notes.tsx'
import { Refusal } from '../../features/advisor/Refusal.tsx'
import { ResultStrip } from '../../features/advisor/ResultStrip.tsx'
import { RuledOut } from '../../features/advisor/RuledOut.tsx'
import { Sharpen } from '../../features/advisor/Sharpen.tsx'
import { stepDone, steps } from '../../features/advisor/steps.ts'
import { TensionRing } from '../../features/advisor/TensionRing.tsx'
import { TradeOffChart } from '../../features/advisor/TradeOffChart.tsx'
import { WhatChanges } from '../../features/advisor/WhatChanges.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { adviceQuery, rememberFitting, useFitting, writeDraft, type Mass } from '../../lib/fitting.ts'
import { useTitle } from '../../lib/title.ts'
import { Button, ButtonLink } from '../../ui/Button.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

/** What comes out of a fitting. Everything but the mass stands in the address; each further answer refines the page in place. */
export function FindingsPage() {
  const { t } = useTranslation('advisor')
  const { draft, setDraft, mass, setMass, answers, params } = useFitting()
  const settled = useSettled(answers)
  const { data, error, refetch, isPlaceholderData, isFetching } = useQuery({
    ...adviceQuery(settled ?? { ride: 'road-long', brakes: 'disc', tyre: null }),
    enabled: settled !== null,
    placeholderData: keepPreviousData,
  })
  const headline = useHeadline(data)
  useTitle(data ? headline : t('findings.title'))
  useEffect(() => {
    rememberFitting(draft)
  }, [draft])
  const open = steps.find((one) => one !== 'mass' && !stepDone(one, draft, mass))
  const toFitting = (step: string) => {
    const next = writeDraft(draft, params)
    next.set('step', step)
    return `/fitting?${next.toString()}`
  }

  if (open !== undefined)
    return (
      <Sheet className="px-5 py-10 md:px-9">
        <h1>{t('findings.noAnswers.title')}</h1>
        <p className="mt-2 text-soft">{t('findings.noAnswers.text')}</p>
        <ButtonLink to={toFitting(open)} className="mt-6">
          {t('findings.noAnswers.go')}
        </ButtonLink>
      </Sheet>
    )
  // Once there are findings, a mass being retyped leaves them standing.
  if (answers === null && !data) return <AskMass onGo={setMass} />
  if (error && !data)
    return (
      <Sheet className="px-5 py-10 md:px-9">
        <h1 className="mb-5">{t('findings.title')}</h1>
        <ErrorNotice error={error} onRetry={() => void refetch()} />
      </Sheet>
    )
  const worked = settled ?? answers
  if (!data || !worked)
    return (
      <Sheet className="px-5 py-10 md:px-9">
        <h1 className="mb-5">{t('findings.title')}</h1>
        <Waiting label={t('findings.waiting')} rows={6} />
      </Sheet>
    )
  const busy = isPlaceholderData || answers !== settled || isFetching
  return (
    <Sheet>
      <p className="sr-only" aria-live="polite">
        {busy ? t('findings.updating') : `${t('findings.updated')}: ${headline}`}
      </p>
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} className="m-5 md:m-9" />}
      <div className={busy ? 'opacity-70 transition-opacity motion-reduce:transition-none' : 'transition-opacity'}>
        <Result advice={data} answers={worked} headline={headline} />
      </div>
      {data.outcome !== 'out-of-scope' || mass !== null ? (
        <Sharpen
          advice={data}
          draft={draft}
          setDraft={setDraft}
          mass={mass}
          setMass={setMass}
          summary={<ResultStrip advice={data} busy={busy} />}
        />
      ) : null}
    </Sheet>
  )
}

interface ResultProps {
  advice: Advice
  answers: RiderAnswers
  headline: string
}

function Result({ advice, answers, headline }: ResultProps) {
  const { t } = useTranslation('advisor')
  const first = advice.wheelsets.find(({ rank }) => rank === 1)
  const refused = advice.outcome === 'refuse' || advice.outcome === 'out-of-scope'
  if (refused)
    return (
      <div className="px-5 pt-7 pb-9 md:px-9 md:pt-10">
        <h1 className="max-w-[24ch]">{headline}</h1>
        <Lede answers={answers} figures={false} />
        <div className="mt-6 border-t border-ink pt-6">
          <Refusal advice={advice} banded={answers.bodyMassBandKg !== undefined} />
        </div>
        {advice.outcome === 'refuse' && (
          <div className="mt-9 grid gap-9">
            <Balance advice={advice} />
            <Notes advice={advice} />
            <RuledOut advice={advice} />
          </div>
        )}
      </div>
    )
  return (
    <>
      <div className="grid lg:grid-cols-[minmax(0,1fr)_minmax(0,1.06fr)]">
        <div className="order-1 px-5 pt-7 pb-9 md:px-9 md:pt-10 lg:order-2">
          <h1 className="max-w-[22ch]">{headline}</h1>
          <Lede answers={answers} figures />
          <div className="mt-6">
            <FourAnswers advice={advice} />
          </div>
          <div className="mt-5">
            <Cautions />
          </div>
          <div className="mt-6 flex flex-wrap gap-3 print:hidden">
            {first && <ButtonLink to={`/range/${first.slug}`}>{t('findings.choose', { name: first.name })}</ButtonLink>}
            <ButtonLink kind="plain" to="/range">
              {t('findings.toRange')}
            </ButtonLink>
            <Button
              kind="quiet"
              className="px-0!"
              onClick={() => {
                window.print()
              }}
            >
              {t('findings.print')}
            </Button>
          </div>
          <div className="mt-9">
            <Balance advice={advice} />
          </div>
        </div>
        <div className="order-2 grid content-start gap-9 border-line px-5 pt-7 pb-9 max-lg:border-t md:px-9 lg:order-1 lg:border-e lg:pt-10">
          <DrawnFirst advice={advice} answers={answers} />
          <TensionRing advice={advice} />
          <TradeOffChart advice={advice} />
          <BrakeHeat advice={advice} />
          <Notes advice={advice} />
        </div>
      </div>
      <div className="border-t border-line px-5 py-7 md:px-9">
        <WhatChanges advice={advice} answers={answers} />
      </div>
      <div className="border-t border-line px-5 py-7 md:px-9">
        <RuledOut advice={advice} />
      </div>
    </>
  )
}

/** A shared or reloaded link holds everything but the mass: only that is asked for. */
function AskMass({ onGo }: { onGo: (mass: Mass) => void }) {
  const { t } = useTranslation('advisor')
  const [mass, setMass] = useState<Mass | null>(null)
  const [asked, setAsked] = useState(false)
  return (
    <Sheet className="px-5 py-8 md:px-9 md:py-10">
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          setAsked(true)
          if (mass) onGo(mass)
        }}
      >
        <h1>{t('findings.noMass.title')}</h1>
        <p className="mt-2 mb-6 max-w-[60ch] text-soft">{t('findings.noMass.text')}</p>
        <MassQuestion mass={mass} onChange={setMass} asked={asked} controlName="body-mass" />
        <Button type="submit" className="mt-6">
          {t('findings.noMass.go')}
        </Button>
      </form>
    </Sheet>
  )
}

/** Typing waits for a short rest before it is sent. */
function useSettled(answers: RiderAnswers | null): RiderAnswers | null {
  const [settled, setSettled] = useState(answers)
  useEffect(() => {
    if (answers === null) return
    const timer = setTimeout(() => {
      setSettled(answers)
    }, 250)
    return () => {
      clearTimeout(timer)
    }
  }, [answers])
  return settled
}
