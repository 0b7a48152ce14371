/** A body mass as people type it: kg, lb, or stone and pounds. What was typed stays as typed; kilograms are worked out beside it. */
import { kgToLb, kgToSt, lbToKg, stToKg } from '#core/units.ts'

export const LEAST_KG = 30
export const MOST_KG = 180
/** Within these a number raises no question; outside them a slip of the unit is likelier than the mass. */
const ORDINARY_KG = [40, 140] as const

export type MassUnit = 'kg' | 'lb' | 'st'
export interface MassEntry {
  unit: MassUnit
  /** The number typed, in `unit`; null while empty or unreadable. */
  value: number | null
  /** Pounds beside stone. */
  pounds: number | null
}
/** The same number read another way. */
export interface Reading {
  unit: MassUnit
  value: number
  kg: number
}

export type MassCheck =
  | { verdict: 'missing' }
  | { verdict: 'fine'; kg: number }
  /** Possible, but more often a slip: ask once. */
  | { verdict: 'ask'; kg: number; readings: Reading[] }
  | { verdict: 'low' | 'high'; kg: number; readings: Reading[] }

export function entryKg({ unit, value, pounds }: MassEntry): number | null {
  if (value === null) return null
  if (unit === 'st') return stToKg(value) + lbToKg(pounds ?? 0)
  return unit === 'lb' ? lbToKg(value) : value
}

/** What a known mass looks like in a unit's boxes, for somebody who comes back to the question. */
export function entryOf(kg: number | null, unit: MassUnit): MassEntry {
  if (kg === null) return { unit, value: null, pounds: null }
  if (unit === 'kg') return { unit, value: Math.round(kg * 10) / 10, pounds: null }
  const pounds = Math.round(kgToLb(kg))
  if (unit === 'lb') return { unit, value: pounds, pounds: null }
  const stone = Math.floor(kgToSt(kg) + 1e-9)
  const rest = Math.round(kgToLb(kg - stToKg(stone)))
  return rest === 14 ? { unit, value: stone + 1, pounds: 0 } : { unit, value: stone, pounds: rest }
}

/** @returns 165 in the kg box asks for pounds, 7.5 for stone or a lost digit; bounds count after conversion */
export function checkMass(entry: MassEntry): MassCheck {
  const kg = entryKg(entry)
  const { value, unit } = entry
  if (kg === null || value === null) return { verdict: 'missing' }
  const ordinary = (mass: number) => mass >= ORDINARY_KG[0] && mass <= ORDINARY_KG[1]
  const readings: Reading[] = [
    { unit: 'kg' as const, value, kg: value },
    { unit: 'lb' as const, value, kg: lbToKg(value) },
    { unit: 'st' as const, value, kg: stToKg(value) },
    { unit, value: value * 10, kg: kg * 10 },
  ].filter((one) => (one.unit !== unit || one.value !== value) && ordinary(one.kg))
  if (kg < LEAST_KG || kg > MOST_KG) return { verdict: kg < LEAST_KG ? 'low' : 'high', kg, readings }
  return ordinary(kg) || readings.length === 0 ? { verdict: 'fine', kg } : { verdict: 'ask', kg, readings }
}

/** Bands of 10 kg between the bounds of the sums. */
export const massBands = Array.from({ length: (MOST_KG - LEAST_KG) / 10 }, (_, index) => ({
  from: LEAST_KG + index * 10,
  to: LEAST_KG + index * 10 + 10,
}))
