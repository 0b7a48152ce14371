import { useTranslation } from 'react-i18next'
import { useTitle } from '../../lib/title.ts'
import { Sheet } from '../../ui/Sheet.tsx'

/** How the numbers are made. */
export function WorkingPage() {
  const { t } = useTranslation('advisor')
  useTitle(t('fitting.title'))
  return <Sheet>{t('fitting.title')}</Sheet>
}
