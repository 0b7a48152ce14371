/** Language, units, market and theme: what a visitor chose once, kept in the browser, and readable from the address. */
import { createContext, use, useCallback, useMemo, useState, type ReactNode } from 'react'
import { z } from 'zod'
import { locale, marketCode, type Currency, type Locale, type MarketCode } from '#contract/common.ts'
import { changeLanguage } from './i18n.ts'

const KEY = 'felloe.preferences'

const shape = z.object({
  language: locale,
  mass: z.enum(['kg', 'lb', 'st']),
  pressure: z.enum(['bar', 'psi']),
  length: z.enum(['mm', 'in']),
  market: marketCode,
  theme: z.enum(['system', 'light', 'dark']),
})
export type Preferences = z.infer<typeof shape>

/** Names in the address: `?lng=pt&mass=lb&pressure=psi`. */
const inAddress = { lng: 'language', mass: 'mass', pressure: 'pressure', length: 'length', market: 'market' } as const

function fromBrowser(): Preferences {
  const spoken = navigator.languages
    .map((one) => one.slice(0, 2))
    .find((one): one is Locale => locale.safeParse(one).success)
  const region = navigator.languages
    .map((one) => one.slice(3, 5).toUpperCase())
    .find((one) => marketCode.safeParse(one).success)
  const american = region === 'US'
  return {
    language: spoken ?? 'en',
    mass: american ? 'lb' : 'kg',
    pressure: american || region === 'GB' ? 'psi' : 'bar',
    length: 'mm',
    market: (region as MarketCode | undefined) ?? 'PT',
    theme: 'system',
  }
}

/** The address wins over what was kept, and that over the browser's own settings; anything unreadable is passed over. */
export function readPreferences(): Preferences {
  let kept: unknown = {}
  try {
    kept = JSON.parse(localStorage.getItem(KEY) ?? '{}')
  } catch {
    // Storage refused or spoilt: start from the browser's settings.
  }
  const address = new URLSearchParams(window.location.search)
  const asked = Object.fromEntries(
    Object.entries(inAddress).flatMap(([short, name]) => (address.has(short) ? [[name, address.get(short)]] : [])),
  )
  const base = fromBrowser()
  const read = { ...base, ...valid(kept), ...valid(asked) }
  // What a link asked for stays for the pages that follow, the way back from the payment page among them.
  if (Object.keys(asked).length > 0) keep(read)
  return read
}

function keep(preferences: Preferences) {
  try {
    localStorage.setItem(KEY, JSON.stringify(preferences))
  } catch {
    // Not kept; it still holds for this page.
  }
}

function valid(values: unknown): Partial<Preferences> {
  if (typeof values !== 'object' || values === null) return {}
  return Object.fromEntries(
    Object.entries(shape.shape).flatMap(([name, one]) => {
      const parsed = one.safeParse((values as Record<string, unknown>)[name])
      return parsed.success ? [[name, parsed.data]] : []
    }),
  )
}

function applyTheme(theme: Preferences['theme']) {
  const dark = theme === 'dark' || (theme === 'system' && window.matchMedia('(prefers-color-scheme: dark)').matches)
  document.documentElement.dataset.theme = dark ? 'dark' : 'light'
}

interface Kept extends Preferences {
  currency: Currency
  set: (change: Partial<Preferences>) => void
}

const Context = createContext<Kept | null>(null)

const currencyOf = (market: MarketCode): Currency => (market === 'GB' ? 'GBP' : market === 'US' ? 'USD' : 'EUR')

export function PreferencesProvider({ initial, children }: { initial: Preferences; children: ReactNode }) {
  const [preferences, setPreferences] = useState(initial)
  const set = useCallback((change: Partial<Preferences>) => {
    setPreferences((before) => {
      const after = { ...before, ...change }
      keep(after)
      return after
    })
    if (change.theme) applyTheme(change.theme)
    if (change.language) void changeLanguage(change.language)
    writeAddress(change)
  }, [])
  const value = useMemo(() => ({ ...preferences, currency: currencyOf(preferences.market), set }), [preferences, set])
  return <Context value={value}>{children}</Context>
}

/** A choice that stands in the address is changed there too, so that a reload or a shared link shows the same. */
function writeAddress(change: Partial<Preferences>) {
  const url = new URL(window.location.href)
  let touched = false
  for (const [short, name] of Object.entries(inAddress)) {
    const value = change[name]
    if (value === undefined || !url.searchParams.has(short)) continue
    url.searchParams.set(short, value)
    touched = true
  }
  if (touched) window.history.replaceState(window.history.state, '', url)
}

export function usePreferences(): Kept {
  const value = use(Context)
  if (!value) throw new Error('PreferencesProvider is missing')
  return value
}
