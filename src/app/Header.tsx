import { useTranslation } from 'react-i18next'
import { Link, NavLink } from 'react-router-dom'
import { useBasketCount } from '../lib/basket-count.ts'
import { useSession } from '../lib/session.ts'
import { SettingsPanel } from './SettingsPanel.tsx'

const link = ({ isActive }: { isActive: boolean }) =>
  `inline-flex min-h-11 items-center border-b-2 whitespace-nowrap no-underline ${isActive ? 'border-own font-[650] text-ink' : 'border-transparent text-soft hover:text-ink'}`

function Mark() {
  return (
    <Link
      to="/"
      className="flex min-h-11 items-center gap-2.5 text-[1.3rem] font-extrabold tracking-tight text-ink no-underline"
    >
      <svg aria-hidden viewBox="0 0 30 30" className="size-[30px]" fill="none">
        <circle cx="15" cy="15" r="12.6" stroke="currentColor" strokeWidth="3.6" />
        <path d="M15 2.4A12.6 12.6 0 0 1 25.9 8.7" stroke="var(--own)" strokeWidth="3.8" />
        <circle cx="15" cy="15" r="2.6" fill="currentColor" />
      </svg>
      Felloe
    </Link>
  )
}

/** Name, the four ways in, and the tools. Staff see their desks beside them. */
export function Header() {
  const { t } = useTranslation()
  const { data } = useSession()
  const basket = useBasketCount()
  const user = data?.user ?? null
  const desks = [
    ...(user?.role === 'support' || user?.role === 'admin'
      ? [{ to: '/desk/orders', label: t('nav.supportDesk') }]
      : []),
    ...(user?.role === 'product' || user?.role === 'admin'
      ? [{ to: '/product/wheelsets', label: t('nav.productDesk') }]
      : []),
  ]
  return (
    <header className="no-print border-b border-line bg-sheet">
      <div className="mx-auto flex max-w-sheet flex-wrap items-center gap-x-7 px-5 pt-2 md:px-8 md:pt-0">
        <Mark />
        <nav
          aria-label={t('nav.main')}
          className="order-3 -mx-5 flex w-[calc(100%+2.5rem)] gap-x-5 overflow-x-auto px-5 text-[0.9375rem] lg:order-none lg:mx-0 lg:w-auto lg:px-0"
        >
          <NavLink to="/fitting" className={link}>
            {t('nav.fitting')}
          </NavLink>
          <NavLink to="/range" className={link}>
            {t('nav.range')}
          </NavLink>
          <NavLink to="/side-by-side" className={link}>
            {t('nav.sideBySide')}
          </NavLink>
          <NavLink to="/working" className={link}>
            {t('nav.working')}
          </NavLink>
          {desks.map(({ to, label }) => (
            <NavLink key={to} to={to} className={link}>
              {label}
            </NavLink>
          ))}
        </nav>
        <div className="ms-auto flex items-center gap-x-4 text-sm">
          <SettingsPanel />
          {user ? (
            <NavLink to="/account" className={link}>
              {t('nav.account')}
            </NavLink>
          ) : (
            <NavLink to="/sign-in" className={link}>
              {t('nav.signIn')}
            </NavLink>
          )}
          <NavLink to="/basket" className={link} aria-label={t('nav.basketCount', { count: basket })}>
            {t('nav.basket')}
            {basket > 0 && (
              <span className="ms-1.5 inline-flex min-w-5 justify-center bg-own px-1 text-xs font-bold text-sheet">
                {basket}
              </span>
            )}
          </NavLink>
        </div>
      </div>
    </header>
  )
}
