import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { DeskLine } from '#contract/support-desk.ts'
import { useFormat } from '../../lib/format.ts'
import { Cell, DataTable, Row } from '../../ui/DataTable.tsx'
import { LimitCheckMark } from './LimitCheckMark.tsx'
import { OrderStateMark } from './OrderStateMark.tsx'

const optionNames = ['frontAxle', 'rearAxle', 'freehub', 'rotorMount'] as const

export function OrderLines({ lines }: { lines: readonly DeskLine[] }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  const columns = [
    { key: 'title', head: t('line.wheelset') },
    { key: 'options', head: t('line.options'), className: 'max-sm:hidden' },
    { key: 'limit', head: t('line.limit') },
    { key: 'state', head: t('column.state'), className: 'max-md:hidden' },
    { key: 'quantity', head: t('line.quantity'), figure: true },
    { key: 'total', head: t('line.total'), figure: true },
  ]
  return (
    <DataTable caption={t('line.title')} columns={columns} still>
      {lines.map((line) => (
        <Row key={line.id}>
          <Cell>
            {line.slug === null ? (
              <span className="font-bold">{line.title}</span>
            ) : (
              <Link data-row to={`/range/${line.slug}`} className="font-bold text-ink">
                {line.title}
              </Link>
            )}
            <span className="block text-xs text-soft">{line.sku}</span>
            <span className="mt-1 block text-xs text-soft sm:hidden">
              {optionNames.flatMap((name) => line.options[name] ?? []).join(' · ')}
            </span>
          </Cell>
          <Cell className="max-sm:hidden">
            <dl className="grid grid-cols-[auto_1fr] gap-x-3">
              {optionNames.map((name) => {
                const value = line.options[name]
                return value === null ? null : (
                  <div key={name} className="contents">
                    <dt className="text-soft">{t(`option.${name}`)}</dt>
                    <dd>{t([`part.${value}`, 'part.asGiven'], { value })}</dd>
                  </div>
                )
              })}
            </dl>
          </Cell>
          <Cell>
            <LimitCheckMark check={line.limitCheck} />
            <span className="block text-xs whitespace-nowrap text-soft">
              {t('line.limitThen', { limit: f.mass(line.limitKg, 'down').text })}
            </span>
          </Cell>
          <Cell className="max-md:hidden">
            <OrderStateMark state={line.state} rail={false} />
          </Cell>
          <Cell figure>{f.number(line.quantity)}</Cell>
          <Cell figure className="font-[650]">
            {f.number(line.lineCents / 100, 2)}
          </Cell>
        </Row>
      ))}
    </DataTable>
  )
}
