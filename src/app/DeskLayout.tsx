import { useTranslation } from 'react-i18next'
import { Navigate, NavLink, Outlet, useLocation } from 'react-router-dom'
import type { Role } from '#contract/common.ts'
import { ApiError } from '../lib/api.ts'
import { useSession } from '../lib/session.ts'
import { Waiting } from '../ui/Waiting.tsx'

const tab = ({ isActive }: { isActive: boolean }) =>
  `inline-flex min-h-11 items-center border-b-2 px-0.5 whitespace-nowrap no-underline ${isActive ? 'border-ink font-bold text-ink' : 'border-transparent text-soft hover:text-ink'}`

const desks: { key: 'supportDesk' | 'productDesk'; roles: readonly Role[]; tabs: { to: string; key: string }[] }[] = [
  {
    key: 'supportDesk',
    roles: ['support', 'admin'],
    tabs: [{ to: '/desk/orders', key: 'orders' }],
  },
  {
    key: 'productDesk',
    roles: ['product', 'admin'],
    tabs: [
      { to: '/product/wheelsets', key: 'wheelsets' },
      { to: '/product/limits', key: 'limits' },
      { to: '/product/rules', key: 'rules' },
    ],
  },
]

/** The frame of both desks: wide, dense, its own row of tabs. Hides nothing that matters: the server asks for the role on every call. */
export function DeskLayout() {
  const { t } = useTranslation()
  const { pathname, search } = useLocation()
  const { data, isPending } = useSession()
  if (isPending) return <Waiting label={t('waiting')} className="p-6" />
  const user = data?.user
  if (!user) return <Navigate to={`/sign-in?next=${encodeURIComponent(pathname + search)}`} replace />
  const own = desks.filter(({ roles }) => roles.includes(user.role))
  const asked = desks.find(({ tabs }) => tabs.some(({ to }) => pathname.startsWith(to)))
  const mayRead = asked?.roles.includes(user.role) ?? own.length > 0
  if (!mayRead) throw notAllowed()
  return (
    <div className="relative mx-auto w-full max-w-[100rem] bg-sheet md:border md:border-strong print:border-0">
      <nav
        aria-label={t('nav.desks')}
        className="no-print flex flex-wrap items-center gap-x-8 border-b border-line px-4 text-[0.9375rem] md:px-6"
      >
        {own.map(({ key, tabs }) => (
          <div key={key} className="flex items-center gap-x-5">
            <span className="text-xs text-soft">{t(`nav.${key}`)}</span>
            {tabs.map((one) => (
              <NavLink key={one.to} to={one.to} className={tab}>
                {t(`nav.desk.${one.key}`)}
              </NavLink>
            ))}
          </div>
        ))}
        <span className="ms-auto hidden text-sm text-soft sm:block">{user.name}</span>
      </nav>
      <div className="px-4 py-5 md:px-6">
        <Outlet />
      </div>
    </div>
  )
}

const notAllowed = () =>
  new ApiError({
    type: '/problems/not-allowed',
    title: '',
    status: 403,
    detail: '',
    instance: '',
    code: 'not-allowed',
    requestId: '',
  })
