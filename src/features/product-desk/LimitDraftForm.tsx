import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { useTranslation } from 'react-i18next'
import type { LimitDraft, LimitRow } from '#contract/product-desk.ts'
import { ApiError } from '../../lib/api.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords, listErrors, takeFieldErrors } from '../../lib/form-words.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorSummary } from '../../ui/ErrorSummary.tsx'
import { Field, Select, TextArea, TextInput } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { parseNumber } from '../../ui/NumberField.tsx'
import { limitSchema, type LimitForm } from './limit-form.ts'
import { LimitScale } from './LimitScale.tsx'
import { useDraftLimit } from './queries.ts'

const tight = 'min-h-10! py-1.5!'
type FieldName = 'sku' | 'limitKg' | 'proof' | 'reason' | 'inForceFrom'

/** Drafting a limit change. It counts only once somebody else has seconded it. */
export function LimitDraftForm({ rows, sku }: { rows: readonly LimitRow[]; sku: string }) {
  const { t } = useTranslation(['product-desk', 'errors'])
  const f = useFormat()
  const draft = useDraftLimit()
  const empty: LimitForm = { sku, limitKg: '', proof: '', reason: '', inForceFrom: '' }
  const form = useForm<LimitForm, unknown, LimitDraft>({
    resolver: zodResolver(limitSchema, { error: codeOf }),
    defaultValues: empty,
    shouldFocusError: false,
  })
  const typed = useWatch({ control: form.control })
  // One key for one draft: sending it again after a lost reply makes no second one.
  const [key, setKey] = useState('')
  const { errors, submitCount } = form.formState
  const listed = listErrors(errors)
  const current = rows.find((row) => row.sku === typed.sku)?.current ?? null
  const typedKg = parseNumber(typed.limitKg ?? '')
  const ids = (name: FieldName) => ({ id: `field-${name}`, error: inWords(t, errors[name]?.message) })
  const refused = draft.error instanceof ApiError && (draft.error.problem.errors ?? []).length > 0

  const submit = form.handleSubmit((request) => {
    const idempotencyKey = key === '' ? crypto.randomUUID() : key
    setKey(idempotencyKey)
    draft.mutate(
      { draft: request, idempotencyKey },
      {
        onSuccess: () => {
          form.reset({ ...empty, sku: request.sku })
        },
        onError: (error) => {
          takeFieldErrors(error, form.setError)
        },
        onSettled: (_data, error) => {
          // Without any answer the draft may have been made: the same key then finds it.
          if (!(error instanceof ApiError) || error.problem.status !== 0) setKey('')
        },
      },
    )
  })

  return (
    <form noValidate className="grid gap-4" onSubmit={submit}>
      {listed.length > 0 && (
        <ErrorSummary
          key={submitCount}
          title={t('errors:validation.title')}
          problems={listed.map(({ name, message }) => ({
            controlId: `field-${name}`,
            message: `${t(`limits.field.${name}`)}: ${inWords(t, message) ?? ''}`,
          }))}
        />
      )}
      {draft.isSuccess && <Notice tone="good" title={t('limits.draftKept')} />}
      {draft.isError && !refused && <ErrorNotice error={draft.error} />}
      <div className="grid gap-4 sm:grid-cols-[1.4fr_1fr]">
        <Field label={t('limits.field.sku')} {...ids('sku')}>
          {(tied) => (
            <Select {...tied} {...form.register('sku')} className={tight}>
              <option value="">{t('limits.choose')}</option>
              {rows.map((row) => (
                <option key={row.sku} value={row.sku}>
                  {row.name} ({row.sku})
                </option>
              ))}
            </Select>
          )}
        </Field>
        <Field label={t('limits.field.limitKg')} {...ids('limitKg')}>
          {(tied) => (
            <TextInput
              {...tied}
              {...form.register('limitKg')}
              inputMode="decimal"
              autoComplete="off"
              className={`${tight} text-end`}
            />
          )}
        </Field>
      </div>
      {current && (
        <div>
          <p className="text-sm text-soft">
            {t('limits.now', { kg: f.number(current.limitKg, Number.isInteger(current.limitKg) ? 0 : 1) })}
          </p>
          {typedKg !== null && typedKg >= 40 && typedKg <= 200 && (
            <LimitScale currentKg={current.limitKg} newKg={typedKg} />
          )}
        </div>
      )}
      <Field label={t('limits.field.proof')} hint={t('limits.proofHint')} {...ids('proof')}>
        {(tied) => <TextArea {...tied} {...form.register('proof')} rows={3} maxLength={4000} className={tight} />}
      </Field>
      <Field label={t('limits.field.reason')} {...ids('reason')}>
        {(tied) => <TextInput {...tied} {...form.register('reason')} maxLength={500} className={tight} />}
      </Field>
      <Field label={t('limits.field.inForceFrom')} hint={t('limits.inForceHint')} {...ids('inForceFrom')}>
        {(tied) => (
          <TextInput
            {...tied}
            {...form.register('inForceFrom')}
            type="datetime-local"
            className={`${tight} max-w-72`}
          />
        )}
      </Field>
      <div>
        <Button type="submit" busy={draft.isPending}>
          {t('limits.draft')}
        </Button>
      </div>
    </form>
  )
}
