import { useId } from 'react'
import { DrawingFrame } from './DrawingFrame.tsx'
import { FRAME_MM } from './WheelDrawing.tsx'
import { CENTRE_LINE, WheelLines, type DrawnWheel } from './WheelLines.tsx'

interface PairDrawingProps {
  front: DrawnWheel
  rear: DrawnWheel
  label: string
  /** Words under either half; left out, the halves stand unnamed. */
  names?: { front: string; rear: string }
  className?: string
}

/** Both wheels as half views on one axle, as drawing sheets do it: front on the left of the centre line, rear on the right, upper halves, to scale. */
export function PairDrawing({ front, rear, label, names, className }: PairDrawingProps) {
  const id = useId()
  const low = 46
  const height = FRAME_MM + low
  return (
    <DrawingFrame
      box={[-FRAME_MM, -FRAME_MM, 2 * FRAME_MM, height]}
      label={label}
      className={className}
      marks={
        names
          ? [
              { x: -FRAME_MM, y: 26, text: names.front },
              { x: FRAME_MM, y: 26, text: names.rear, anchor: 'end' },
            ]
          : []
      }
    >
      <clipPath id={`${id}f`}>
        <rect x={-FRAME_MM} y={-FRAME_MM} width={FRAME_MM} height={FRAME_MM} />
      </clipPath>
      <clipPath id={`${id}r`}>
        <rect x="0" y={-FRAME_MM} width={FRAME_MM} height={FRAME_MM} />
      </clipPath>
      <g clipPath={`url(#${id}f)`}>
        <WheelLines wheel={front} size="card" />
      </g>
      <g clipPath={`url(#${id}r)`}>
        <WheelLines wheel={rear} size="card" />
      </g>
      <path d={`M0 ${-FRAME_MM}V26`} strokeWidth="0.9" strokeDasharray={CENTRE_LINE} />
      <path d={`M${-FRAME_MM} 0H${FRAME_MM}`} strokeWidth="0.9" />
    </DrawingFrame>
  )
}
