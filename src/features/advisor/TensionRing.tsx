import { useQuery } from '@tanstack/react-query'
import { scaleLinear } from 'd3-scale'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Advice } from '#contract/advisor.ts'
import type { WheelsetDetail } from '#contract/catalogue.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { wheelsetQuery } from '../../lib/wheelsets.ts'
import { Button } from '../../ui/Button.tsx'
import { useAdviceWords } from './words.ts'

type Structure = NonNullable<WheelsetDetail['structure']['rear']>

interface Spoke {
  /** 0 stands on the road; they count on in the direction of travel. */
  number: number
  drive: boolean
  restingN: number
  loadedN: number
}

/** Tension of every spoke of the first choice's rear wheel, standing under the rider, with the spoke at the road that loses the most. */
export function TensionRing({ advice }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const { language } = usePreferences()
  const [table, setTable] = useState(false)
  const first = advice.wheelsets.find(({ rank }) => rank === 1)
  const { data: set } = useQuery({ ...wheelsetQuery(first?.slug ?? '', language), enabled: first !== undefined })
  const structure = set?.structure.rear
  if (!first || !advice.loads || !structure) return null
  const { rearN } = advice.loads
  const spokes = underLoad(structure, rearN)
  const kept = Math.min(...spokes.map(({ restingN, loadedN }) => loadedN / restingN))
  const slack = kept <= 0
  const title = slack
    ? t('findings.ring.titleSlack')
    : t('findings.ring.title', { kept: format.percent(Math.floor(kept * 100) / 100) })
  return (
    <section>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <h2 className="max-w-[34ch]">{title}</h2>
        <Button
          kind="quiet"
          className="min-h-9! px-0! py-1! text-sm! font-medium!"
          aria-pressed={table}
          onClick={() => {
            setTable(!table)
          }}
        >
          {t(table ? 'common:showDrawing' : 'common:showTable')}
        </Button>
      </div>
      {table ? <Table spokes={spokes} /> : <Drawing spokes={spokes} label={title} />}
      <p className="mt-2 text-[0.8125rem] leading-snug text-soft">
        {t('findings.ring.note', {
          name: first.name,
          load: `${format.number(rearN)}\u00a0N`,
          slack: `${format.number(Math.floor(structure.firstSlackN / 10) * 10)}\u00a0N`,
          times: format.number(structure.firstSlackN / rearN, 1),
        })}
      </p>
    </section>
  )
}

/** Under the spoke, left or right, that leaves the lowest one with the least. */
function underLoad({ tensionN, profile }: Structure, loadN: number): Spoke[] {
  const of = (shares: readonly number[], standing: number) =>
    shares.map((_, number) => {
      // The profile counts from the bottom; a right spoke at the road is spoke 1 of it.
      const spoke = (number + standing) % shares.length
      const drive = spoke % 2 === 1
      const restingN = drive ? tensionN.right : tensionN.left
      return { number, drive, restingN, loadedN: restingN + (shares[spoke] ?? 0) * loadN }
    })
  const [left, right] = [of(profile.underLeft, 0), of(profile.underRight, 1)]
  const least = (spokes: readonly Spoke[]) => Math.min(...spokes.map(({ restingN, loadedN }) => loadedN / restingN))
  return least(left) <= least(right) ? left : right
}

const SIZE = 340
const MIDDLE = SIZE / 2
const INNER = 52
const OUTER = 138
const side = (drive: boolean) =>
  drive ? 'text-ink' : 'text-(--left) forced-colors:text-[LinkText] print:text-[#3b5b7c]'

function Drawing({ spokes, label }: { spokes: readonly Spoke[]; label: string }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const most = Math.max(...spokes.flatMap(({ restingN, loadedN }) => [restingN, loadedN]))
  const radius = scaleLinear([0, most], [INNER, OUTER])
  const at = (spoke: Spoke, newton: number) => {
    const angle = (2 * Math.PI * spoke.number) / spokes.length
    return `${MIDDLE + Math.sin(angle) * radius(newton)} ${MIDDLE + Math.cos(angle) * radius(newton)}`
  }
  const lowest = spokes.reduce((a, b) => (b.loadedN / b.restingN < a.loadedN / a.restingN ? b : a))
  return (
    <div className="mt-2">
      <svg
        role="img"
        aria-label={label}
        viewBox={`0 0 ${SIZE} ${SIZE}`}
        className="mx-auto block w-full max-w-[22rem] text-[13px] tabular-nums"
      >
        <circle cx={MIDDLE} cy={MIDDLE} r={INNER} fill="none" stroke="var(--line-strong)" />
        <text x={MIDDLE} y={MIDDLE + 4.5} textAnchor="middle" className="fill-soft">
          {t('findings.ring.zero')}
        </text>
        {spokes.map((spoke) => (
          <g key={spoke.number} className={side(spoke.drive)} stroke="currentColor">
            <path d={`M${at(spoke, 0)}L${at(spoke, Math.max(0, spoke.loadedN))}`} strokeWidth="4.5" />
            {/* What it holds at rest: where the bar would end. */}
            <path
              d={`M${at(spoke, spoke.restingN - most * 0.006)}L${at(spoke, spoke.restingN + most * 0.006)}`}
              strokeWidth="11"
              opacity="0.55"
            />
          </g>
        ))}
        <path d={`M${MIDDLE - 26} ${MIDDLE + OUTER + 8}h52`} stroke="var(--own)" strokeWidth="2.4" />
        <text x={MIDDLE} y={MIDDLE + OUTER + 24} textAnchor="middle" className="fill-own font-[650]">
          {t('findings.ring.road', { newton: `${format.number(lowest.loadedN)}\u00a0N` })}
        </text>
      </svg>
      <p className="mt-1 flex flex-wrap justify-center gap-x-6 text-sm text-soft">
        {[true, false].map((drive) => (
          <span key={String(drive)} className="inline-flex items-center gap-2">
            <svg
              aria-hidden
              viewBox="0 0 26 4"
              className={`w-6.5 ${side(drive)}`}
              stroke="currentColor"
              strokeWidth="4"
            >
              <path d="M0 2H26" />
            </svg>
            {t(drive ? 'findings.drawn.drive' : 'findings.drawn.other')}
          </span>
        ))}
        <span>{t('findings.ring.rest')}</span>
      </p>
    </div>
  )
}

function Table({ spokes }: { spokes: readonly Spoke[] }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  return (
    <div className="mt-3 overflow-x-auto">
      <table className="w-full text-sm tabular-nums">
        <caption className="sr-only">{t('findings.ring.table')}</caption>
        <thead>
          <tr className="border-b border-ink text-soft">
            {(['spoke', 'side', 'resting', 'loaded'] as const).map((column) => (
              <th key={column} scope="col" className="py-1.5 ps-3 text-end font-medium first:ps-0 first:text-start">
                {t(`findings.ring.${column}`)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {spokes.map(({ number, drive, restingN, loadedN }) => (
            <tr key={number} className="border-b border-line">
              <th scope="row" className="py-1 text-start font-semibold">
                {number + 1}
              </th>
              <td className="py-1 ps-3 text-end">{t(drive ? 'findings.drawn.drive' : 'findings.drawn.other')}</td>
              <td className="py-1 ps-3 text-end">{format.number(restingN)}</td>
              <td className="py-1 ps-3 text-end">{format.number(Math.max(0, loadedN))}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
