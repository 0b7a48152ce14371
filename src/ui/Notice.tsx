import type { ReactNode } from 'react'

type Tone = 'note' | 'caution' | 'stop' | 'good'

const tones: Record<Tone, string> = {
  note: 'border-strong bg-ground',
  caution: 'border-near bg-near-wash',
  stop: 'border-stop bg-sheet outline-1 -outline-offset-1 outline-stop',
  good: 'border-within bg-within-wash',
}

/** A calm aside. `stop` is announced at once, the rest when the reader gets there. */
export function Notice({
  tone = 'note',
  title,
  children,
  className,
}: {
  tone?: Tone
  title?: ReactNode
  children?: ReactNode
  className?: string
}) {
  return (
    <div
      role={tone === 'stop' ? 'alert' : undefined}
      className={`border-s-[3px] px-4 py-3 text-[0.9375rem] ${tones[tone]} ${className ?? ''}`}
    >
      {title !== undefined && <p className="font-bold">{title}</p>}
      {children}
    </div>
  )
}
