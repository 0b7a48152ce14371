import { useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import type { LimitRow, LimitVersionView } from '#contract/product-desk.ts'
import { useFormat, type Format } from '../../lib/format.ts'
import { Cell, DataTable, Row } from '../../ui/DataTable.tsx'

/** Every wheelset's limit in force; a row opens to all its dated versions. */
export function LimitTable({ rows }: { rows: readonly LimitRow[] }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  const [open, setOpen] = useState<string | null>(null)
  const kg = (value: number) => kgText(f, value)
  const columns = [
    { key: 'wheelset', head: t('column.wheelset') },
    { key: 'limit', head: t('column.limit'), figure: true },
    { key: 'since', head: t('limits.since'), figure: true, className: 'max-sm:hidden' },
    { key: 'proof', head: t('limits.proof'), className: 'max-md:hidden' },
    { key: 'versions', head: t('limits.versions'), figure: true },
  ]
  return (
    <DataTable caption={t('limits.title')} columns={columns}>
      {rows.map(({ sku, name, onSale, current, versions }) => (
        <RowPair key={sku} open={open === sku} versions={versions} columns={columns.length}>
          <Cell>
            <button
              type="button"
              data-row
              aria-expanded={open === sku}
              className="text-start font-bold whitespace-nowrap underline decoration-1 underline-offset-4"
              onClick={() => setOpen(open === sku ? null : sku)}
            >
              {name}
            </button>
            <span className="block text-xs text-soft">
              {sku}
              {!onSale && ` · ${t('sale.off')}`}
            </span>
          </Cell>
          <Cell figure className="font-bold">
            {current ? kg(current.limitKg) : <span className="text-near">{t('limits.noneShort')}</span>}
          </Cell>
          <Cell figure className="max-sm:hidden">
            {current?.inForceFrom && f.date(current.inForceFrom)}
          </Cell>
          <Cell className="max-md:hidden">
            <span className="line-clamp-1 break-words text-soft">{current?.proof}</span>
          </Cell>
          <Cell figure>{f.number(versions.length)}</Cell>
        </RowPair>
      ))}
    </DataTable>
  )
}

function RowPair({
  open,
  versions,
  columns,
  children,
}: {
  open: boolean
  versions: readonly LimitVersionView[]
  columns: number
  children: ReactNode
}) {
  return (
    <>
      <Row>{children}</Row>
      {open && (
        <tr className="border-b border-line bg-ground">
          <td colSpan={columns} className="px-3 py-2">
            <VersionList versions={versions} />
          </td>
        </tr>
      )}
    </>
  )
}

/** Limits are kept and seconded in kilograms, whatever units the reader prefers. */
const kgText = (f: Format, value: number) => `${f.number(value, Number.isInteger(value) ? 0 : 1)}\u00a0kg`

function VersionList({ versions }: { versions: readonly LimitVersionView[] }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  return (
    <ol className="grid gap-2 text-sm">
      {versions.map((one) => (
        <li key={one.id} className="grid gap-x-4 sm:grid-cols-[5rem_9rem_1fr]">
          <span
            className={one.standing === 'in-force' ? 'font-bold' : one.standing === 'rejected' ? 'line-through' : ''}
          >
            {kgText(f, one.limitKg)}
          </span>
          <span className="font-[650]">{t(`limits.standing.${one.standing}`)}</span>
          <span className="min-w-0 break-words">
            {one.reason}{' '}
            {one.proof !== '' && <span className="text-soft">{t('limits.proofIs', { proof: one.proof })}</span>}
            <span className="block text-xs text-soft">
              {[
                one.inForceFrom && t('limits.from', { time: f.time(one.inForceFrom) }),
                one.draftedBy && t('limits.draftedByShort', { name: one.draftedBy }),
                one.secondedBy && t('limits.secondedByShort', { name: one.secondedBy }),
              ]
                .filter(Boolean)
                .join(' · ')}
            </span>
          </span>
        </li>
      ))}
    </ol>
  )
}
