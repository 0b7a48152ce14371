import { useRef, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { AskReason } from './AskReason.tsx'
import { useAddNote } from './queries.ts'

/** A note for colleagues; the buyer never sees it. */
export function NoteForm({ orderNumber }: { orderNumber: string }) {
  const { t } = useTranslation('support-desk')
  const add = useAddNote(orderNumber)
  const [round, setRound] = useState(0)
  const key = useRef(crypto.randomUUID())
  return (
    <AskReason
      key={round}
      label={t('note.label')}
      hint={t('note.hint')}
      action={t('note.add')}
      busy={add.isPending}
      error={add.error}
      onGive={(text) => {
        add.mutate(
          { text, idempotencyKey: key.current },
          {
            onSuccess: () => {
              key.current = crypto.randomUUID()
              setRound(round + 1)
            },
            // A refused call was not kept; a corrected text is a new one.
            onError: () => {
              key.current = crypto.randomUUID()
            },
          },
        )
      }}
    />
  )
}
