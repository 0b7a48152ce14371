import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useParams } from 'react-router-dom'
import type { Wheelset, WheelsetDetail } from '#contract/catalogue.ts'
import { drawn, drawnTyreMm } from '../../lib/drawn.ts'
import { LimitPanel } from '../../features/catalogue/LimitPanel.tsx'
import { useLimitText } from '../../features/catalogue/limit-text.ts'
import { firstOptions, type Options } from '../../features/catalogue/options.ts'
import { OptionsForm } from '../../features/catalogue/OptionsForm.tsx'
import { PricePanel } from '../../features/catalogue/PricePanel.tsx'
import { wheelsetQuery, wheelsetsQuery } from '../../lib/wheelsets.ts'
import { RiderVerdict, useVerdictWord } from '../../features/catalogue/RiderVerdict.tsx'
import { RimPanel } from '../../features/catalogue/RimPanel.tsx'
import { SideBySideToggle } from '../../features/catalogue/SideBySideToggle.tsx'
import { SideBySideTray } from '../../features/catalogue/SideBySideTray.tsx'
import { SpecTable, StructureTable } from '../../features/catalogue/SpecTable.tsx'
import { shortPair, useWheelRows } from '../../features/catalogue/wheel-rows.ts'
import { ApiError } from '../../lib/api.ts'
import { usePutLine } from '../../lib/basket.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFittingVerdicts, useKeptFitting, type WheelsetVerdict } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { useTitle } from '../../lib/title.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet, TitleBlock } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'
import { SideLegend, WheelDrawing } from '../../ui/WheelDrawing.tsx'

/** One wheelset: drawn, in numbers, with what its limit counts, and the way into the basket. */
export function WheelsetPage() {
  const { t } = useTranslation('catalogue')
  const { slug = '' } = useParams()
  const { language } = usePreferences()
  const { data: set, error, refetch } = useQuery(wheelsetQuery(slug, language))
  useTitle(set?.name ?? t('range.pageTitle'))
  // An unknown name is a page that is not there: the error page says so.
  if (error instanceof ApiError && error.problem.status === 404) throw error
  return (
    <Sheet>
      {error ? (
        <ErrorNotice error={error} onRetry={() => void refetch()} className="m-5 md:m-9" />
      ) : set ? (
        <Page key={set.sku} set={set} />
      ) : (
        <Waiting label={t('range.waiting')} rows={7} className="p-5 md:p-9" />
      )}
    </Sheet>
  )
}

function Page({ set }: { set: WheelsetDetail }) {
  const { t } = useTranslation('catalogue')
  const { language } = usePreferences()
  const verdicts = useFittingVerdicts()
  const verdict = verdicts?.get(set.sku) ?? null
  const { data: range } = useQuery(wheelsetsQuery({ lng: language }))
  return (
    <>
      <div className="grid lg:grid-cols-[minmax(0,1.55fr)_minmax(0,1fr)]">
        <div className="min-w-0 border-line px-5 pt-6 pb-7 md:px-9 lg:border-e">
          <Link to="/range" className="quiet-link inline-flex min-h-11 items-center text-sm">
            {t('wheelset.back')}
          </Link>
          <h1 className="mt-1">{set.name}</h1>
          <p className="text-lg text-soft">{set.tagline}</p>
          <Drawings set={set} />
          <p className="mt-5 max-w-[62ch]">{set.description}</p>
          <PairFacts set={set} />
        </div>
        <div className="min-w-0 px-5 pb-7 max-lg:border-t max-lg:border-line max-lg:pt-6 md:px-9 lg:ps-8 lg:pt-10">
          <Numbers set={set} verdict={verdict} />
          <div className="mt-6 border-t border-ink pt-4">
            <PricePanel set={set} />
          </div>
          <div className="mt-6 border-t border-line pt-5">
            <Buying set={set} verdict={verdict} />
          </div>
          <div className="mt-3">
            <SideBySideToggle slug={set.slug} name={set.name} />
          </div>
        </div>
      </div>
      <LimitPanel set={set} verdict={verdict} />
      <RimPanel set={set} />
      <section aria-labelledby="spec" className="border-t border-ink px-5 py-7 md:px-9">
        <h2 id="spec" className="mb-4">
          {t('wheelset.spec')}
        </h2>
        <div className="grid gap-x-12 gap-y-6 lg:grid-cols-[minmax(0,2.1fr)_minmax(0,1fr)] lg:items-start">
          <SpecTable set={set} />
          <Notice tone="caution" title={t('wheelset.cautionsTitle')}>
            <p>{t('wheelset.cautions')}</p>
          </Notice>
        </div>
      </section>
      {set.structure.front && set.structure.rear && (
        <section aria-labelledby="structure" className="border-t border-ink px-5 py-7 md:px-9">
          <h2 id="structure">{t('structure.title')}</h2>
          <p className="mt-1 mb-4 max-w-[70ch] text-sm text-soft">{t('structure.text')}</p>
          <div className="lg:max-w-[68%]">
            <StructureTable set={set} />
          </div>
        </section>
      )}
      <SideBySideTray sets={range?.items ?? [set]} />
    </>
  )
}

