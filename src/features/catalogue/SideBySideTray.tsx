import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import { Button, ButtonLink } from '../../ui/Button.tsx'
import { MOST, sideBySidePath, useSideBySide } from './side-by-side.ts'

/** At the foot of the range while something is chosen: how many, which, and the way on. */
export function SideBySideTray({ sets }: { sets: readonly Wheelset[] }) {
  const { t } = useTranslation('catalogue')
  const { slugs, set } = useSideBySide()
  const names = slugs.flatMap((slug) => sets.find((one) => one.slug === slug)?.name ?? [])
  return (
    <section aria-label={t('compare.tray')} className="no-print sticky bottom-0 z-20">
      <p role="status" className="sr-only">
        {slugs.length > 0 && t('compare.chosen', { count: slugs.length, most: MOST })}
      </p>
      {slugs.length > 0 && (
        <div className="flex flex-wrap items-center gap-x-4 gap-y-1 border-t-2 border-own bg-sheet px-5 py-2 md:mx-[8px] md:mb-[8px] md:px-7">
          <p className="min-w-0 flex-1 leading-snug">
            <span className="font-bold">{t('compare.chosen', { count: slugs.length, most: MOST })}</span>
            <span className="block truncate text-sm text-soft max-sm:hidden">{names.join(' · ')}</span>
          </p>
          <Button
            kind="quiet"
            small
            onClick={() => {
              set([])
            }}
          >
            {t('compare.clear')}
          </Button>
          {slugs.length === 1 ? (
            <span className="py-2 text-sm text-soft">{t('compare.one')}</span>
          ) : (
            <ButtonLink small to={sideBySidePath(slugs)} className="min-h-11!">
              {t('compare.go')}
            </ButtonLink>
          )}
        </div>
      )}
    </section>
  )
}
