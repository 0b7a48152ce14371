import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'

/** Who we are and what our numbers are not. The cautions beside each number say more. */
export function Footer() {
  const { t } = useTranslation()
  return (
    <footer className="mx-auto w-full max-w-sheet px-5 pt-8 pb-10 text-sm text-soft md:px-8 print:hidden">
      <div className="grid gap-6 border-t border-strong pt-5 md:grid-cols-[1.6fr_1fr]">
        <p className="max-w-[68ch]">{t('footer.caution')}</p>
        <div className="md:text-end">
          <p className="font-semibold text-ink">{t('footer.workshop')}</p>
          <p>{t('footer.invented')}</p>
          <p className="mt-2">
            <Link to="/working" className="quiet-link">
              {t('nav.working')}
            </Link>
          </p>
        </div>
      </div>
    </footer>
  )
}