function Drawings({ set }: { set: Wheelset }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const { lacing } = useWheelRows()
  return (
    <figure className="mt-2">
      <div className="grid grid-cols-2 gap-x-4 sm:gap-x-6">
        {(['front', 'rear'] as const).map((position) => {
          const wheel = set[position]
          const depth = format.depth(wheel.depthMm).text
          return (
            <div key={position}>
              <p className="mt-4 text-sm">
                <span className="font-[650]">{t(`drawing.${position}`)}</span>
                <span className="block text-[0.8125rem] text-soft">
                  {t('drawing.caption', { size: set.beadSeatMm, tyre: format.width(drawnTyreMm(wheel)).text })}
                </span>
              </p>
              <WheelDrawing
                wheel={drawn(set, position)}
                dimension={depth}
                label={t(`drawing.wheel_${position}`, {
                  name: set.name,
                  depth,
                  spokes: wheel.spokeCount,
                  lacing: lacing(wheel),
                })}
              />
            </div>
          )
        })}
      </div>
      <figcaption>
        <SideLegend drive={t('drawing.drive')} other={t('drawing.other')} />
        <TitleBlock
          className="mt-5"
          items={[
            { label: t('wheelset.drawn'), value: t('wheelset.drawnValue', { name: set.name }) },
            { label: t('wheelset.code'), value: set.sku },
            { label: t('wheelset.build'), value: t(`wheelset.builds.${set.buildKind}`) },
            { label: t('wheelset.size'), value: `${set.beadSeatMm}\u00a0mm` },
          ]}
        />
        <p className="mt-1.5 text-xs text-soft">{t('wheelset.invented')}</p>
      </figcaption>
    </figure>
  )
}

/** The numbers that decide, large; the caution stands beside the limit. */
function Numbers({ set, verdict }: { set: Wheelset; verdict: WheelsetVerdict | null }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const limit = useLimitText()(set.limitKg)
  const { front, rear } = set
  const figures = [
    { label: t('facts.depth'), value: shortPair(front.depthMm, rear.depthMm), unit: 'mm' },
    { label: t('facts.spokes'), value: `${front.spokeCount}/${rear.spokeCount}`, unit: '' },
    { label: t('facts.mass'), value: format.number(set.massG), unit: 'g' },
  ]
  return (
    <>
      <dl className="grid grid-cols-[auto_auto_auto] gap-x-3">
        <div className="col-span-3 border-t border-ink py-3">
          <dt className="text-sm text-soft">{t('facts.limit')}</dt>
          <dd className="mt-1 flex flex-wrap items-baseline gap-x-3">
            <span>
              <span className="figure text-5xl">{limit.value}</span>{' '}
              <span className="ms-1 text-lg font-semibold text-soft">{limit.unit}</span>
            </span>
            {verdict && (
              <span>
                <span className="sr-only">{t('verdict.yours')}</span>
                <RiderVerdict verdict={verdict} />
              </span>
            )}
          </dd>
        </div>
        {figures.map(({ label, value, unit }) => (
          <div key={label} className="order-last border-t border-line pt-2.5">
            <dt className="text-sm text-soft">{label}</dt>
            <dd className="whitespace-nowrap">
              <span className="figure text-[1.625rem] xl:text-3xl">{value}</span>{' '}
              <span className="ms-0.5 text-sm font-semibold text-soft">{unit}</span>
            </dd>
          </div>
        ))}
        <div className="col-span-3 pb-3">
          <dt className="sr-only">{t('wheelset.cautionsTitle')}</dt>
          <dd className="border-s-[3px] border-near bg-near-wash px-3 py-2 text-sm">{t('wheelset.limitCaution')}</dd>
        </div>
      </dl>
    </>
  )
}

