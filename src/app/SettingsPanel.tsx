import { useEffect, useRef } from 'react'
import { useTranslation } from 'react-i18next'
import { locales, marketCodes } from '#contract/common.ts'
import { languageNames } from '../lib/i18n.ts'
import { usePreferences, type Preferences } from '../lib/preferences.tsx'
import { Select } from '../ui/Field.tsx'

/** Language, units, delivery country and theme. A change shows at once and loses nothing that was typed. */
export function SettingsPanel() {
  const { t, i18n } = useTranslation()
  const preferences = usePreferences()
  const details = useRef<HTMLDetailsElement>(null)
  useEffect(() => {
    const close = (event: Event) => {
      const panel = details.current
      if (!panel?.open) return
      const leaves = event instanceof KeyboardEvent ? event.key === 'Escape' : !panel.contains(event.target as Node)
      if (!leaves) return
      panel.open = false
      if (event instanceof KeyboardEvent) panel.querySelector('summary')?.focus()
    }
    document.addEventListener('pointerdown', close)
    document.addEventListener('keydown', close)
    return () => {
      document.removeEventListener('pointerdown', close)
      document.removeEventListener('keydown', close)
    }
  }, [])
  const countries = new Intl.DisplayNames([i18n.language], { type: 'region' })
  const choose = <K extends keyof Preferences>(
    name: K,
    values: readonly Preferences[K][],
    word: (value: Preferences[K]) => string,
  ) => (
    <label className="block">
      <span className="block text-xs text-soft">{t(`settings.${name}`)}</span>
      <Select
        className="min-h-11! py-1.5!"
        value={preferences[name]}
        onChange={(event) => {
          preferences.set({ [name]: event.target.value })
        }}
      >
        {values.map((value) => (
          <option key={value} value={value}>
            {word(value)}
          </option>
        ))}
      </Select>
    </label>
  )
  const { language, mass, pressure } = preferences
  return (
    <details ref={details} className="relative">
      <summary className="flex min-h-11 items-center gap-1.5 text-soft hover:text-ink">
        <span className="sr-only">{t('settings.open')}</span>
        <span className="font-semibold uppercase">{language}</span>
        <span className="max-xs:hidden">
          {mass} · {pressure}
        </span>
        <svg aria-hidden viewBox="0 0 10 6" className="w-2.5" fill="none" stroke="currentColor" strokeWidth="1.6">
          <path d="m1 1 4 4 4-4" />
        </svg>
      </summary>
      <div className="absolute end-0 z-40 mt-1 grid w-72 max-w-[calc(100vw-2.5rem)] gap-3 border border-strong bg-sheet p-4 max-md:-end-28">
        {choose('language', locales, (value) => languageNames[value])}
        <div className="grid grid-cols-3 gap-2">
          {choose('mass', ['kg', 'lb', 'st'], (value) => t(`settings.units.${value}`))}
          {choose('pressure', ['bar', 'psi'], (value) => value)}
          {choose('length', ['mm', 'in'], (value) => value)}
        </div>
        {choose('market', marketCodes, (value) => countries.of(value) ?? value)}
        {choose('theme', ['system', 'light', 'dark'], (value) => t(`settings.themes.${value}`))}
      </div>
    </details>
  )
}
