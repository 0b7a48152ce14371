import { useTranslation } from 'react-i18next'
import { useNavigate, useSearchParams } from 'react-router-dom'
import type { SessionUser } from '#contract/account.ts'
import { SignInForm } from '../../features/account/SignInForm.tsx'
import { useTitle } from '../../lib/title.ts'
import { Notice } from '../../ui/Notice.tsx'
import { Sheet } from '../../ui/Sheet.tsx'

const desks: Record<SessionUser['role'], string> = {
  rider: '/account',
  support: '/desk/orders',
  product: '/product/wheelsets',
  admin: '/desk/orders',
}

/** Only a path of our own may be named as the way on; anything else falls back to the person's own first page. */
const wayOn = (next: string | null, user: SessionUser) =>
  next !== null && /^\/(?![/\\])[\w/?=&.%-]*$/.test(next) ? next : desks[user.role]

export function SignInPage() {
  const { t } = useTranslation('account')
  const navigate = useNavigate()
  const [params] = useSearchParams()
  useTitle(t('signIn.title'))
  return (
    <Sheet className="md:max-w-4xl">
      <div className="grid gap-8 px-5 py-8 md:grid-cols-[1.1fr_1fr] md:px-10 md:py-12">
        <div>
          <h1>{t('signIn.title')}</h1>
          <p className="mt-2 mb-6 text-soft">{t('signIn.lede')}</p>
          <SignInForm onDone={(user) => void navigate(wayOn(params.get('next'), user), { replace: true })} />
        </div>
        <Notice title={t('signIn.demoTitle')} className="self-start">
          <p>{t('signIn.demoText')}</p>
          <dl className="mt-2 grid gap-2">
            {(['rider', 'support', 'product', 'product2', 'admin'] as const).map((who) => (
              <div key={who}>
                <dt className="text-sm text-soft">{t(`signIn.roles.${who}`)}</dt>
                <dd className="text-sm break-all">{t('signIn.demoLine', { who })}</dd>
              </div>
            ))}
          </dl>
        </Notice>
      </div>
    </Sheet>
  )
}
