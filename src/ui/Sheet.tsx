import type { ReactNode } from 'react'

/** The drawing sheet: a page framed by two hairlines. On a phone the frame falls away and the paper fills the screen. */
export function Sheet({ children, className }: { children: ReactNode; className?: string }) {
  return (
    <div className={`relative mx-auto w-full max-w-sheet bg-sheet md:border md:border-strong ${className ?? ''}`}>
      <div
        aria-hidden
        className="pointer-events-none absolute inset-[7px] hidden border border-line md:block print:hidden"
      />
      <div className="relative">{children}</div>
    </div>
  )
}

/** The title block in a drawing's corner: small label over its value. */
export function TitleBlock({
  items,
  className,
}: {
  items: readonly { label: ReactNode; value: ReactNode; own?: boolean }[]
  className?: string
}) {
  return (
    <dl className={`grid grid-cols-2 border border-strong text-[0.8125rem] sm:flex ${className ?? ''}`}>
      {items.map(({ label, value, own }, index) => (
        <div
          key={index}
          className="min-w-0 flex-auto border-line px-2.5 py-1.5 not-first:border-s max-sm:nth-[2n+1]:border-s-0 max-sm:nth-[n+3]:border-t"
        >
          <dt className="text-xs text-soft">{label}</dt>
          <dd className={own ? 'font-bold text-own' : 'font-semibold'}>{value}</dd>
        </div>
      ))}
    </dl>
  )
}
