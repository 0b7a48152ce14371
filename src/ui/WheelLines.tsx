import { spokeLines, wheelRadii, type WheelShape } from './wheel-geometry.ts'

/** A wheel's shape, and what the rim is made of where it is known: carbon stands a shade darker. */
export type DrawnWheel = WheelShape & { material?: 'carbon' | 'alloy' }

const weights = {
  full: { tyre: 1, rim: 1.5, spoke: 1.2, hub: 1.2, seat: 2.6 },
  card: { tyre: 0.8, rim: 1.2, spoke: 0.85, hub: 1, seat: 0 },
  mini: { tyre: 0.7, rim: 1, spoke: 0.45, hub: 0.7, seat: 0 },
} as const

/** Dash, gap, dot, gap: a centre line as drawing sheets have it. */
export const CENTRE_LINE = '14 4 2 4'

/** The lines of one wheel around the origin, for any drawing that shows wheels. */
export function WheelLines({ wheel, size }: { wheel: DrawnWheel; size: keyof typeof weights }) {
  const { tyreOuter, rimOuter, rimInner } = wheelRadii(wheel)
  const weight = weights[size]
  const spokes = spokeLines(wheel)
  const onSide = (side: 'left' | 'right') => spokes.filter((spoke) => spoke.side === side)
  const lines = (side: 'left' | 'right') => (
    <g stroke={side === 'left' ? 'var(--left)' : 'currentColor'} strokeWidth={weight.spoke} data-side={side}>
      {onSide(side).map(({ hub, rim }, index) => (
        <line key={index} x1={hub.x} y1={hub.y} x2={rim.x} y2={rim.y} />
      ))}
    </g>
  )
  const holes = (side: 'left' | 'right') =>
    size === 'full' && (
      <g fill={side === 'left' ? 'var(--left)' : 'currentColor'} stroke="none">
        {onSide(side).flatMap(({ hub, rim }, index) => [
          <circle key={`h${index}`} cx={hub.x} cy={hub.y} r="1.6" />,
          <circle key={`r${index}`} cx={rim.x} cy={rim.y} r={weight.seat} />,
        ])}
      </g>
    )
  const [left, right] = [wheel.pcdLeftMm / 2 + 5, wheel.pcdRightMm / 2 + 5]
  const reach = tyreOuter + 20
  return (
    <>
      {size !== 'mini' && (
        <path
          d={`M${-reach} 0H${reach}M0 ${-reach}V${reach}`}
          stroke="var(--line-strong)"
          strokeWidth="0.7"
          strokeDasharray={CENTRE_LINE}
          opacity="0.75"
        />
      )}
      <circle r={tyreOuter} strokeWidth={weight.tyre} />
      {/* The band fills the rim's depth; a wide stroke would not, as line weights here do not scale. */}
      <path
        d={`${ring(rimOuter)}${ring(rimInner)}`}
        fill="currentColor"
        fillOpacity={wheel.material === 'alloy' ? 0.055 : 0.13}
        fillRule="evenodd"
        stroke="none"
      />
      <circle r={rimOuter} strokeWidth={weight.rim} />
      <circle r={rimInner} strokeWidth={weight.rim} />
      <circle r={left} fill="var(--sheet)" stroke="var(--left)" strokeWidth={weight.hub} />
      {lines('left')}
      {holes('left')}
      <circle r={right} fill="var(--sheet)" stroke="var(--hub)" strokeWidth={weight.hub} />
      {lines('right')}
      {holes('right')}
      <circle r={Math.max(9, right - 11)} fill="var(--sheet)" stroke="var(--hub)" strokeWidth={weight.hub} />
      {size !== 'mini' && <circle r="6" stroke="var(--hub)" strokeWidth={weight.hub} />}
    </>
  )
}

const ring = (r: number) => `M${-r} 0A${r} ${r} 0 1 0 ${r} 0A${r} ${r} 0 1 0 ${-r} 0Z`
