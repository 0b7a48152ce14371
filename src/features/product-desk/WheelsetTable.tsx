import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { currencies } from '#contract/common.ts'
import type { ProductRow } from '#contract/product-desk.ts'
import { useFormat } from '../../lib/format.ts'
import { Cell, DataTable, Row } from '../../ui/DataTable.tsx'
import { DepthMark } from './DepthMark.tsx'

export function WheelsetTable({ rows }: { rows: readonly ProductRow[] }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  const columns = [
    { key: 'name', head: t('column.wheelset') },
    { key: 'build', head: t('column.build'), className: 'max-lg:hidden' },
    { key: 'depth', head: t('column.depth'), className: 'max-md:hidden' },
    { key: 'spokes', head: t('column.spokes'), figure: true, className: 'max-lg:hidden' },
    { key: 'limit', head: t('column.limit'), figure: true },
    ...currencies.map((currency) => ({
      key: currency,
      head: currency,
      figure: true,
      className: currency === 'EUR' ? '' : 'max-md:hidden',
    })),
    { key: 'stock', head: t('column.stock'), figure: true },
    { key: 'sale', head: t('column.sale'), className: 'max-sm:hidden' },
  ]
  return (
    <DataTable caption={t('wheelsets.title')} columns={columns}>
      {rows.map((row) => (
        <Row key={row.sku}>
          <Cell>
            <Link data-row to={`/product/wheelsets/${row.sku}`} className="font-bold text-ink">
              {row.name}
            </Link>
            <span className="block text-xs break-words text-soft">{row.sku}</span>
          </Cell>
          <Cell className="max-lg:hidden">
            {t(`brake.${row.brake}`)}, {row.beadSeatMm}
            <span className="block text-xs text-soft">{t(`buildKind.${row.buildKind}`)}</span>
          </Cell>
          <Cell className="max-md:hidden">
            <DepthMark frontMm={row.depthFrontMm} rearMm={row.depthRearMm} />
          </Cell>
          <Cell figure className="max-lg:hidden">
            {row.spokesFront} / {row.spokesRear}
          </Cell>
          <Cell figure>
            {row.limitKg === null ? (
              <span className="font-bold text-near">{t('limits.noneShort')}</span>
            ) : (
              `${f.number(row.limitKg, Number.isInteger(row.limitKg) ? 0 : 1)}\u00a0kg`
            )}
            {row.draftedLimits > 0 && (
              <span className="ms-auto block max-w-32 text-xs font-bold whitespace-normal text-near">
                {t('wheelsets.drafted', { count: row.draftedLimits })}
              </span>
            )}
          </Cell>
          {currencies.map((currency) => (
            <Cell key={currency} figure className={currency === 'EUR' ? '' : 'max-md:hidden'}>
              {row.prices[currency] === undefined ? '–' : f.number(row.prices[currency] / 100, 2)}
            </Cell>
          ))}
          <Cell figure>
            {f.number(row.onHand)}
            {row.onHand <= row.reserved && (
              <span className="block text-xs font-bold text-near">{t('wheelsets.noneFree')}</span>
            )}
            {row.reserved > 0 && (
              <span className="block text-xs text-soft">{t('wheelsets.reserved', { count: row.reserved })}</span>
            )}
          </Cell>
          <Cell className="max-sm:hidden">
            {row.onSale ? (
              <span className="text-soft">{t('sale.on')}</span>
            ) : (
              <span className="border border-ink px-1.5 text-xs font-[650]">{t('sale.off')}</span>
            )}
            {row.missingTexts.length > 0 && (
              <span className="block text-xs font-bold text-near">
                {t('wheelsets.missingTexts', { languages: row.missingTexts.join(', ').toUpperCase() })}
              </span>
            )}
          </Cell>
        </Row>
      ))}
    </DataTable>
  )
}
