import type { ReactNode } from 'react'
import type { Ride } from '#contract/advisor.ts'

/** What tells one ride from another at this size: tyres, bars, ground, load, slope. One bike underneath them all. */
interface Look {
  tyre?: 'slim' | 'wide' | 'knobbly'
  bars: 'drop' | 'aero' | 'upright' | 'flat'
  /** Degrees; uphill is negative. */
  slope?: number
  rear?: 'disc'
  ground: ReactNode
  load?: ReactNode
}

const level = <path d="M3 29.2H53" />
const looks: Record<Ride, Look> = {
  'road-fast': { bars: 'drop', ground: <path d="M3 29.2H53M1 12h8M3 16.5h4M1 21h4" /> },
  'road-long': { bars: 'drop', ground: <path d="M3 29.2H53M1 13q6-7 12 0M43 8.5q5-5 10 1" opacity="0.85" /> },
  climbing: { bars: 'drop', slope: -13, ground: level },
  'time-trial': { bars: 'aero', rear: 'disc', ground: level },
  cyclocross: {
    tyre: 'knobbly',
    bars: 'drop',
    ground: <path d="M3 29.2H53M27 29v-5M30 29v-5M25.6 24h5.8" />,
  },
  gravel: {
    tyre: 'wide',
    bars: 'drop',
    ground: (
      <path d="M4 29.6h.1M9 30.4h.1M14 29.6h.1M20 30.4h.1M26 29.6h.1M32 30.4h.1M38 29.6h.1M44 30.4h.1M50 29.6h.1" />
    ),
  },
  bikepacking: {
    tyre: 'wide',
    bars: 'drop',
    ground: level,
    load: (
      <>
        <path d="M22 7.6 9.5 5.2 8.6 9.6 21 12Z" />
        <path d="M24.8 13.2H34L29 18.6 26.4 18Z" fill="currentColor" stroke="none" opacity="0.55" />
        <circle cx="42.4" cy="8.4" r="3.4" />
      </>
    ),
  },
  commute: {
    bars: 'upright',
    ground: level,
    load: (
      <>
        <path d="M9 12.6h12" />
        <path d="M10.5 12.6h8v6.2h-8Z" fill="var(--sheet, none)" />
      </>
    ),
  },
  'cross-country': { tyre: 'knobbly', bars: 'flat', ground: <path d="M3 29.4h9l3-1.2 4 1.2h9l4-1.4 3 1.4h18" /> },
  trail: { tyre: 'knobbly', bars: 'flat', slope: 12, ground: <path d="M3 29.4h9l3-1.6 4 1.6h13l3-1.8 4 1.8h14" /> },
}

const bars: Record<Look['bars'], string> = {
  drop: 'M36.4 8.6h4.4q2.8 0 2.8 2.3t-2.8 2.3',
  aero: 'M35.6 9.2H46M46 9.2l1.6-1.6',
  upright: 'M36.2 9 35 5.2H30.6',
  flat: 'M36 8 39 6.6',
}

/** A bike of a few strokes on the ground it is meant for: ten of one family, drawn for this product. */
export function RidePicture({ ride, className }: { ride: Ride; className?: string }) {
  const { tyre = 'slim', slope = 0, rear, ground, load, bars: bar } = looks[ride]
  return (
    <svg
      aria-hidden
      focusable="false"
      viewBox="0 0 56 32"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      <g transform={slope === 0 ? undefined : `rotate(${slope} 28 29)`}>
        {ground}
        <Wheel x={15} tyre={tyre} filled={rear === 'disc'} />
        <Wheel x={41} tyre={tyre} />
        <path d="M15 21.4 22.6 11.2 36.6 10.6 27 21.4H15M22.6 11.2 27 21.4M36 8.8 41 21.4" />
        <path d={bars[bar]} />
        <path d="M22.6 11.2 21.8 8.8M19.4 8.6h5.2" />
        {load}
      </g>
    </svg>
  )
}

function Wheel({ x, tyre, filled = false }: { x: number; tyre: NonNullable<Look['tyre']>; filled?: boolean }) {
  return (
    <>
      {filled && <circle cx={x} cy="21.4" r="7" fill="currentColor" opacity="0.28" stroke="none" />}
      <circle cx={x} cy="21.4" r="7" strokeWidth={tyre === 'slim' ? 1.5 : 2.4} />
      {tyre === 'knobbly' && <circle cx={x} cy="21.4" r="8.5" strokeWidth="1.2" strokeDasharray="0.9 2.2" />}
    </>
  )
}