/** Options and basket, or, where the fitting rules it out, the sum and a way on. */
function Buying({ set, verdict }: { set: Wheelset; verdict: WheelsetVerdict | null }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const limitText = useLimitText()
  const word = useVerdictWord()
  const { answers, address } = useKeptFitting()
  const { put, pending, error } = usePutLine()
  const [done, setDone] = useState(false)
  const findings = (
    <ButtonLink kind="plain" className="mt-3" to={`/findings?${address}`}>
      {t('range.toFindings')}
    </ButtonLink>
  )
  if (verdict?.verdict === 'over-limit') {
    const over = format.mass(-verdict.marginKg, 'up').text
    return (
      <Notice title={t('wheelset.stopOver', { over })}>
        <p>
          {t('wheelset.stopOverText', {
            total: format.mass(verdict.limitKg - verdict.marginKg, 'up').text,
            limit: limitText(verdict.limitKg).text,
          })}
        </p>
        {findings}
      </Notice>
    )
  }
  if (verdict?.verdict === 'mismatch' || verdict?.verdict === 'pressure') {
    return (
      <Notice title={t('wheelset.stopMismatch', { rule: word(verdict) })}>
        <p>{t('wheelset.stopMismatchText')}</p>
        {findings}
      </Notice>
    )
  }
  if (set.available === 0) return <p className="font-[650]">{t('wheelset.soldOut')}</p>
  const onPut = async (options: Options) => {
    setDone(false)
    try {
      await put({ sku: set.sku, options, quantity: 1 })
      setDone(true)
    } catch {
      // `error` holds it, and stands below the button.
    }
  }
  return (
    <>
      <OptionsForm
        set={set}
        initial={firstOptions(set, answers?.bike ?? {})}
        busy={pending}
        onPut={(options) => void onPut(options)}
      />
      <div role="status" className="mt-3 empty:hidden">
        {done && (
          <Notice tone="good" title={t('wheelset.putDone', { name: set.name })}>
            <Link to="/basket" className="font-[650]">
              {t('wheelset.toBasket')}
            </Link>
          </Notice>
        )}
      </div>
      {error ? <ErrorNotice error={error} className="mt-3" /> : null}
    </>
  )
}

/** What holds for the pair as a whole. */
function PairFacts({ set }: { set: Wheelset }) {
  const { t } = useTranslation(['catalogue', 'advisor'])
  const format = useFormat()
  const facts = [
    { label: t('wheelset.rides'), value: format.list(set.rides.map((ride) => t(`advisor:ride.${ride}.label`))) },
    { label: t('row.brake'), value: t(`value.${set.brake}`) },
    {
      label: t('wheelset.condition'),
      value: t(`wheelset.conditions.${set.useCondition}`),
      more: t('wheelset.conditionCode', { number: set.useCondition }),
    },
    { label: t('wheelset.assist'), value: t(set.assistRated ? 'wheelset.assistYes' : 'wheelset.assistNo') },
  ]
  return (
    <dl className="mt-6 grid border-t border-line grid-cols-2 gap-x-4 text-[0.9375rem] sm:gap-x-6">
      {facts.map(({ label, value, more }) => (
        <div key={label} className="border-b border-line py-2.5">
          <dt className="text-sm text-soft">{label}</dt>
          <dd className="font-semibold">{value}</dd>
          {more !== undefined && <dd className="text-sm text-soft">{more}</dd>}
        </div>
      ))}
    </dl>
  )
}
