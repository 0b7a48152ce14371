import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useNavigate } from 'react-router-dom'
import type { Bike } from '#contract/account.ts'
import { BikeForm } from '../../features/account/BikeForm.tsx'
import { useBikes, useForgetBike, useOwnOrders } from '../../features/account/queries.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { useSession, useSignOut } from '../../lib/session.ts'
import { useTitle } from '../../lib/title.ts'
import { Button, ButtonLink } from '../../ui/Button.tsx'
import { Sheet } from '../../ui/Sheet.tsx'
import { Waiting } from '../../ui/Waiting.tsx'

export function AccountPage() {
  const { t } = useTranslation('account')
  const navigate = useNavigate()
  const { data, isPending } = useSession()
  const leave = useSignOut()
  useTitle(t('title'))
  if (isPending) return <Waiting label={t('waiting')} className="mx-auto max-w-sheet p-5" />
  if (!data?.user) {
    return (
      <Sheet className="md:max-w-3xl">
        <div className="grid justify-items-start gap-3 px-5 py-12 md:px-10">
          <h1>{t('signedOut.title')}</h1>
          <p className="text-soft">{t('signedOut.text')}</p>
          <ButtonLink to="/sign-in?next=/account">{t('signIn.enter')}</ButtonLink>
        </div>
      </Sheet>
    )
  }
  return (
    <Sheet>
      <div className="flex flex-wrap items-end justify-between gap-4 px-5 pt-8 pb-5 md:px-9">
        <div>
          <h1>{data.user.name}</h1>
          <p className="text-soft">
            {data.user.email} · {t(`roles.${data.user.role}`)}
          </p>
        </div>
        <Button
          kind="plain"
          busy={leave.isPending}
          onClick={() => {
            leave.mutate(undefined, { onSuccess: () => void navigate('/') })
          }}
        >
          {t('signOut')}
        </Button>
      </div>
      <div className="grid border-t border-ink lg:grid-cols-2">
        <Bikes />
        <Orders />
      </div>
    </Sheet>
  )
}

function Bikes() {
  const { t } = useTranslation('account')
  const { data, error, refetch } = useBikes()
  const forget = useForgetBike()
  const [open, setOpen] = useState<Bike | 'new' | null>(null)
  const facts = (bike: Bike) =>
    [bike.brakes, bike.frontAxle, bike.rearAxle, bike.freehub, bike.rotorMount]
      .filter((fact) => fact !== null)
      .map((fact) => t([`bike.values.${fact}`, fact]))
      .join(' · ')
  return (
    <section className="border-line px-5 py-7 md:px-9 lg:border-e">
      <h2>{t('bikes.title')}</h2>
      <p className="mt-1 text-[0.9375rem] text-soft">{t('bikes.text')}</p>
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} className="mt-4" />}
      {open !== null ? (
        <div className="mt-5 border-t border-ink pt-5">
          <BikeForm
            key={open === 'new' ? 'new' : open.id}
            bike={open === 'new' ? null : open}
            onDone={() => {
              setOpen(null)
            }}
          />
        </div>
      ) : (
        <>
          <ul className="mt-4 border-t border-ink">
            {data?.items.map((bike) => (
              <li key={bike.id} className="flex flex-wrap items-center justify-between gap-2 border-b border-line py-3">
                <span className="min-w-0">
                  <span className="block font-[650]">{bike.name}</span>
                  <span className="block text-sm text-soft">{facts(bike) || t('bikes.nothingKnown')}</span>
                </span>
                <span className="flex gap-2">
                  <Button
                    kind="plain"
                    small
                    onClick={() => {
                      setOpen(bike)
                    }}
                    aria-label={t('bikes.changeOne', { name: bike.name })}
                  >
                    {t('bikes.change')}
                  </Button>
                  <Button
                    kind="plain"
                    small
                    busy={forget.isPending}
                    onClick={() => {
                      forget.mutate(bike.id)
                    }}
                    aria-label={t('bikes.forgetOne', { name: bike.name })}
                  >
                    {t('bikes.forget')}
                  </Button>
                </span>
              </li>
            ))}
            {data?.items.length === 0 && <li className="border-b border-line py-3 text-soft">{t('bikes.none')}</li>}
          </ul>
          <Button
            kind="plain"
            className="mt-4"
            onClick={() => {
              setOpen('new')
            }}
          >
            {t('bikes.add')}
          </Button>
        </>
      )}
    </section>
  )
}

function Orders() {
  const { t } = useTranslation('account')
  const format = useFormat()
  const { data, error, refetch } = useOwnOrders()
  return (
    <section className="border-line px-5 py-7 max-lg:border-t md:px-9">
      <h2>{t('orders.title')}</h2>
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} className="mt-4" />}
      <ul className="mt-4 border-t border-ink">
        {data?.items.map((order) => (
          <li key={order.orderNumber} className="border-b border-line py-3">
            <Link to={`/orders/${order.orderNumber}`} className="flex flex-wrap justify-between gap-x-4">
              <span className="font-[650]">{order.titles.join(', ')}</span>
              <span>{format.money(order.totalCents, order.currency)}</span>
            </Link>
            <p className="text-sm text-soft">
              {order.orderNumber} · {format.date(order.createdAt)} · {t(`checkout:state.${order.state}`)}
            </p>
          </li>
        ))}
        {data?.items.length === 0 && <li className="border-b border-line py-3 text-soft">{t('orders.none')}</li>}
      </ul>
    </section>
  )
}
