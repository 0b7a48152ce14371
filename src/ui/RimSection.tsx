import { useId } from 'react'
import { DrawingFrame, type Mark } from './DrawingFrame.tsx'
import { rimSection, tyreCircle, type RimShape } from './wheel-geometry.ts'
import { CENTRE_LINE } from './WheelLines.tsx'

interface RimSectionProps {
  rim: RimShape
  /** Narrowest and widest tyre the rim takes, mm. */
  tyres: readonly [number, number]
  label: string
  texts: { depth: string; outer: string; inner: string; narrow?: string; wide?: string }
  className?: string
}

/** Reach of the drawing to either side, mm: the same for every rim, so that sections can be compared. */
const LEFT = 44
const RIGHT = 52

/** The rim cut across, to scale in widths and depth, hatched as a cut is, with the narrowest and the widest tyre over it. */
export function RimSection({ rim, tyres, label, texts, className }: RimSectionProps) {
  const id = useId()
  const section = rimSection(rim)
  const { outer, inner } = section
  const [narrow, wide] = [tyreCircle(tyres[0], rim.innerWidthMm), tyreCircle(tyres[1], rim.innerWidthMm)]
  const top = wide.radius - wide.centreY + 7
  const bottom = rim.depthMm + 16
  const dimensionX = Math.max(outer + 9, 27)
  const marks: Mark[] = [
    { x: dimensionX + 2.5, y: rim.depthMm / 2, text: texts.depth, own: true },
    { x: 0, y: rim.depthMm + 12.5, text: texts.outer, anchor: 'middle' },
    { x: 0, y: -5.4, text: texts.inner, anchor: 'middle' },
    ...(texts.wide === undefined
      ? []
      : [{ x: 0, y: wide.centreY - wide.radius - 4, text: texts.wide, anchor: 'middle' } as const]),
    ...(texts.narrow === undefined || wide.radius - narrow.radius < 4
      ? []
      : [{ x: 0, y: narrow.centreY - narrow.radius + 5, text: texts.narrow, anchor: 'middle' } as const]),
  ]
  return (
    <DrawingFrame box={[-LEFT, -top, LEFT + RIGHT, top + bottom]} label={label} marks={marks} className={className}>
      <pattern id={`${id}h`} width="1.7" height="1.7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <path d="M0 0V1.7" strokeWidth="0.7" />
      </pattern>
      <path
        d={`M0 ${-top + 6}V${rim.depthMm + 5}`}
        stroke="var(--line-strong)"
        strokeWidth="0.7"
        strokeDasharray={CENTRE_LINE}
      />
      <path d={tyreArc(wide)} stroke="var(--line-strong)" strokeWidth="1" strokeDasharray="5 4" />
      <path d={tyreArc(narrow)} stroke="var(--soft)" strokeWidth="1.2" />
      <path
        d={wall(section, rim.depthMm, 1) + wall(section, rim.depthMm, -1)}
        fill={`url(#${id}h)`}
        fillRule="evenodd"
        stroke="none"
      />
      {[1, -1].map((side) => (
        <path
          key={side}
          d={`${outline(section, rim.depthMm, side)}${hollow(section, side)}`}
          strokeWidth="1.5"
          strokeLinejoin="round"
        />
      ))}
      <Across y={-2.6} half={inner} />
      <Across y={rim.depthMm + 8} half={outer} from={Math.min(section.shoulder, rim.depthMm - 4)} />
      <path
        d={`M${outer + 1.5} 0H${dimensionX + 1.5}M${section.nose - 1} ${rim.depthMm}H${dimensionX + 1.5}`}
        stroke="var(--line-strong)"
        strokeWidth="0.8"
      />
      <g stroke="var(--own)" strokeWidth="1.8">
        <path d={`M${dimensionX} 0V${rim.depthMm}`} />
        <path d={`M${dimensionX - 1} 1l2 -2M${dimensionX - 1} ${rim.depthMm + 1}l2 -2`} />
      </g>
    </DrawingFrame>
  )
}

/** A width between two small strokes; `from` runs the helping lines down from the body. */
function Across({ y, half, from }: { y: number; half: number; from?: number }) {
  return (
    <>
      {from !== undefined && (
        <path
          d={`M${-half} ${from}V${y + 1.5}M${half} ${from}V${y + 1.5}`}
          stroke="var(--line-strong)"
          strokeWidth="0.8"
        />
      )}
      <path
        d={`M${-half} ${y}H${half}M${-half - 0.8} ${y + 0.8}l1.6 -1.6M${half - 0.8} ${y + 0.8}l1.6 -1.6`}
        stroke="var(--soft)"
        strokeWidth="1"
      />
    </>
  )
}

type Section = ReturnType<typeof rimSection>

/** From the middle of the bed over the bead wall and round to the middle of the nose. `s` is 1 or -1: right or left half. */
function outline({ outer, nose, bed, well, bead, shoulder, bulge, inner }: Section, depth: number, s: number) {
  const up = [...bead].reverse().map(({ x, y }) => `L${s * x} ${y}`)
  const tip = bead[0]?.y ?? 0
  return [
    `M0 ${well}H${s * inner * 0.35}L${s * inner * 0.62} ${bed}H${s * (bead.at(-1)?.x ?? inner)}`,
    ...up,
    `Q${s * inner} 0 ${s * (inner + 0.6)} 0H${s * (outer - 0.9)}Q${s * outer} 0 ${s * outer} ${tip + 0.6}V${shoulder}`,
    `C${s * outer} ${shoulder + bulge} ${s * (nose + (outer - nose) * 0.42)} ${depth - 5} ${s * nose} ${depth - 2.2}Q${s * (nose - 1.2)} ${depth} ${s * (nose - 3)} ${depth}H0`,
  ].join('')
}

function hollow({ hollow: { top, bottom, side, noseSide }, shoulder, bulge, inner, bed }: Section, s: number) {
  const corner = Math.min(bed + 2, top)
  return [
    `M0 ${top}H${s * inner * 0.42}L${s * inner * 0.68} ${corner}H${s * (side - 0.8)}Q${s * side} ${corner} ${s * side} ${corner + 0.9}V${Math.max(shoulder, corner + 1)}`,
    `C${s * side} ${shoulder + bulge} ${s * (noseSide + (side - noseSide) * 0.42)} ${bottom - 4} ${s * noseSide} ${bottom - 1}Q${s * (noseSide - 0.6)} ${bottom} ${s * (noseSide - 1.6)} ${bottom}H0`,
  ].join('')
}

const wall = (section: Section, depth: number, s: number) => `${outline(section, depth, s)}Z${hollow(section, s)}Z`

/** The long way round from one bead wall to the other. */
const tyreArc = ({ radius, half }: ReturnType<typeof tyreCircle>) => `M${-half} 0A${radius} ${radius} 0 1 1 ${half} 0`
