import type { ReactNode } from 'react'

export type Standing = 'within' | 'near' | 'over' | 'mismatch'

const looks: Record<Standing, { className: string; path: ReactNode }> = {
  within: { className: 'text-within', path: <path d="M2.5 8.5 6.5 12.5 13.5 3.5" /> },
  near: {
    className: 'text-near',
    path: (
      <>
        <circle cx="8" cy="8" r="5.6" />
        <path d="M8 2.4A5.6 5.6 0 0 1 8 13.6Z" fill="currentColor" />
      </>
    ),
  },
  over: { className: 'bg-stop px-2.5 py-1 text-stop-ink', path: <path d="M3.5 3.5 12.5 12.5M12.5 3.5 3.5 12.5" /> },
  mismatch: {
    className: 'border border-ink px-2 py-0.5 text-ink',
    path: <path d="M2.5 8H6.5M9.5 8H13.5M8 2.5 8 5M8 11V13.5" />,
  },
}

/** Icon, word and colour together, so that none of them carries the verdict alone. "Over" is an ink stamp, not red. */
export function Verdict({ standing, children }: { standing: Standing; children: ReactNode }) {
  const { className, path } = looks[standing]
  return (
    <span className={`inline-flex items-center gap-1.5 text-sm leading-tight font-[650] ${className}`}>
      <svg
        aria-hidden
        viewBox="0 0 16 16"
        className="size-3.5 flex-none"
        fill="none"
        stroke="currentColor"
        strokeWidth="2"
      >
        {path}
      </svg>
      <span>{children}</span>
    </span>
  )
}
