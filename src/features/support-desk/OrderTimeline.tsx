import { useTranslation } from 'react-i18next'
import type { DeskEvent } from '#contract/support-desk.ts'
import { useFormat } from '../../lib/format.ts'

/** What happened, newest first: when, what, who, why. */
export function OrderTimeline({ events }: { events: readonly DeskEvent[] }) {
  const { t } = useTranslation('support-desk')
  const f = useFormat()
  // People write sentences; the shop itself writes codes, which the language files put into words.
  const inWords = (codes: string) =>
    codes
      .split(', ')
      .map((cause) => t([`cause.${cause}`, 'cause.other'], { cause }))
      .join('; ')
  return (
    <ol>
      {[...events].reverse().map((event) => (
        <li key={event.id} className="relative ms-1 border-s border-strong pb-3 ps-4 last:border-transparent last:pb-0">
          <span
            aria-hidden
            className={`absolute -start-[4.5px] top-1.5 size-2 ${event.kind === 'note' ? 'border border-ink bg-sheet' : 'bg-ink'}`}
          />
          <span className="flex flex-wrap justify-between gap-x-3">
            <span className="font-[650]">{t([`event.${event.kind}`, 'event.other'], { kind: event.kind })}</span>
            <time dateTime={event.createdAt} className="text-soft">
              {f.time(event.createdAt)}
            </time>
          </span>
          <span className="block text-xs text-soft">
            {event.actorName ?? t([`actor.${event.actorRole}`, 'actor.machine'])}
            {event.toState !== null && event.fromState !== null && event.toState !== event.fromState && (
              <> · {t('event.moved', { from: t(`state.${event.fromState}`), to: t(`state.${event.toState}`) })}</>
            )}
          </span>
          {event.reason !== null && (
            <p className="mt-0.5 break-words whitespace-pre-wrap">
              {event.actorName === null ? inWords(event.reason) : event.reason}
            </p>
          )}
        </li>
      ))}
    </ol>
  )
}
