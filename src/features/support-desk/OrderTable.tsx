import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { DeskOrderRow } from '#contract/support-desk.ts'
import { useFormat } from '../../lib/format.ts'
import { Cell, DataTable, Row } from '../../ui/DataTable.tsx'
import { LimitCheckMark } from './LimitCheckMark.tsx'
import { OrderStateMark } from './OrderStateMark.tsx'

/** What was found. On a phone the person's details move under the number. */
export function OrderTable({ orders }: { orders: readonly DeskOrderRow[] }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  const columns = [
    { key: 'number', head: t('column.number') },
    { key: 'person', head: t('column.person'), className: 'max-md:hidden' },
    { key: 'where', head: t('column.where'), className: 'max-lg:hidden' },
    { key: 'goods', head: t('column.goods'), className: 'max-md:hidden' },
    { key: 'limit', head: t('column.limitCheck'), className: 'max-lg:hidden' },
    { key: 'state', head: t('column.state') },
    { key: 'when', head: t('column.when'), figure: true, className: 'max-sm:hidden' },
    { key: 'total', head: t('column.total'), figure: true },
  ]
  return (
    <DataTable caption={t('orders.title')} columns={columns}>
      {orders.map((order) => (
        <Row key={order.orderNumber}>
          <Cell>
            <Link data-row to={`/desk/orders/${order.orderNumber}`} className="font-bold whitespace-nowrap text-ink">
              {order.orderNumber}
            </Link>
            <span className="mt-0.5 block md:hidden">{order.name}</span>
            <span className="block text-soft md:hidden">{order.titles.join(', ')}</span>
          </Cell>
          <Cell className="max-md:hidden">
            <span className="block font-[650]">{order.name}</span>
            <span className="block break-all text-soft">{order.email}</span>
          </Cell>
          <Cell className="whitespace-nowrap max-lg:hidden">
            {order.country} {order.postcode}
          </Cell>
          <Cell className="max-md:hidden">{order.titles.join(', ')}</Cell>
          <Cell className="max-lg:hidden">
            <LimitCheckMark check={order.limitCheck} />
          </Cell>
          <Cell>
            <OrderStateMark state={order.state} />
          </Cell>
          <Cell figure className="max-sm:hidden">
            {f.time(order.placedAt ?? order.createdAt)}
          </Cell>
          <Cell figure className="font-[650]">
            {f.number(order.totalCents / 100, 2)}{' '}
            <span className="text-xs font-medium text-soft">{order.currency}</span>
          </Cell>
        </Row>
      ))}
    </DataTable>
  )
}
