import { useTranslation } from 'react-i18next'
import type { FrozenAdvice } from '#contract/support-desk.ts'
import { useFormat, type Format } from '../../lib/format.ts'

/** `tyre.frontWidthMm: 28` from `{ tyre: { frontWidthMm: 28 } }`: one line an answer, however deep it was kept. */
function flat(answers: Record<string, unknown>, before = ''): [string, unknown][] {
  return Object.entries(answers).flatMap(([name, value]): [string, unknown][] =>
    typeof value === 'object' && value !== null && !Array.isArray(value)
      ? flat(value as Record<string, unknown>, `${before}${name}.`)
      : [[`${before}${name}`, value]],
  )
}

/** The unit stands at the end of the name, as everywhere in the contract. */
function withUnit(name: string, value: number, f: Format): string {
  const digits = Number.isInteger(value) ? 0 : 1
  if (/Kg(\.|$)/.test(name)) return f.mass(value).text
  if (/Bar$/.test(name)) return f.pressure(value).text
  if (/Mm$/.test(name)) return `${f.number(value, digits)}\u00a0mm`
  if (/Kmh$/.test(name)) return `${f.number(value, digits)}\u00a0km/h`
  if (/Share$/.test(name)) return f.percent(value)
  return f.number(value, digits)
}

export function AnswerList({ advice }: { advice: FrozenAdvice }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  const worded = (name: string, value: unknown): string => {
    if (value === null) return t('answer.unknown')
    if (typeof value === 'boolean') return t(value ? 'answer.yes' : 'answer.no')
    if (typeof value === 'number') return withUnit(name, value, f)
    const text = typeof value === 'string' ? value : JSON.stringify(value)
    return t([`answerValue.${name.split('.').at(-1) ?? name}.${text}`, `part.${text}`, 'part.asGiven'], { value: text })
  }
  const lines: { name: string; value: string; own: boolean }[] = [
    ...advice.withheld.map((name) => ({ name, value: t('advice.withheld'), own: false })),
    ...(advice.systemMassKg === null
      ? []
      : [{ name: 'systemMassKg', value: f.mass(advice.systemMassKg, 'up').text, own: true }]),
    ...flat(advice.answers).map(([name, value]) => ({
      name,
      value: worded(name, value),
      own: name.startsWith('bodyMass'),
    })),
  ]
  return (
    <dl>
      {lines.map(({ name, value, own }) => (
        <div key={name} className="flex justify-between gap-4 border-b border-line py-0.5">
          <dt className="text-soft">
            {t([`answer.name.${name.replaceAll('.', '-')}`, 'answer.name.other'], { name })}
            {advice.assumed.includes(name) && ` · ${t('answer.assumed')}`}
          </dt>
          <dd className={`text-end ${own ? 'font-bold text-own' : ''}`}>{value}</dd>
        </div>
      ))}
    </dl>
  )
}
