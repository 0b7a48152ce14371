import { useTranslation } from 'react-i18next'
import type { ProductWheelset } from '#contract/product-desk.ts'
import { Button } from '../../ui/Button.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { differences, type WheelsetForm } from './wheelset-form.ts'

interface ConflictNoticeProps {
  typed: WheelsetForm
  present: ProductWheelset
  /** Mine stands; the next save is made on the present version. */
  onKeep: () => void
  /** Theirs stands; my typing goes. */
  onTake: () => void
}

/** Somebody saved first: what you typed and what stands there now, and a choice. Neither is lost unseen. */
export function ConflictNotice({ typed, present, onKeep, onTake }: ConflictNoticeProps) {
  const { t } = useTranslation(['product-desk', 'errors'])
  const found = differences(typed, present)
  return (
    <Notice tone="stop" title={t('errors:changed-meanwhile.title')}>
      <p>{t(found.length === 0 ? 'conflict.same' : 'conflict.explain')}</p>
      {found.length > 0 && (
        <table className="mt-3 w-full border-collapse text-sm">
          <thead>
            <tr className="border-b border-ink text-start text-xs text-soft">
              <th scope="col" className="py-1 pe-3 text-start">
                {t('conflict.field')}
              </th>
              <th scope="col" className="py-1 pe-3 text-start">
                {t('conflict.typed')}
              </th>
              <th scope="col" className="py-1 text-start">
                {t('conflict.present')}
              </th>
            </tr>
          </thead>
          <tbody>
            {found.map(({ name, typed: mine, present: theirs }) => (
              <tr key={name} className="border-b border-line align-top">
                <th scope="row" className="py-1 pe-3 text-start font-medium text-soft">
                  {t(`field.${name.replaceAll('.', '-')}`)}
                </th>
                <td className="py-1 pe-3 break-words text-own">{mine}</td>
                <td className="py-1 break-words">{theirs}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      <div className="mt-3 flex flex-wrap gap-3">
        <Button small onClick={onKeep}>
          {t('conflict.keep')}
        </Button>
        <Button kind="plain" small onClick={onTake}>
          {t('conflict.take')}
        </Button>
      </div>
    </Notice>
  )
}
