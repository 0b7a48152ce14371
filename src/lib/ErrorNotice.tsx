import { useTranslation } from 'react-i18next'
import { Button } from '../ui/Button.tsx'
import { Notice } from '../ui/Notice.tsx'
import { ApiError } from './api.ts'

/** A refusal or a fault in words: what happened, what to do, and the number to quote. */
export function ErrorNotice({
  error,
  onRetry,
  className,
}: {
  error: unknown
  onRetry?: () => void
  className?: string
}) {
  const { t } = useTranslation(['errors', 'common'])
  const known = error instanceof ApiError ? error.problem : null
  const code = known?.code ?? 'unknown'
  return (
    <Notice tone="stop" title={t([`errors:${code}.title`, 'errors:unknown.title'])} className={className}>
      <p>{t([`errors:${code}.detail`, 'errors:unknown.detail'], known?.data ?? {})}</p>
      {known?.errors && (
        <ul className="mt-1 list-disc ps-5">
          {known.errors.map(({ path, message }) => (
            <li key={path}>{message}</li>
          ))}
        </ul>
      )}
      {known && known.requestId !== '' && (
        <p className="mt-1 text-sm text-soft">{t('common:requestNumber', { id: known.requestId })}</p>
      )}
      {onRetry && (
        <Button kind="plain" small className="mt-3" onClick={onRetry}>
          {t('common:tryAgain')}
        </Button>
      )}
    </Notice>
  )
}
