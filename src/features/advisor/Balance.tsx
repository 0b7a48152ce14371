import { useTranslation } from 'react-i18next'
import { useState } from 'react'
import { Link } from 'react-router-dom'
import type { Advice } from '#contract/advisor.ts'
import { Button } from '../../ui/Button.tsx'
import { Verdict } from '../../ui/Verdict.tsx'
import { standings, useAdviceWords } from './words.ts'

const FEW = 5
/** How far a tipped beam's near end lifts, and the least by which its far end sinks, px. */
const LIFT = 9
const LEAST_SUNK = 3

type Judged = Advice['wheelsets'][number]

/** Every offered wheelset as a beam: the total against its limit. Those just past the limit stand below, tipped. */
export function Balance({ advice }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const [all, setAll] = useState(false)
  const { systemMassKg: totalKg, wheelsets } = advice
  const offered = wheelsets.filter(({ rank }) => rank !== null)
  const over = wheelsets
    .filter(({ verdict }) => verdict === 'over-limit')
    .sort((a, b) => b.limitKg - a.limitKg)
    .slice(0, 3)
  if (offered.length + over.length === 0) return null
  const shown = all ? offered : offered.slice(0, FEW)
  const endKg = Math.max(totalKg, ...[...offered, ...over].map(({ limitKg }) => limitKg)) * 1.015
  const total = format.mass(totalKg, 'up').text
  // What holds for all of them is said once.
  const shared =
    offered.length > 1
      ? (offered[0]?.codes ?? []).filter((code) => offered.every(({ codes }) => codes.includes(code)))
      : []
  return (
    <section>
      <h2>
        {offered.length > 0
          ? t('findings.balance.title', { count: offered.length, total })
          : t('findings.balance.titleNone', { total })}
      </h2>
      <p className="mt-1 text-sm text-soft">{t('findings.balance.text')}</p>
      {shared.length > 0 && (
        <p className="mt-1 text-sm text-soft">
          {t('findings.balance.shared', {
            codes: format.list(shared.map((code) => t([`findings.why.${code}`, 'findings.why.other']))),
          })}
        </p>
      )}
      {offered.length > 0 && (
        <ol className="mt-3 border-t border-line">
          {shown.map((one) => (
            <Row key={one.sku} judged={one} totalKg={totalKg} endKg={endKg} shared={shared} />
          ))}
        </ol>
      )}
      {offered.length > FEW && (
        <Button
          kind="quiet"
          className="mt-1 px-0! text-sm!"
          aria-expanded={all}
          onClick={() => {
            setAll(!all)
          }}
        >
          {all ? t('findings.balance.less') : t('findings.balance.more', { count: offered.length - FEW })}
        </Button>
      )}
      {over.length > 0 && (
        <>
          <h3 className="mt-4">{t('findings.balance.over')}</h3>
          <ul className="mt-2 border-t border-line">
            {over.map((one) => (
              <Row key={one.sku} judged={one} totalKg={totalKg} endKg={endKg} shared={shared} />
            ))}
          </ul>
        </>
      )}
    </section>
  )
}

