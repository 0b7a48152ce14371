import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { staffReason } from '#contract/common.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords } from '../../lib/form-words.ts'
import { Button } from '../../ui/Button.tsx'
import { Field, TextArea } from '../../ui/Field.tsx'

interface AskReasonProps {
  label: string
  hint?: string
  action: string
  busy: boolean
  error: unknown
  onGive: (reason: string) => void
  onCancel?: () => void
}

/** One field and one button: why, then do. The text stays while the server has not said yes. */
export function AskReason({ label, hint, action, busy, error, onGive, onCancel }: AskReasonProps) {
  const { t } = useTranslation(['support-desk', 'errors', 'common'])
  const [text, setText] = useState('')
  const [wrong, setWrong] = useState<string>()
  return (
    <form
      noValidate
      className="grid gap-3"
      onSubmit={(event) => {
        event.preventDefault()
        const read = staffReason.safeParse(text, { error: codeOf })
        setWrong(read.success ? undefined : inWords(t, read.error.issues[0]?.message))
        if (read.success) onGive(read.data)
      }}
    >
      <Field label={label} hint={hint} error={wrong}>
        {(ids) => (
          <TextArea
            {...ids}
            rows={2}
            maxLength={500}
            value={text}
            className="min-h-10! py-1.5!"
            onChange={(event) => {
              setText(event.target.value)
            }}
          />
        )}
      </Field>
      {error !== null && <ErrorNotice error={error} />}
      <div className="flex flex-wrap gap-3">
        <Button type="submit" small busy={busy}>
          {action}
        </Button>
        {onCancel && (
          <Button kind="plain" small onClick={onCancel}>
            {t('common:cancel')}
          </Button>
        )}
      </div>
    </form>
  )
}
