import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import type { Advice, AdviceChanges, RiderAnswers } from '#contract/advisor.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { Waiting } from '../../ui/Waiting.tsx'
import { changesQuery } from './queries.ts'
import { useAdviceWords } from './words.ts'

/** The nearest values at which the advice turns, and the answers that it hangs on most. Asked for once the advice itself is there. */
export function WhatChanges({ advice, answers }: { advice: Advice; answers: RiderAnswers }) {
  const { t } = useTranslation('advisor')
  const { data, error, isPending, refetch } = useQuery(changesQuery(answers, advice.rulesVersion))
  return (
    <section>
      <h2>{t('findings.changes.title')}</h2>
      {isPending ? (
        <Waiting label={t('findings.changes.waiting')} rows={4} />
      ) : error ? (
        <ErrorNotice error={error} onRetry={() => void refetch()} className="mt-3" />
      ) : (
        <div className="mt-2 grid gap-x-12 gap-y-6 lg:grid-cols-[minmax(0,1.4fr)_minmax(0,1fr)]">
          <TippingPoints advice={advice} points={data.tippingPoints} />
          <Influence influence={data.influence} />
        </div>
      )}
    </section>
  )
}

type Point = AdviceChanges['tippingPoints'][number]

function TippingPoints({ advice, points }: { advice: Advice; points: readonly Point[] }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const names = new Map(advice.wheelsets.map(({ sku, name }) => [sku, name]))
  // Rounded away from the rider: what stands here must itself be past the turn.
  const at = ({ input, at: value, direction }: Point) => {
    const rounding = direction === 'up' ? 'up' : 'down'
    if (input === 'tyreWidthMm') return format.width(value, rounding).text
    if (input === 'flatSpeedKmh') return `${format.number(value, 1)}\u00a0km/h`
    return format.mass(value, rounding).text
  }
  const value = (what: Point['changes'][number]['what'], said: string) => {
    if (said === '') return t('findings.changes.nothing')
    if (what === 'first') return names.get(said) ?? said
    if (what === 'outcome') return t(`findings.changes.outcomes.${said}`)
    if (what.startsWith('depth')) return `${said.replace('-', '–')}\u00a0mm`
    return said
  }
  if (points.length === 0) return <p className="text-soft">{t('findings.changes.none')}</p>
  return (
    <div>
      <p className="text-sm text-soft">{t('findings.changes.text')}</p>
      <ul className="mt-2 border-t border-line">
        {points.map((point) => (
          <li key={`${point.input} ${point.direction}`} className="border-b border-line py-2 text-[0.9375rem]">
            <span className="font-[650]">
              {t(`findings.changes.at.${point.input}_${point.direction}`, { at: at(point) })}
            </span>{' '}
            {format.list(
              point.changes.map(({ what, before, after }) =>
                what === 'pressure'
                  ? t('findings.changes.what.pressure')
                  : t(`findings.changes.what.${what}`, {
                      count: Number(after),
                      before: value(what, before),
                      after: value(what, after),
                    }),
              ),
            )}
          </li>
        ))}
      </ul>
    </div>
  )
}

const MOST = 5

function Influence({ influence }: { influence: AdviceChanges['influence'] }) {
  const { t } = useTranslation('advisor')
  const { field } = useAdviceWords()
  const strong = influence.filter(({ score }) => score > 0).slice(0, MOST)
  if (strong.length === 0) return null
  const most = strong[0]?.score ?? 1
  return (
    <div>
      <h3>{t('findings.changes.influence')}</h3>
      <ol className="mt-2 grid gap-2.5 text-sm">
        {strong.map(({ input, score, strongest, assumed }) => (
          <li key={input}>
            <span className="flex justify-between gap-3">
              <span className="font-[650]">{field(input)}</span>
              <span className="text-end text-soft">
                {strongest && t(`findings.changes.part.${strongest}`)}
                {assumed && ` · ${t('findings.changes.assumed')}`}
              </span>
            </span>
            <span aria-hidden className="mt-1 block h-1.5 bg-line">
              <span className="block h-full bg-ink" style={{ width: `${(score / most) * 100}%` }} />
            </span>
          </li>
        ))}
      </ol>
      <p className="mt-2 text-sm text-soft">{t('findings.changes.influenceText')}</p>
    </div>
  )
}
