/**
 * Rounding for people's eyes; the browser uses this very file. Recommended values round half up, maxima DOWN, minima UP, so that no
 * display turns a refusal into a pass and 5 bar never prints as 73 psi (72.52 psi; 73 psi would be 5.03 bar). Source: tyres reference,
 * step 13, DERIVED.
 */
import { barToPsi, kgToLb, kgToSt, mmToIn } from './units.ts'

export type Rounding = 'nearest' | 'down' | 'up'

/** Display step of each unit: nothing finer than 0.1 bar or 1 psi is shown. */
const steps = { kg: 0.1, lb: 1, st: 0.1, bar: 0.1, psi: 1, kPa: 10, mm: 1, in: 0.01 } as const
export type Unit = keyof typeof steps

const from: Record<Unit, (value: number) => number> = {
  kg: (kg) => kg,
  lb: kgToLb,
  st: kgToSt,
  bar: (bar) => bar,
  psi: barToPsi,
  kPa: (bar) => bar * 100,
  mm: (mm) => mm,
  in: mmToIn,
}

/** Part of a step within which a value counts as lying on it: 4.7 bar must not print as 4.6 for a float's last bit. */
const GUARD = 1e-9

/** @returns a multiple of `step`, rounded as said */
export function roundTo(value: number, step: number, rounding: Rounding): number {
  const count = value / step
  const whole =
    rounding === 'down'
      ? Math.floor(count + GUARD)
      : rounding === 'up'
        ? Math.ceil(count - GUARD)
        : Math.floor(count + 0.5 + GUARD)
  // Dividing by the inverse keeps 47 steps of 0.1 at 4.7 instead of 4.7000000000000001; adding 0 turns the -0 of a rounded-up nothing into 0.
  return (step < 1 ? whole / Math.round(1 / step) : whole * step) + 0
}

/**
 * Converts once and rounds to the unit's display step.
 * @param value kg for masses, bar for pressures, mm for lengths
 */
export const inUnit = (value: number, unit: Unit, rounding: Rounding): number =>
  roundTo(from[unit](value), steps[unit], rounding)

/** A recommended pressure as shown: rounded half up, but never above the rounded-down maximum nor below the rounded-up minimum. */
export function shownPressure(
  startBar: number,
  floorBar: number,
  ceilingBar: number,
  unit: 'bar' | 'psi' | 'kPa',
): number {
  const most = inUnit(ceilingBar, unit, 'down')
  const least = inUnit(floorBar, unit, 'up')
  return Math.min(most, Math.max(least, inUnit(startBar, unit, 'nearest')))
}
