import { LIMIT_FROM_KG, LIMIT_TO_KG } from '#contract/product-desk.ts'

const WIDTH = 240
const at = (kg: number) => ((kg - LIMIT_FROM_KG) / (LIMIT_TO_KG - LIMIT_FROM_KG)) * WIDTH
const ticks = Array.from({ length: (LIMIT_TO_KG - LIMIT_FROM_KG) / 20 + 1 }, (_, index) => LIMIT_FROM_KG + 20 * index)

/** The present limit and the drafted one on one scale of kilograms; the hatched stretch is what would change hands. */
export function LimitScale({ currentKg, newKg }: { currentKg: number | null; newKg: number }) {
  const from = currentKg === null ? newKg : Math.min(currentKg, newKg)
  const to = currentKg === null ? newKg : Math.max(currentKg, newKg)
  const lowered = currentKg !== null && newKg < currentKg
  return (
    <svg aria-hidden viewBox={`-9 0 ${WIDTH + 18} 34`} className="w-full max-w-90">
      <rect x="0" y="8" width={at(from)} height="6" fill="var(--line)" />
      <rect
        x={at(from)}
        y="8"
        width={at(to) - at(from)}
        height="6"
        fill={lowered ? 'var(--near)' : 'var(--within)'}
        opacity="0.45"
      />
      <path d={`M0 14H${WIDTH}`} stroke="var(--line-strong)" strokeWidth="0.7" />
      {ticks.map((kg) => (
        <g key={kg}>
          <path d={`M${at(kg)} 14V17`} stroke="var(--line-strong)" strokeWidth="0.7" />
          <text x={at(kg)} y="26" fontSize="8.5" textAnchor="middle" opacity="0.75">
            {kg}
          </text>
        </g>
      ))}
      {currentKg !== null && <path d={`M${at(currentKg)} 4V18`} stroke="var(--soft)" strokeWidth="1.6" />}
      <path d={`M${at(newKg)} 2V20`} stroke={lowered ? 'var(--near)' : 'var(--within)'} strokeWidth="2.6" />
    </svg>
  )
}
