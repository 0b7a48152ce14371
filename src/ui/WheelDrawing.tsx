import type { ReactNode } from 'react'
import { DrawingFrame } from './DrawingFrame.tsx'
import { WheelLines, type DrawnWheel } from './WheelLines.tsx'
import { wheelRadii } from './wheel-geometry.ts'

interface WheelDrawingProps {
  wheel: DrawnWheel
  /** The drawing in words; empty where the text beside it says the same. */
  label: string
  /** `full` has the depth as a dimension and centre lines; `card` is lighter; `mini` stands in a line of text. */
  size?: 'full' | 'card' | 'mini'
  /** The dimension's number. Depth is named in millimetres all over the trade. */
  dimension?: string
  /** What the two colours of spokes mean. */
  legend?: { drive: ReactNode; other: ReactNode }
  className?: string
}

/** One frame for every wheel, mm from the axle: a 584 wheel stands smaller than a 622 one, and all drawings share a scale. */
export const FRAME_MM = 366

/** A wheel computed from its own data and to scale, seen from the drive side. */
export function WheelDrawing({ wheel, label, size = 'full', dimension, legend, className }: WheelDrawingProps) {
  const full = size === 'full'
  const { rimOuter, rimInner, tyreOuter } = wheelRadii(wheel)
  const edge = size === 'mini' ? tyreOuter + 4 : FRAME_MM
  const top = full ? edge + 22 : edge
  const x = tyreOuter - 6
  return (
    <div className={className}>
      <DrawingFrame
        box={[-edge, -top, 2 * edge, top + edge]}
        label={label}
        marks={
          full
            ? [
                {
                  x: x + 5,
                  y: -rimOuter - 14,
                  text: dimension ?? `${wheel.depthMm}\u00a0mm`,
                  anchor: 'end',
                  above: true,
                  own: true,
                },
              ]
            : []
        }
      >
        <WheelLines wheel={wheel} size={size} />
        {full && (
          <>
            <path
              d={`M8 ${-rimOuter}H${x + 9}M8 ${-rimInner}H${x + 9}`}
              stroke="var(--line-strong)"
              strokeWidth="0.8"
            />
            <path d={`M${x} ${-rimOuter - 14}V${-rimInner}`} stroke="var(--own)" strokeWidth="1.8" />
            <path
              d={`M${x - 5} ${-rimOuter + 5}l10 -10M${x - 5} ${-rimInner + 5}l10 -10`}
              stroke="var(--own)"
              strokeWidth="1.8"
            />
          </>
        )}
      </DrawingFrame>
      {legend && <SideLegend {...legend} />}
    </div>
  )
}

/** What the two colours of spokes mean. */
export function SideLegend({ drive, other }: { drive: ReactNode; other: ReactNode }) {
  return (
    <p className="mt-2 flex flex-wrap gap-x-5 gap-y-1 text-[0.8125rem] text-soft">
      {[
        { words: drive, stroke: 'text-ink' },
        { words: other, stroke: 'text-(--left) forced-colors:text-[LinkText] print:text-[#3b5b7c]' },
      ].map(({ words, stroke }) => (
        <span key={stroke} className="inline-flex items-center gap-2">
          <svg aria-hidden viewBox="0 0 26 4" className={`w-6.5 ${stroke}`} stroke="currentColor" strokeWidth="2">
            <path d="M0 2H26" />
          </svg>
          {words}
        </span>
      ))}
    </p>
  )
}
