/** A tyre's section over its rim, all widths to one scale, so that 32 mm stands wider than 28. @param widthMm 20 to 75 */
export function TyrePicture({ widthMm, className }: { widthMm: number; className?: string }) {
  const radius = widthMm * 0.24
  const inner = Math.min(radius * 0.66, 5.6)
  const rim = 30
  const centre = rim - Math.sqrt(radius * radius - inner * inner)
  return (
    <svg
      aria-hidden
      focusable="false"
      viewBox="0 0 40 36"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      strokeLinecap="round"
    >
      <path d={`M${20 - inner} ${rim}A${radius} ${radius} 0 1 1 ${20 + inner} ${rim}`} />
      <path d={`M${20 - inner - 1.6} ${rim - 1.6}V34.4H${20 + inner + 1.6}V${rim - 1.6}`} />
      <path d={`M${20 - radius} ${centre}H${20 + radius}`} strokeWidth="0.9" strokeDasharray="2 2" />
    </svg>
  )
}

/** Where the width stands: a stretch of sidewall with its marking, the width underlined. @param marking such as `28-622` */
export function SidewallPicture({ marking, className }: { marking: string; className?: string }) {
  const [width = '', size = ''] = marking.split('-')
  return (
    <svg aria-hidden focusable="false" viewBox="0 0 320 78" className={className} fill="none" stroke="currentColor">
      <path d="M6 74Q160 -34 314 74" strokeWidth="1.5" />
      <path d="M22 77Q160 -22 298 77" strokeWidth="0.8" className="text-strong" />
      <path d="M62 77Q160 24 258 77" strokeWidth="1.5" />
      <g fontSize="17" fontWeight="700" textAnchor="middle" stroke="none">
        <text x="160" y="46">
          <tspan className="fill-own">{width}</tspan>
          <tspan className="fill-soft">
            {'\u2009-\u2009'}
            {size}
          </tspan>
        </text>
      </g>
      <path d="M126 52h18" stroke="var(--own)" strokeWidth="1.8" />
    </svg>
  )
}
