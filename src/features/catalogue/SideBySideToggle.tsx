import { useTranslation } from 'react-i18next'
import { useSideBySide } from './side-by-side.ts'

/** Chooses a wheelset for side by side. The fifth is refused with a reason, not silently. */
export function SideBySideToggle({ slug, name }: { slug: string; name: string }) {
  const { t } = useTranslation('catalogue')
  const { slugs, toggle, full } = useSideBySide()
  const on = slugs.includes(slug)
  const closed = full && !on
  return (
    <label
      className={`inline-flex min-h-11 items-center gap-2.5 text-sm font-semibold ${closed ? 'text-soft' : ''}`}
      title={closed ? t('compare.full') : undefined}
    >
      <input
        type="checkbox"
        className="size-5 flex-none scroll-mb-28 accent-own"
        aria-label={t('compare.addOne', { name })}
        checked={on}
        disabled={closed}
        onChange={() => {
          toggle(slug)
        }}
      />
      {closed ? t('compare.full') : t('compare.add')}
    </label>
  )
}