function Row({
  judged,
  totalKg,
  endKg,
  shared,
}: {
  judged: Judged
  totalKg: number
  endKg: number
  shared: readonly string[]
}) {
  const { t } = useTranslation('advisor')
  const { format, verdict } = useAdviceWords()
  const { name, slug, limitKg, codes, rank, startBar, behindBy, structure, limitFrom = 'system' } = judged
  const over = judged.verdict === 'over-limit'
  const why = [
    ...(behindBy ? [t([`findings.behindBy.${behindBy}`, 'findings.behindBy.other'])] : []),
    ...codes.filter((code) => !shared.includes(code)).map((code) => t([`findings.why.${code}`, 'findings.why.other'])),
    ...(startBar
      ? [
          t('findings.balance.start', {
            front: format.pressure(startBar.front).value,
            rear: format.pressure(startBar.rear).text,
          }),
        ]
      : []),
    ...(structure ? [t('findings.balance.structure', { limit: format.mass(structure.limitKg, 'down').text })] : []),
  ]
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 gap-y-1 border-b border-line py-2.5 sm:grid-cols-[8.5rem_minmax(0,1fr)_9.5rem]">
      <p className="leading-tight">
        <Link to={`/range/${slug}`} className="text-base font-bold no-underline hover:underline">
          {name}
        </Link>
        {rank === 1 && <span className="block text-xs text-soft">{t('findings.balance.first')}</span>}
      </p>
      <Beam
        judged={judged}
        totalKg={totalKg}
        endKg={endKg}
        label={t('findings.balance.row', {
          total: format.mass(totalKg, 'up').text,
          limit: format.mass(limitKg, 'down').text,
          from: t(`option.limitFrom.${limitFrom}`),
        })}
      />
      <p className="text-end max-sm:col-start-2 max-sm:row-start-1">
        <Verdict standing={standings[judged.verdict]}>{verdict(judged)}</Verdict>
      </p>
      {over && limitFrom !== 'system' && (
        <p className="col-span-full text-[0.8125rem] leading-snug text-soft">
          {t('findings.balance.overBy', { from: t(`option.limitFrom.${limitFrom}`) })}
        </p>
      )}
      {!over && why.length > 0 && (
        <p className="col-span-full text-[0.8125rem] leading-snug text-soft">{why.join(' · ')}</p>
      )}
    </li>
  )
}

interface BeamProps {
  judged: Pick<Judged, 'verdict' | 'limitKg'>
  totalKg: number
  endKg: number
  label: string
}

const colours = {
  fits: { fill: 'text-within/30', end: 'bg-within' },
  'no-margin': { fill: 'text-near/35', end: 'bg-near' },
  'over-limit': { fill: 'text-soft/40', end: 'bg-stop' },
  mismatch: { fill: 'text-soft/30', end: 'bg-soft' },
  pressure: { fill: 'text-soft/30', end: 'bg-soft' },
} as const

/**
 * From nothing to the limit, all beams to one scale; the rider's total as a red mark. Past the limit the beam tips over its end:
 * the near side lifts, the total hangs beyond the pivot.
 */
export function Beam({ judged: { verdict, limitKg }, totalKg, endKg, label }: BeamProps) {
  const over = totalKg > limitKg
  const at = (kg: number) => (kg / endKg) * 100
  const { fill, end } = colours[verdict]
  const sunk = over ? Math.max(LEAST_SUNK, (LIFT * (totalKg - limitKg)) / limitKg) : 0
  return (
    <div role="img" aria-label={label} className="relative h-9 max-sm:col-span-2">
      <svg
        aria-hidden
        viewBox="0 0 100 36"
        preserveAspectRatio="none"
        className="absolute inset-0 size-full overflow-visible"
      >
        <g className="[&_*]:[vector-effect:non-scaling-stroke]" stroke="currentColor">
          <path d={`M0 ${17 - (over ? LIFT : 0)}L${at(limitKg)} 17`} className={fill} strokeWidth="8" />
          {over && <path d={`M${at(limitKg)} 17L${at(totalKg)} ${17 + sunk}`} className="text-own" strokeWidth="2" />}
          <path d={`M${at(totalKg)} ${6 + sunk}v22`} className="text-own" strokeWidth="2" />
        </g>
      </svg>
      <span className={`absolute top-[7px] h-5 w-[3px] -translate-x-1/2 ${end}`} style={{ left: `${at(limitKg)}%` }} />
      <svg
        aria-hidden
        viewBox="0 0 10 6"
        className="absolute bottom-0 h-1.5 w-2.5 -translate-x-1/2 text-ink"
        style={{ left: `${at(limitKg)}%` }}
      >
        <path d="M5 0 10 6H0Z" fill="currentColor" />
      </svg>
    </div>
  )
}
