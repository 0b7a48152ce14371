/** Words and units for the places of a rule table. A name that the texts do not know is shown as it is written, in plain words. */
import type { TFunction } from 'i18next'
import { useTranslation } from 'react-i18next'
import type { CellFault } from '#core/rule-check.ts'
import { cellOf } from '#core/rule-check.ts'
import type { Step } from './rule-differences.ts'

/** Endings of names, the longer first. */
const units: [ending: RegExp, unit: string][] = [
  [/NPerMm$/, 'N/mm'],
  [/GramPerMm$/, 'g/mm'],
  [/PerMm$/, 'mm/mm'],
  [/PerN$/, 'N/N'],
  [/Kmh$/, 'km/h'],
  [/Bar$/, 'bar'],
  [/Psi$/, 'psi'],
  [/Deg$/, '°'],
  // `rearAbove100Kg` is a count of spokes above that mass
  [/(?<!\d)Kg$/, 'kg'],
  [/Mm$/, 'mm'],
  [/Ms$/, 'm/s'],
  [/[a-z]N$/, 'N'],
  [/[a-z]C$/, '°C'],
  [/^watts$/, 'W'],
]

export const unitOf = (key: string): string | null => units.find(([ending]) => ending.test(key))?.[1] ?? null

const spelt = (key: string) =>
  key
    .replace(/([a-z])([A-Z0-9])/g, '$1 $2')
    .replaceAll('-', ' ')
    .toLowerCase()

export function useRuleWords(table: string) {
  const { t } = useTranslation(['product-desk', 'advisor', 'errors'])
  return ruleWords(t, table)
}
export type RuleWords = ReturnType<typeof ruleWords>

function ruleWords(t: TFunction, table: string) {
  /** Words that mean something else in one table stand under the table's name. */
  const word = (key: string) =>
    t([`rules.word.${table}-${key}`, `rules.word.${key}`, `advisor:ride.${key}.label`, 'rules.word.other'], {
      key: spelt(key),
    })
  /** The heads of a list of plain values: `assumed-tyre-maxima-rows-1`. */
  const column = (list: string, index: number) =>
    t([`rules.column.${table}-${list}-${String(index + 1)}`, 'rules.column.other'], { n: index + 1 })
  const step = (one: Step) => (typeof one === 'string' ? word(one) : t('rules.row', { name: one.row }))
  return {
    word,
    column,
    /** A choice as it is said; other words stand as they were typed. */
    value: (key: string | number | undefined, value: string) =>
      key === 'label'
        ? t(`rules.label.${value}`)
        : t([`rules.choice.${table}-${value}`, `rules.choice.${value}`, 'rules.word.other'], { key: value }),
    /** `Rows` says nothing where a row follows. */
    place: (at: readonly Step[]) =>
      at
        .filter((one, index) => !(one === 'rows' && index < at.length - 1))
        .map((one, index, all) => {
          const before = all[index - 1]
          const list = at.find((each) => typeof each === 'string') ?? 'rows'
          return typeof before === 'object' && typeof one === 'object' && typeof list === 'string'
            ? column(list, Number(one.row) - 1)
            : step(one)
        }),
    tableName: t([`rules.table.${table}`, 'rules.word.other'], { key: spelt(table) }),
    /** The fault with its row and column before it. */
    fault: ({ path, code, data }: CellFault, typed: unknown) => {
      const message = t([`errors:field.${code}`, 'errors:field.not-valid'], data)
      if (path.length === 0) return message
      const { row } = cellOf(path, typed)
      const last = path.at(-1)
      const list = path.find((part) => typeof part === 'string')
      const told = typeof last === 'number' ? column(String(list), last) : word(String(last))
      return t(row === '' ? 'errors:field.at-value' : 'errors:field.at-cell', { row, column: told, message })
    },
  }
}
