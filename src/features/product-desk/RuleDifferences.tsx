import { useTranslation } from 'react-i18next'
import { Cell, DataTable, Row } from '../../ui/DataTable.tsx'
import type { Difference, Step } from './rule-differences.ts'
import { unitOf, type RuleWords } from './rule-words.ts'

/** What changes from one version to the other, cell by cell: old and new side by side. */
export function RuleDifferences({ found, words }: { found: readonly Difference[]; words: RuleWords }) {
  const { t } = useTranslation('product-desk')
  if (found.length === 0) return <p className="text-sm text-soft">{t('rules.noDifference')}</p>
  const columns = [
    { key: 'place', head: t('rules.place'), className: 'max-sm:hidden' },
    { key: 'from', head: t('rules.was'), className: 'w-[30%] max-sm:w-1/2 max-sm:ps-0' },
    { key: 'to', head: t('rules.becomes'), className: 'w-[30%] max-sm:w-1/2' },
  ]
  return (
    <DataTable
      caption={t('rules.differences')}
      columns={columns}
      still
      className="table-fixed max-sm:block max-sm:[&_tbody]:block max-sm:[&_thead]:block max-sm:[&_thead_tr]:flex"
    >
      {found.map((one) => {
        const last = one.at.findLast((step) => typeof step === 'string' && unitOf(step) !== null)
        const unit = typeof last === 'string' ? unitOf(last) : null
        return (
          // On a telephone the place stands over old and new.
          <Row key={JSON.stringify([one.at, one.order])} className="max-sm:flex max-sm:flex-wrap">
            <Cell className="break-words max-sm:w-full max-sm:pb-0 max-sm:font-[650]">
              {words.place(one.at).join(' · ')}
              {one.order && ` · ${t('rules.order')}`}
            </Cell>
            <Cell className="break-words text-soft max-sm:w-1/2 max-sm:ps-0">
              <Value {...{ words, unit }} place={one.at.at(-1)} value={one.from} gone={t('rules.notThere')} />
            </Cell>
            <Cell className="font-[650] break-words max-sm:w-1/2">
              <Value {...{ words, unit }} place={one.at.at(-1)} value={one.to} gone={t('rules.taken')} />
            </Cell>
          </Row>
        )
      })}
    </DataTable>
  )
}

interface ValueProps {
  value: unknown
  place: Step | undefined
  unit: string | null
  words: RuleWords
  gone: string
}

function Value({ value, place, unit, words, gone }: ValueProps) {
  if (value === undefined) return <span className="font-normal text-soft">{gone}</span>
  if (typeof value === 'object' && value !== null)
    return Object.entries(value)
      .map(([key, one]) => (Array.isArray(value) ? asText(one) : `${words.word(key)} ${said(key, one, words)}`))
      .join(Array.isArray(value) ? ' · ' : ', ')
  if (typeof value === 'number' && unit !== null) return `${String(value)}\u00a0${unit}`
  return typeof place === 'string' ? said(place, value, words) : asText(value)
}

const said = (key: string, value: unknown, words: RuleWords) =>
  typeof value === 'string' && key !== 'source' && key !== 'row' ? words.value(key, value) : asText(value)

const asText = (value: unknown) => (typeof value === 'string' ? value : JSON.stringify(value))
