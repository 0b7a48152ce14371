import type { ComponentProps, KeyboardEvent, ReactNode } from 'react'

export interface Column {
  key: string
  head: ReactNode
  /** Figures stand right, so that their units line up. */
  figure?: boolean
  className?: string
}

const rowLinks = (from: HTMLElement) => [...from.querySelectorAll<HTMLElement>('[data-row]')]

/** Arrow keys walk through the rows: focus goes from one row's link to the next. Home and End reach the first and the last. */
function walk(event: KeyboardEvent<HTMLElement>) {
  const links = rowLinks(event.currentTarget)
  const at = links.findIndex((link) => link.closest('tr')?.contains(document.activeElement))
  const target = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: links.length - 1 }[event.key]
  const link = target === undefined || at < 0 ? undefined : links[target]
  if (!link || event.altKey || event.ctrlKey || event.metaKey) return
  event.preventDefault()
  link.focus()
}

/**
 * A dense table with a head that stays in sight. Each row carries one link or button marked `data-row`.
 * Give the rows as `<tr>` with `Cell`s; on a phone, columns may drop out by their own classes.
 */
export function DataTable({
  caption,
  columns,
  children,
  className,
  still = false,
}: {
  caption: ReactNode
  columns: readonly Column[]
  children: ReactNode
  className?: string
  /** A table of a few rows: its head need not follow. */
  still?: boolean
}) {
  return (
    // The arrows only move the focus between the rows' own links, which stay reachable by Tab without them.
    // eslint-disable-next-line jsx-a11y/no-noninteractive-element-interactions
    <table className={`w-full border-collapse text-sm ${className ?? ''}`} onKeyDown={walk}>
      <caption className="sr-only">{caption}</caption>
      <thead>
        <tr>
          {columns.map(({ key, head, figure, className: extra }) => (
            <th
              key={key}
              scope="col"
              className={`${still ? '' : 'sticky top-0 z-10'} border-b border-ink bg-sheet px-2 py-2 align-bottom text-xs font-[650] text-soft first:ps-0 last:pe-0 print:static ${figure ? 'text-end' : 'text-start'} ${extra ?? ''}`}
            >
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>{children}</tbody>
    </table>
  )
}

export const Row = ({ className, ...rest }: ComponentProps<'tr'>) => (
  <tr
    {...rest}
    className={`border-b border-line align-top focus-within:bg-ground hover:bg-ground ${className ?? ''}`}
  />
)

export const Cell = ({ figure, className, ...rest }: ComponentProps<'td'> & { figure?: boolean }) => (
  <td
    {...rest}
    className={`px-2 py-2 first:ps-0 last:pe-0 ${figure ? 'text-end whitespace-nowrap tabular-nums' : ''} ${className ?? ''}`}
  />
)

/** From a search field into the rows below it. */
export const focusFirstRow = (within: ParentNode = document) => within.querySelector<HTMLElement>('[data-row]')?.focus()
