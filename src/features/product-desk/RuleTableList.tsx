import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { RuleTableRow } from '#contract/product-desk-rules.ts'
import { useFormat } from '../../lib/format.ts'
import { Cell, DataTable, Row } from '../../ui/DataTable.tsx'
import { useRuleWords } from './rule-words.ts'

/** The tables that the sums go by, one row each: what holds since when, on what, by whom, and what waits. */
export function RuleTableList({ rows }: { rows: readonly RuleTableRow[] }) {
  const { t } = useTranslation('product-desk')
  const columns = [
    { key: 'table', head: t('rules.column.table') },
    { key: 'version', head: t('rules.column.version') },
    { key: 'since', head: t('limits.since'), className: 'max-md:hidden' },
    { key: 'source', head: t('rules.column.source'), className: 'max-md:hidden' },
    { key: 'people', head: t('rules.column.people'), className: 'max-xl:hidden' },
    { key: 'waits', head: t('rules.column.waits') },
  ]
  return (
    <DataTable caption={t('rules.title')} columns={columns}>
      {rows.map((row) => (
        <TableRow key={row.name} row={row} />
      ))}
    </DataTable>
  )
}

function TableRow({ row: { name, current, waiting } }: { row: RuleTableRow }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  const { tableName } = useRuleWords(name)
  return (
    <Row>
      <Cell className="min-w-32">
        <Link to={`/product/rules/${name}`} data-row className="font-bold underline decoration-1 underline-offset-4">
          {tableName}
        </Link>
        <span className="block text-xs break-words text-soft">{name}</span>
      </Cell>
      <Cell className="whitespace-nowrap tabular-nums">
        {current?.version ?? <span className="text-near">{t('limits.noneShort')}</span>}
      </Cell>
      <Cell className="whitespace-nowrap max-md:hidden">{current?.inForceFrom && f.date(current.inForceFrom)}</Cell>
      <Cell className="max-md:hidden">
        {current && (
          <>
            <span className="font-[650]">{t(`rules.label.${current.label}`)}</span>
            <span className="line-clamp-2 break-words text-soft">{current.source}</span>
          </>
        )}
      </Cell>
      <Cell className="min-w-36 max-xl:hidden">
        {current?.draftedBy ?? t('nobody')}
        {current?.secondedBy && (
          <span className="block text-xs text-soft">{t('limits.secondedByShort', { name: current.secondedBy })}</span>
        )}
      </Cell>
      <Cell className="min-w-28 md:min-w-44">
        {waiting.map((one) => (
          <span key={one.id} className={`block ${one.stale ? 'text-soft' : 'font-[650] text-near'}`}>
            {one.standing === 'seconded' && one.inForceFrom !== null
              ? t('rules.comesAt', { version: one.version, time: f.time(one.inForceFrom) })
              : t(one.stale ? 'rules.staleDraft' : 'rules.draftBy', {
                  version: one.version,
                  name: one.draftedBy ?? t('nobody'),
                })}
          </span>
        ))}
      </Cell>
    </Row>
  )
}
