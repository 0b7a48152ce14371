import type { ReactNode } from 'react'

export interface Mark {
  x: number
  y: number
  text: ReactNode
  /** Which point of the words lies at x, y. */
  anchor?: 'start' | 'middle' | 'end'
  /** Words stand on the point instead of around it. */
  above?: boolean
  /** The dimension that counts is set in the accent colour. */
  own?: boolean
}

interface DrawingFrameProps {
  /** Left, top, width, height in the drawing's units (mm). */
  box: readonly [number, number, number, number]
  /** What a person sees in it, in words; empty where the words stand beside the drawing already. */
  label: string
  marks?: readonly Mark[]
  className?: string
  children: ReactNode
}

const anchors = { start: '', middle: '-translate-x-1/2', end: '-translate-x-full' }

/**
 * A drawing to scale. Its lines keep their weight and its words their size however large it stands, so that a phone shows
 * the same hairlines and readable numbers as a wide screen. Colours come from the sheet, on paper from ink, and in forced colours from the system.
 */
export function DrawingFrame({ box, label, marks = [], className, children }: DrawingFrameProps) {
  const [left, top, width, height] = box
  const colours =
    'print:[--left:#3b5b7c] print:[--own:#a3302b] forced-colors:[--ink:CanvasText] forced-colors:[--soft:CanvasText] forced-colors:[--hub:CanvasText] forced-colors:[--line-strong:GrayText] forced-colors:[--line:GrayText] forced-colors:[--left:LinkText] forced-colors:[--own:Highlight] forced-colors:[--sheet:Canvas]'
  return (
    <div
      className={`relative text-ink ${colours} ${className ?? ''}`}
      {...(label === '' ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label })}
    >
      <svg
        aria-hidden
        focusable="false"
        viewBox={box.join(' ')}
        className="block h-auto w-full [&_*]:[vector-effect:non-scaling-stroke]"
        fill="none"
        stroke="currentColor"
      >
        {children}
      </svg>
      {marks.map(({ x, y, text, anchor = 'start', above = false, own = false }, index) => (
        <span
          key={index}
          aria-hidden
          className={`absolute ${above ? '-translate-y-full pb-0.5' : '-translate-y-1/2'} text-[0.8125rem] leading-none whitespace-nowrap tabular-nums ${own ? 'font-bold text-own' : 'font-semibold text-soft'} ${anchors[anchor]}`}
          style={{ left: `${((x - left) / width) * 100}%`, top: `${((y - top) / height) * 100}%` }}
        >
          {text}
        </span>
      ))}
    </div>
  )
}
