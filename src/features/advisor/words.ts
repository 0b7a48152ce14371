/** Codes of the advice into sentences. Every lookup ends in a general one, so that a newer server never leaves a gap on the page. */
import type { TFunction } from 'i18next'
import { useMemo } from 'react'
import { useTranslation } from 'react-i18next'
import type { Advice, Note, WheelPressure } from '#contract/advisor.ts'
import { shownPressure } from '#core/display.ts'
import { useFormat, type Format } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import type { Standing } from '../../ui/Verdict.tsx'

export const standings: Record<Advice['wheelsets'][number]['verdict'], Standing> = {
  fits: 'within',
  'no-margin': 'near',
  'over-limit': 'over',
  mismatch: 'mismatch',
  pressure: 'mismatch',
}

/** A total counts as more, a limit or a maximum as less: a rounded figure must not turn the verdict. */
const upward = new Set(['totalKg', 'gapKg', 'bareKg', 'floorBar', 'minimumBar', 'leastTyreMm', 'widthThatWouldDoMm'])
const downward = new Set(['limitKg', 'marginKg', 'ceilingBar', 'widestHookedInnerMm', 'innerWidthMm'])

/** One value of the advice by the unit in its name. Depths and rotors are named in mm whatever the visitor's units. */
export function showValue(name: string, value: number, format: Format): string {
  const rounding = upward.has(name) ? 'up' : downward.has(name) ? 'down' : 'nearest'
  if (/Kg$/.test(name)) return format.mass(value, rounding).text
  if (/Bar$/.test(name)) return format.pressure(value, rounding).text
  if (/^(depth|cap|clamp|beadSeat|rotor)Mm$/.test(name))
    return name === 'beadSeatMm' ? String(value) : format.depth(value).text
  if (/NPerMm$/.test(name)) return `${format.number(value, 1)}\u00a0N/mm`
  if (/PerMm$/.test(name)) return format.number(value, 1)
  if (/(Shift|side)Mm$/.test(name)) return `${format.number(value, 1)}\u00a0mm`
  if (/Mm$/.test(name)) return format.width(value, rounding).text
  if (/Kmh$/.test(name)) return `${format.number(value)}\u00a0km/h`
  if (/Ms$/.test(name)) return `${format.number(value, 1)}\u00a0m/s`
  if (/N$/.test(name)) return `${format.number(value)}\u00a0N`
  if (/Deg$/.test(name)) return `${format.number(value, 1)}°`
  if (/C$/.test(name)) return `${format.number(value)}\u00a0°C`
  if (/(Share|Drop|From|gradient)$/i.test(name)) return format.percent(value, 1)
  if (/M$/.test(name)) return `${format.number(value * 1000, 1)}\u00a0mm`
  return format.number(value, Number.isInteger(value) ? 0 : value < 0.1 ? 4 : value < 2 ? 3 : 2)
}

export const fieldName = (t: TFunction, path: string) => t([`advisor:field.${path}`, 'advisor:field.other'])

/** What an answer's value is called: a word of a list, a size with its unit, yes or no. */
export function answerText(t: TFunction, format: Format, path: string, value: unknown): string {
  const name = path.split('.').at(-1) ?? path
  if (Array.isArray(value)) return format.list(value.map((one) => answerText(t, format, path, one)))
  if (typeof value === 'boolean') return t(value ? 'advisor:findings.sharpen.yes' : 'advisor:findings.sharpen.no')
  if (name === 'ride' || name === 'brakes' || name === 'setup')
    return t(`advisor:${name}.${String(value)}.label`, { defaultValue: String(value) })
  if (typeof value === 'number' && name !== 'beadSeatMm') return showValue(name, value, format)
  if (typeof value === 'object' && value !== null)
    return Object.entries(value)
      .map(([key, one]) => `${key}: ${answerText(t, format, key, one)}`)
      .join('; ')
  return t(`advisor:option.${name}.${String(value)}`, { defaultValue: String(value) })
}

type Start = Pick<WheelPressure, 'startBar' | 'floorBar' | 'ceilingBar'>
const isStart = (value: unknown): value is Start => typeof value === 'object' && value !== null && 'startBar' in value

/** A start value in the visitor's unit, never above its rounded-down maximum. */
function startText(format: Format, { startBar, floorBar, ceilingBar }: Start): string {
  const unit = format.pressure(startBar).unit === 'psi' ? 'psi' : 'bar'
  return `${format.number(shownPressure(startBar, floorBar, ceilingBar, unit), unit === 'bar' ? 1 : 0)}\u00a0${unit}`
}

export function noteText(t: TFunction, format: Format, { code, data }: Note): string {
  const words = Object.fromEntries(
    Object.entries(data).map(([name, value]) => [
      name,
      name === 'fields' && Array.isArray(value)
        ? format.list(value.map((path) => fieldName(t, String(path)).toLocaleLowerCase()))
        : typeof value === 'number'
          ? showValue(name, value, format)
          : isStart(value)
            ? startText(format, value)
            : String(value),
    ]),
  )
  const key = code === 'wider-tyre' && data.widthThatWouldDoMm === null ? 'wider-tyre-none' : code
  return t([`advisor:notes.${key}`, 'advisor:notes.other'], words)
}

/** Translation and numbers together, for the pages of the advisor. */
export function useAdviceWords() {
  const { t } = useTranslation('advisor')
  const format = useFormat()
  const { pressure: unit } = usePreferences()
  return useMemo(() => {
    const bar = (value: number) => format.number(value, unit === 'bar' ? 1 : 0)
    return {
      t,
      format,
      note: (note: Note) => noteText(t, format, note),
      field: (path: string) => fieldName(t, path),
      answer: (path: string, value: unknown) => answerText(t, format, path, value),
      /** A start value never shows above its rounded-down maximum. */
      start: ({ startBar, floorBar, ceilingBar }: Pick<WheelPressure, 'startBar' | 'floorBar' | 'ceilingBar'>) => ({
        value: bar(shownPressure(startBar, floorBar, ceilingBar, unit)),
        unit,
      }),
      edge: (value: number, { floorBar, ceilingBar }: WheelPressure) =>
        bar(shownPressure(value, floorBar, ceilingBar, unit)),
      verdict: ({ verdict, marginKg }: Pick<Advice['wheelsets'][number], 'verdict' | 'marginKg'>) =>
        t(`findings.verdict.${verdict}`, {
          margin: format.mass(Math.max(0, marginKg), 'down').text,
          over: format.mass(Math.max(0, -marginKg), 'up').text,
        }),
    }
  }, [t, format, unit])
}
