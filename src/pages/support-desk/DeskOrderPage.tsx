import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { Link, useParams } from 'react-router-dom'
import type { DeskOrder } from '#contract/support-desk.ts'
import { AuditTrail } from '../../features/product-desk/AuditTrail.tsx'
import { FrozenAdvicePanel } from '../../features/support-desk/FrozenAdvicePanel.tsx'
import { NoteForm } from '../../features/support-desk/NoteForm.tsx'
import { OrderLines } from '../../features/support-desk/OrderLines.tsx'
import { OrderMails } from '../../features/support-desk/OrderMails.tsx'
import { OrderMoney } from '../../features/support-desk/OrderMoney.tsx'
import { OrderStateMark } from '../../features/support-desk/OrderStateMark.tsx'
import { OrderTimeline } from '../../features/support-desk/OrderTimeline.tsx'
import { Panel } from '../../features/support-desk/Panel.tsx'
import { orderQuery } from '../../features/support-desk/queries.ts'
import { RefundBox } from '../../features/support-desk/RefundBox.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { useTitle } from '../../lib/title.ts'
import { Waiting } from '../../ui/Waiting.tsx'

/** Everything about one order on one page: goods, money, mails, advice, what happened. */
export function DeskOrderPage() {
  const { t } = useTranslation('support-desk')
  const { orderNumber = '' } = useParams()
  useTitle(orderNumber)
  const { data, error, isPending, refetch } = useQuery(orderQuery(orderNumber))
  if (isPending) return <Waiting label={t('common:waiting')} rows={8} />
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />
  return (
    <>
      <Head order={data} />
      <div className="grid gap-x-10 gap-y-7 lg:grid-cols-[minmax(0,1.7fr)_minmax(0,1fr)]">
        <div className="grid content-start gap-7">
          <Panel title={t('line.title')}>
            <OrderLines lines={data.lines} />
          </Panel>
          <Panel title={t('money.title', { currency: data.money.currency })}>
            <OrderMoney money={data.money} />
          </Panel>
          <Panel title={t('refund.title')} className="no-print">
            <RefundBox orderNumber={data.orderNumber} buyer={data.name} lines={data.lines} money={data.money} />
          </Panel>
          <Panel title={t('mail.title', { count: data.mails.length })}>
            <OrderMails mails={data.mails} />
          </Panel>
          <Panel title={t('timeline.title')}>
            <div className="grid gap-x-10 gap-y-5 sm:grid-cols-[minmax(0,1.2fr)_minmax(0,1fr)]">
              <OrderTimeline events={data.timeline} />
              <div className="no-print">
                <NoteForm orderNumber={data.orderNumber} />
              </div>
            </div>
          </Panel>
          <Panel title={t('audit.title')}>
            <AuditTrail subjectType="order" subjectId={data.orderNumber} />
          </Panel>
        </div>
        <div className="grid content-start gap-7">
          <Panel title={t('delivery.title')}>
            <Delivery order={data} />
          </Panel>
          <Panel title={t('advice.title')}>
            <FrozenAdvicePanel advice={data.advice} orderNumber={data.orderNumber} />
          </Panel>
        </div>
      </div>
    </>
  )
}

function Head({ order }: { order: DeskOrder }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  return (
    <div className="mb-6">
      <Link to="/desk/orders" className="quiet-link no-print text-sm">
        {t('orders.back')}
      </Link>
      <div className="mt-1 flex flex-wrap items-baseline gap-x-6 gap-y-1">
        <h1 className="text-2xl!">{order.orderNumber}</h1>
        <OrderStateMark state={order.state} />
        <p className="ms-auto text-sm text-soft">
          {t(order.placedAt === null ? 'orders.started' : 'orders.placed', {
            time: f.time(order.placedAt ?? order.createdAt),
          })}
        </p>
      </div>
      <p className="text-[0.9375rem]">
        <span className="font-[650]">{order.name}</span> · <a href={`mailto:${order.email}`}>{order.email}</a> ·{' '}
        {t(`language.${order.locale}`)}
      </p>
    </div>
  )
}

function Delivery({ order }: { order: DeskOrder }) {
  const { name, line1, line2, postcode, city, region, country, phone } = order.delivery
  return (
    <address className="grid not-italic">
      {[name, line1, line2, `${postcode} ${city}`, [region, country].filter(Boolean).join(', '), phone]
        .filter(Boolean)
        .map((line) => (
          <span key={line}>{line}</span>
        ))}
    </address>
  )
}
