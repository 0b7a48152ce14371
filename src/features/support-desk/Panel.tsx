import { useId, type ReactNode } from 'react'

/** One matter of an order: a heading on a ruled line, its tools at the right end. */
export function Panel({
  title,
  tools,
  children,
  className,
}: {
  title: ReactNode
  tools?: ReactNode
  children: ReactNode
  className?: string
}) {
  const id = useId()
  return (
    <section aria-labelledby={id} className={`break-inside-avoid ${className ?? ''}`}>
      <div className="flex min-h-9 flex-wrap items-end justify-between gap-x-4 border-b border-ink pb-1">
        <h2 id={id} className="text-base!">
          {title}
        </h2>
        {tools}
      </div>
      <div className="pt-2 text-sm">{children}</div>
    </section>
  )
}
