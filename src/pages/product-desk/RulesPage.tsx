import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { rulesQuery } from '../../features/product-desk/rule-queries.ts'
import { RuleTableList } from '../../features/product-desk/RuleTableList.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useTitle } from '../../lib/title.ts'
import { Waiting } from '../../ui/Waiting.tsx'

/** The tables that the sums go by, those with something waiting first. */
export function RulesPage() {
  const { t } = useTranslation(['product-desk', 'common'])
  useTitle(t('rules.title'))
  const { data, error, isPending, refetch } = useQuery(rulesQuery())
  if (isPending) return <Waiting label={t('common:waiting')} rows={8} />
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />
  const waits = (count: number) => (count > 0 ? 0 : 1)
  const rows = data.items.toSorted((a, b) => waits(a.waiting.length) - waits(b.waiting.length))
  const waiting = data.items.reduce((sum, row) => sum + row.waiting.length, 0)
  return (
    <>
      <h1 className="text-2xl!">{t('rules.title')}</h1>
      <p className="mt-1 mb-3 max-w-[72ch] text-sm text-soft">{t('rules.lede')}</p>
      <p role="status" className="mb-1 text-sm text-soft">
        {t('rules.waiting', { count: waiting })}
      </p>
      <RuleTableList rows={rows} />
    </>
  )
}
