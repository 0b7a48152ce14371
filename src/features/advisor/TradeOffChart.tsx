import { useTranslation } from 'react-i18next'
import { scaleLinear } from 'd3-scale'
import { area, curveMonotoneX, line } from 'd3-shape'
import { useLayoutEffect, useRef, useState } from 'react'
import type { Advice } from '#contract/advisor.ts'
import { Button } from '../../ui/Button.tsx'
import { useAdviceWords } from './words.ts'

type Point = Advice['tradeOff'][number]
const HEIGHT = 250
const EDGE = { top: 30, right: 40, bottom: 40, left: 30 }

/** How far past the advised range the title looks, mm: the next size or so of rim. */
const PAST_MM = 15

/** What depth gains and what it costs, on one page: watts on the left with their band, a gust's moment on the right. */
export function TradeOffChart({ advice }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const [table, setTable] = useState(false)
  const { tradeOff: points, rimDepthMm: advised, reasons } = advice
  if (points.length < 3 || !advised) return null
  const { to } = advised.front
  const inside = nearest(points, to)
  const past = points.find(({ depthMm }) => depthMm >= to + PAST_MM) ?? points.at(-1)
  const speed = reasons.tradeOff?.inputs.flatSpeedKmh
  const title =
    past && past.depthMm > inside.depthMm
      ? t('findings.tradeOff.title', {
          from: inside.depthMm,
          to: past.depthMm,
          watts: format.number(past.wattsSaved - inside.wattsSaved, 1),
          gust: format.number((past.gustMomentNm / inside.gustMomentNm - 1) * 100),
        })
      : t('findings.tradeOff.titleTop', { watts: format.number(inside.wattsSaved, 1) })
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
      {table ? <Table points={points} /> : <Drawing points={points} advised={advised.front} label={title} />}
      <p className="mt-2 text-[0.8125rem] leading-snug text-soft">
        {t('findings.tradeOff.note', { speed: typeof speed === 'number' ? format.number(speed) : '' })}
      </p>
    </section>
  )
}

const nearest = (points: readonly Point[], depthMm: number): Point =>
  points.reduce((best, one) => (Math.abs(one.depthMm - depthMm) < Math.abs(best.depthMm - depthMm) ? one : best))

interface DrawingProps {
  points: readonly Point[]
  advised: { from: number; to: number }
  label: string
}

