import { useTranslation } from 'react-i18next'
import type { DeskMail } from '#contract/support-desk.ts'
import { useFormat } from '../../lib/format.ts'
import { Verdict } from '../../ui/Verdict.tsx'

const standings = { sent: 'within', queued: 'near', failed: 'over' } as const

/** Every mail about the order, its text as it left, and proof of when. */
export function OrderMails({ mails }: { mails: readonly DeskMail[] }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  if (mails.length === 0) return <p className="text-soft">{t('mail.none')}</p>
  return (
    <ul>
      {mails.map((mail) => (
        <li key={mail.id} className="border-b border-line">
          <details className="group">
            <summary className="grid grid-cols-[0.75rem_1fr_auto] items-baseline gap-x-2 py-1.5 hover:bg-ground">
              <span aria-hidden className="text-soft transition-transform group-open:rotate-90">
                ›
              </span>
              <span className="font-[650]">{mail.subject}</span>
              <Verdict standing={standings[mail.state]}>{t(`mail.state.${mail.state}`)}</Verdict>
              <span className="col-start-2 text-xs text-soft">
                {t('mail.facts', {
                  recipient: mail.recipient,
                  time: f.time(mail.sentAt ?? mail.createdAt),
                  count: mail.attempts,
                })}
              </span>
            </summary>
            <div className="mb-3 ms-5 border-s border-strong ps-3">
              {mail.lastError !== null && (
                <p className="mb-2 font-[650]">{t('mail.lastError', { error: mail.lastError })}</p>
              )}
              <p lang={mail.locale} className="max-w-[72ch] break-words whitespace-pre-wrap">
                {mail.text}
              </p>
            </div>
          </details>
        </li>
      ))}
    </ul>
  )
}
