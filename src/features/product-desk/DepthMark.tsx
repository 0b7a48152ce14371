import { useFormat } from '../../lib/format.ts'

/** Deepest rim the mark is drawn for; one length stands for the same depth in every row. */
const FULL_MM = 90
const LENGTH = 54

/** Rim depth front and rear as two bars to one scale, the figures beside them. */
export function DepthMark({ frontMm, rearMm }: { frontMm: number; rearMm: number }) {
  const f = useFormat()
  const length = (mm: number) => (Math.min(mm, FULL_MM) / FULL_MM) * LENGTH
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      <svg aria-hidden viewBox={`0 0 ${LENGTH + 1} 12`} className="h-3 w-14 flex-none">
        <path d={`M.5 0V12`} stroke="var(--line-strong)" />
        <rect x="1" y="1.5" width={length(frontMm)} height="3.5" fill="var(--ink)" />
        <rect x="1" y="7" width={length(rearMm)} height="3.5" fill="var(--left)" />
      </svg>
      {frontMm === rearMm ? f.depth(frontMm).text : `${f.number(frontMm)} / ${f.depth(rearMm).text}`}
    </span>
  )
}