function Drawing({ points, advised, label }: DrawingProps) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const { ref, width } = useWidth(520)
  const depths = points.map(({ depthMm }) => depthMm)
  const [least, most] = [Math.min(...depths), Math.max(...depths)]
  const x = scaleLinear([least, most], [EDGE.left, width - EDGE.right])
  const bottom = HEIGHT - EDGE.bottom
  const watts = scaleLinear([0, Math.max(1, ...points.map(({ wattsHigh }) => wattsHigh))], [bottom, EDGE.top]).nice(4)
  const gust = scaleLinear(
    [0, Math.max(...points.map(({ gustMomentNm }) => gustMomentNm)) * 1.12],
    [bottom, EDGE.top],
  ).nice(4)
  const path = (y: (one: Point) => number) =>
    line<Point>((one) => x(one.depthMm), y).curve(curveMonotoneX)([...points]) ?? ''
  const band =
    area<Point>()
      .x((one) => x(one.depthMm))
      .y0((one) => watts(one.wattsLow))
      .y1((one) => watts(one.wattsHigh))
      .curve(curveMonotoneX)([...points]) ?? ''
  // A range of one depth is still a stripe one can see.
  const from = Math.max(EDGE.left, x(advised.from) - (advised.from === advised.to ? 4 : 0))
  const stripe = Math.max(8, Math.min(x(advised.to), width - EDGE.right) - from)
  const ticks = spaced(
    [...new Set([least, advised.from, advised.to, ...depths])],
    [advised.from, advised.to, least, most],
    x,
  )
  const near = points.at(-2) ?? points.at(-1)
  const last = points.at(-1)
  return (
    <div ref={ref} className="mt-2">
      <svg
        role="img"
        aria-label={label}
        viewBox={`0 0 ${width} ${HEIGHT}`}
        width={width}
        height={HEIGHT}
        className="block max-w-full text-[13px] tabular-nums"
      >
        <rect x={from} y={EDGE.top - 16} width={stripe} height={bottom - EDGE.top + 16} fill="var(--own-wash)" />
        <text
          x={from + stripe / 2}
          y={EDGE.top - 20}
          textAnchor={from + stripe / 2 < 70 ? 'start' : 'middle'}
          className="fill-own font-[650]"
        >
          {t('findings.tradeOff.advised')}
        </text>
        {watts.ticks(4).map((tick) => (
          <g key={tick}>
            <path d={`M${EDGE.left} ${watts(tick)}H${width - EDGE.right}`} stroke="var(--line)" />
            <text x={EDGE.left - 7} y={watts(tick) + 4.5} textAnchor="end" className="fill-within">
              {format.number(tick, watts.ticks(4).some((one) => !Number.isInteger(one)) ? 1 : 0)}
            </text>
          </g>
        ))}
        {gust.ticks(4).map((tick) => (
          <text key={tick} x={width - EDGE.right + 7} y={gust(tick) + 4.5} className="fill-ink">
            {format.number(tick, 1)}
          </text>
        ))}
        <path d={band} fill="var(--within)" opacity="0.16" />
        <path d={path((one) => watts(one.wattsSaved))} fill="none" stroke="var(--within)" strokeWidth="2.6" />
        <path
          d={path((one) => gust(one.gustMomentNm))}
          fill="none"
          stroke="var(--ink)"
          strokeWidth="2"
          strokeDasharray="6 4"
        />
        {near && (
          <text x={x(near.depthMm)} y={watts(near.wattsLow) + 16} textAnchor="end" className="fill-within font-[650]">
            {t('findings.tradeOff.watts')}
          </text>
        )}
        {last && (
          <text
            x={width - EDGE.right}
            y={gust(last.gustMomentNm) - 12}
            textAnchor="end"
            className="fill-ink font-[650]"
          >
            {t('findings.tradeOff.gust')}
          </text>
        )}
        <path d={`M${EDGE.left} ${bottom}H${width - EDGE.right}`} stroke="var(--line-strong)" />
        {ticks.map((depth) => (
          <g key={depth}>
            <path d={`M${x(depth)} ${bottom}v4`} stroke="var(--line-strong)" />
            <text
              x={x(depth)}
              y={bottom + 18}
              textAnchor="middle"
              className={depth === advised.from || depth === advised.to ? 'fill-own font-[650]' : 'fill-soft'}
            >
              {depth}
            </text>
          </g>
        ))}
        <text x={width - EDGE.right} y={HEIGHT - 4} textAnchor="end" className="fill-soft">
          {t('findings.tradeOff.axis')}
        </text>
      </svg>
    </div>
  )
}

/** As many tick marks as stand apart, the important ones first. */
function spaced(all: readonly number[], important: readonly number[], x: (depth: number) => number): number[] {
  const kept: number[] = []
  for (const depth of [...important, ...all])
    if (all.includes(depth) && kept.every((other) => Math.abs(x(other) - x(depth)) >= 26)) kept.push(depth)
  return kept
}

function Table({ points }: { points: readonly Point[] }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  return (
    <div className="mt-3 overflow-x-auto">
      <table className="w-full text-sm tabular-nums">
        <caption className="sr-only">{t('findings.tradeOff.table')}</caption>
        <thead>
          <tr className="border-b border-ink text-end text-soft">
            {(['depth', 'saved', 'band', 'moment', 'climb'] as const).map((column) => (
              <th key={column} scope="col" className="py-1.5 ps-3 text-end font-medium first:ps-0 first:text-start">
                {t(`findings.tradeOff.${column}`)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {points.map((one) => (
            <tr key={one.depthMm} className="border-b border-line">
              <th scope="row" className="py-1.5 text-start font-semibold">
                {one.depthMm}
              </th>
              <td className="py-1.5 ps-3 text-end">{format.number(one.wattsSaved, 1)}</td>
              <td className="py-1.5 ps-3 text-end whitespace-nowrap">
                {format.number(one.wattsLow, 1)}–{format.number(one.wattsHigh, 1)}
              </td>
              <td className="py-1.5 ps-3 text-end">{format.number(one.gustMomentNm, 2)}</td>
              <td className="py-1.5 ps-3 text-end">{format.number(one.climbSecondsPer10Km, 1)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}

/** Width of the chart's own box, so that its words keep their size on a phone. */
function useWidth(fallback: number) {
  const ref = useRef<HTMLDivElement>(null)
  const [width, setWidth] = useState(fallback)
  useLayoutEffect(() => {
    const box = ref.current
    if (!box) return
    const measure = () => {
      if (box.clientWidth > 0) setWidth(box.clientWidth)
    }
    measure()
    if (typeof ResizeObserver === 'undefined') return
    const watch = new ResizeObserver(measure)
    watch.observe(box)
    return () => {
      watch.disconnect()
    }
  }, [])
  return { ref, width }
}
