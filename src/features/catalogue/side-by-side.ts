/** Up to four wheelsets a visitor wants side by side, by slug: kept in this browser, and in the address of the page that shows them. */
import { useCallback, useMemo, useSyncExternalStore } from 'react'

export const MOST = 4
const KEY = 'felloe.side-by-side'

const listeners = new Set<() => void>()
/** Storage may be refused; the choice then holds until the page is loaded anew. */
let held: string | null = null

function read(): string {
  try {
    return localStorage.getItem(KEY) ?? held ?? '[]'
  } catch {
    return held ?? '[]'
  }
}

function keep(slugs: readonly string[]) {
  held = JSON.stringify(slugs)
  try {
    localStorage.setItem(KEY, held)
  } catch {
    // held has it
  }
  for (const tell of listeners) tell()
}

function subscribe(tell: () => void) {
  listeners.add(tell)
  // Another tab of the same visitor.
  window.addEventListener('storage', tell)
  return () => {
    listeners.delete(tell)
    window.removeEventListener('storage', tell)
  }
}

/** Distinct, in order, at most four; anything else in the storage or the address is passed over. */
export const readSlugs = (values: unknown): string[] =>
  Array.isArray(values)
    ? [
        ...new Set(values.filter((one): one is string => typeof one === 'string' && /^[a-z0-9-]{1,80}$/.test(one))),
      ].slice(0, MOST)
    : []

function parse(text: string): string[] {
  try {
    return readSlugs(JSON.parse(text))
  } catch {
    return []
  }
}

export const sideBySidePath = (slugs: readonly string[]) =>
  slugs.length === 0 ? '/side-by-side' : `/side-by-side?sets=${slugs.join(',')}`

export function useSideBySide() {
  const text = useSyncExternalStore(subscribe, read)
  const slugs = useMemo(() => parse(text), [text])
  const toggle = useCallback((slug: string) => {
    const now = parse(read())
    keep(now.includes(slug) ? now.filter((one) => one !== slug) : [...now, slug].slice(0, MOST))
  }, [])
  return { slugs, toggle, set: keep, full: slugs.length >= MOST }
}
