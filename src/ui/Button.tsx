import type { ComponentProps } from 'react'
import { Link } from 'react-router-dom'

type Kind = 'main' | 'plain' | 'quiet'

const base =
  'inline-flex min-h-12 items-center justify-center gap-2 px-5 py-3 text-center text-base font-[650] leading-tight no-underline transition-colors disabled:opacity-55'
const kinds: Record<Kind, string> = {
  main: 'bg-ink text-sheet border border-ink hover:bg-soft hover:border-soft',
  plain: 'border border-strong bg-sheet text-ink hover:border-ink',
  quiet: 'px-1 text-ink underline underline-offset-4 hover:text-own',
}

interface Look {
  kind?: Kind
  /** Desks are dense. */
  small?: boolean
}
const look = ({ kind = 'main', small = false }: Look, extra?: string) =>
  [base, kinds[kind], small ? 'min-h-9! px-3! py-1.5! text-sm!' : '', extra ?? ''].join(' ')

/** `busy` keeps the words in place and refuses a second click. */
export function Button({
  kind,
  small,
  busy = false,
  className,
  children,
  disabled,
  ...rest
}: ComponentProps<'button'> & Look & { busy?: boolean }) {
  return (
    <button
      type="button"
      {...rest}
      className={look({ kind, small }, className)}
      disabled={(disabled ?? false) || busy}
      aria-busy={busy || undefined}
    >
      {children}
    </button>
  )
}

export function ButtonLink({ kind, small, className, ...rest }: ComponentProps<typeof Link> & Look) {
  return <Link {...rest} className={look({ kind, small }, className)} />
}
