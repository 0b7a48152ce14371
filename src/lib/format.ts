/** Numbers as this visitor reads them: language, units, money. Rounds for display only; a maximum never rounds up, a minimum never down. */
import { useMemo } from 'react'
import { useTranslation } from 'react-i18next'
import type { Currency } from '#contract/common.ts'
import { inUnit, type Rounding } from '#core/display.ts'
import { usePreferences, type Preferences } from './preferences.tsx'

const DIGITS = { kg: 1, lb: 0, st: 1, bar: 1, psi: 0, mm: 0, in: 2 } as const

export interface Shown {
  value: string
  unit: string
  /** Value and unit together, with a space that does not break. */
  text: string
}

export function formatter(language: string, units: Pick<Preferences, 'mass' | 'pressure' | 'length'>) {
  const numbers = new Map<number, Intl.NumberFormat>()
  const number = (value: number, digits = 0) => {
    const found =
      numbers.get(digits) ??
      new Intl.NumberFormat(language, { minimumFractionDigits: digits, maximumFractionDigits: digits })
    numbers.set(digits, found)
    return found.format(value)
  }
  const shown = (value: number, unit: keyof typeof DIGITS, rounding: Rounding): Shown => {
    const rounded = inUnit(value, unit, rounding)
    // A stated limit of 120 kg is 120, not 120.0; a rider's own sum keeps its tenth.
    const text = number(rounded, rounding === 'down' && Number.isInteger(rounded) ? 0 : DIGITS[unit])
    return { value: text, unit, text: `${text}\u00a0${unit}` }
  }
  return {
    number,
    percent: (share: number, digits = 0) =>
      new Intl.NumberFormat(language, { style: 'percent', maximumFractionDigits: digits }).format(share),
    /** @param kg kilograms; a limit is a maximum, a rider's total a minimum */
    mass: (kg: number, rounding: Rounding = 'nearest') => shown(kg, units.mass, rounding),
    /** @param bar gauge pressure in bar */
    pressure: (bar: number, rounding: Rounding = 'nearest') => shown(bar, units.pressure, rounding),
    /** Tyre and rim widths. @param mm millimetres */
    width: (mm: number, rounding: Rounding = 'nearest') => shown(mm, units.length, rounding),
    /** Rim depth and spoke tension are named in mm and N all over the trade, whatever the other units. */
    depth: (mm: number) => ({ value: number(mm), unit: 'mm', text: `${number(mm)}\u00a0mm` }),
    grams: (g: number) => `${number(Math.round(g))}\u00a0g`,
    money: (cents: number, currency: Currency) =>
      new Intl.NumberFormat(language, {
        style: 'currency',
        currency,
        ...(cents % 100 === 0 ? { maximumFractionDigits: 0 } : {}),
      }).format(cents / 100),
    date: (iso: string) => new Intl.DateTimeFormat(language, { dateStyle: 'medium' }).format(new Date(iso)),
    time: (iso: string) =>
      new Intl.DateTimeFormat(language, { dateStyle: 'medium', timeStyle: 'short' }).format(new Date(iso)),
    list: (items: readonly string[]) => new Intl.ListFormat(language, { type: 'conjunction' }).format(items),
  }
}

export type Format = ReturnType<typeof formatter>

export function useFormat(): Format {
  const { i18n } = useTranslation()
  const { mass, pressure, length } = usePreferences()
  const language = i18n.language === 'pt' ? 'pt-PT' : i18n.language
  return useMemo(() => formatter(language, { mass, pressure, length }), [language, mass, pressure, length])
}
