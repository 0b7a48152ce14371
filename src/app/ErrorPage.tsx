import { useTranslation } from 'react-i18next'
import { isRouteErrorResponse, useRouteError } from 'react-router-dom'
import { ApiError } from '../lib/api.ts'
import { useTitle } from '../lib/title.ts'
import { ButtonLink } from '../ui/Button.tsx'
import { Sheet } from '../ui/Sheet.tsx'

type Kind = 'missing' | 'forbidden' | 'fault'

function kindOf(error: unknown): Kind {
  const status = isRouteErrorResponse(error)
    ? error.status
    : error instanceof ApiError
      ? error.problem.status
      : error
        ? 500
        : 404
  if (status === 404) return 'missing'
  return status === 401 || status === 403 ? 'forbidden' : 'fault'
}

/** A path that is not there, a door that stays shut, a page that failed: said plainly, with a way on. */
export function ErrorPage() {
  const { t } = useTranslation()
  const error = useRouteError()
  const kind = kindOf(error)
  useTitle(t(`page.${kind}.title`))
  return (
    <Sheet className="md:my-2">
      <div className="grid min-h-[24rem] content-center gap-4 px-5 py-16 md:px-12">
        <svg
          aria-hidden
          viewBox="0 0 120 60"
          className="w-40 text-strong"
          fill="none"
          stroke="currentColor"
          strokeWidth="2"
        >
          <path d="M8 60A52 52 0 0 1 60 8" />
          <path d="M72 9.5A52 52 0 0 1 112 60" stroke="var(--own)" strokeDasharray="5 5" />
          <path d="M60 60 34 15M60 60 86 15" strokeWidth="1" />
        </svg>
        <h1>{t(`page.${kind}.title`)}</h1>
        <p className="max-w-[52ch] text-soft">{t(`page.${kind}.text`)}</p>
        <p className="flex flex-wrap gap-3">
          <ButtonLink to="/">{t('page.home')}</ButtonLink>
          {kind === 'forbidden' && (
            <ButtonLink kind="plain" to="/sign-in">
              {t('nav.signIn')}
            </ButtonLink>
          )}
          <ButtonLink kind="plain" to="/range">
            {t('nav.range')}
          </ButtonLink>
        </p>
      </div>
    </Sheet>
  )
}
