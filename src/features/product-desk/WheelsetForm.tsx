import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { useTranslation } from 'react-i18next'
import { currencies, locales } from '#contract/common.ts'
import { productWheelset, type ProductChange, type ProductWheelset } from '#contract/product-desk.ts'
import { ApiError } from '../../lib/api.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords, listErrors, takeFieldErrors } from '../../lib/form-words.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorSummary } from '../../ui/ErrorSummary.tsx'
import { Field, TextArea, TextInput } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { ConflictNotice } from './ConflictNotice.tsx'
import { useChangeWheelset } from './queries.ts'
import { changesNothing, formOf, wheelsetSchema, type WheelsetForm as Form } from './wheelset-form.ts'

const tight = 'min-h-10! py-1.5!'

/** Words, prices, stock, sale and why. What was typed stays through every refusal; a colleague's change is shown beside it. */
export function WheelsetForm({ wheelset }: { wheelset: ProductWheelset }) {
  const { t } = useTranslation(['product-desk', 'errors'])
  const save = useChangeWheelset(wheelset.sku)
  // The version the typing is based on; moves on only when saved, or when somebody has looked at the differences.
  const [seen, setSeen] = useState(wheelset)
  const [nothing, setNothing] = useState(false)
  const form = useForm<Form, unknown, ProductChange>({
    resolver: zodResolver(wheelsetSchema(seen), { error: codeOf }),
    defaultValues: formOf(wheelset),
    shouldFocusError: false,
  })
  const { errors, submitCount } = form.formState
  const error = (name: string) => inWords(t, listErrors(errors).find((one) => one.name === name)?.message)
  const problem = save.error instanceof ApiError ? save.error.problem : null
  const present =
    problem?.code === 'changed-meanwhile' ? productWheelset.safeParse(problem.data?.present).data : undefined

  const submit = form.handleSubmit((change) => {
    setNothing(changesNothing(change))
    if (changesNothing(change)) return
    save.mutate(change, {
      onSuccess: (saved) => {
        setSeen(saved)
        form.reset(formOf(saved))
      },
      onError: (refusal) => {
        takeFieldErrors(refusal, form.setError)
      },
    })
  })

  const name = (path: string) => t(`field.${path.replaceAll('.', '-')}`)
  const listed = listErrors(errors)

  return (
    <form noValidate className="grid gap-6" onSubmit={submit}>
      {listed.length > 0 && (
        <ErrorSummary
          key={submitCount}
          title={t('errors:validation.title')}
          problems={listed.map((one) => ({
            controlId: `field-${one.name}`,
            message: `${name(one.name)}: ${inWords(t, one.message) ?? ''}`,
          }))}
        />
      )}
      {save.isSuccess && !form.formState.isDirty && <Notice tone="good" title={t('form.saved')} />}
      {nothing && <Notice title={t('form.nothing')} />}
      {present && (
        <ConflictNotice
          typed={form.getValues()}
          present={present}
          onKeep={() => {
            setSeen(present)
            save.reset()
          }}
          onTake={() => {
            setSeen(present)
            form.reset({ ...formOf(present), reason: form.getValues('reason') })
            save.reset()
          }}
        />
      )}
      {save.isError && !present && (problem?.errors ?? []).length === 0 && <ErrorNotice error={save.error} />}

      <fieldset className="grid gap-4 md:grid-cols-2">
        <legend className="mb-2 text-base font-bold">{t('form.words')}</legend>
        {locales.map((language) => (
          <div key={language} className="grid content-start gap-3" lang={language}>
            <Field
              id={`field-texts.${language}.tagline`}
              label={name(`texts.${language}.tagline`)}
              error={error(`texts.${language}.tagline`)}
            >
              {(ids) => (
                <TextInput {...ids} {...form.register(`texts.${language}.tagline`)} className={tight} maxLength={200} />
              )}
            </Field>
            <Field
              id={`field-texts.${language}.description`}
              label={name(`texts.${language}.description`)}
              error={error(`texts.${language}.description`)}
            >
              {(ids) => (
                <TextArea
                  {...ids}
                  {...form.register(`texts.${language}.description`)}
                  rows={6}
                  maxLength={4000}
                  className={tight}
                />
              )}
            </Field>
          </div>
        ))}
      </fieldset>

      <fieldset>
        <legend className="mb-2 text-base font-bold">{t('form.pricesAndStock')}</legend>
        <div className="grid grid-cols-2 gap-4 sm:grid-cols-4">
          {currencies.map((currency) => (
            <Field
              key={currency}
              id={`field-prices.${currency}`}
              label={name(`prices.${currency}`)}
              hint={t(`form.tax.${currency}`)}
              error={error(`prices.${currency}`)}
            >
              {(ids) => (
                <TextInput
                  {...ids}
                  {...form.register(`prices.${currency}`)}
                  inputMode="decimal"
                  autoComplete="off"
                  className={`${tight} text-end`}
                />
              )}
            </Field>
          ))}
          <Field
            id="field-stock.onHand"
            label={name('stock.onHand')}
            hint={t('form.reserved', { count: seen.reserved })}
            error={error('stock.onHand')}
          >
            {(ids) => (
              <TextInput
                {...ids}
                {...form.register('stock.onHand')}
                inputMode="numeric"
                autoComplete="off"
                className={`${tight} text-end`}
              />
            )}
          </Field>
        </div>
        {problem?.code === 'price-jump' && (
          <label className="mt-3 flex min-h-11 items-center gap-2 font-[650]">
            <input type="checkbox" {...form.register('confirmJump')} className="size-4 accent-ink" />
            {t('form.confirmJump')}
          </label>
        )}
        <label className="mt-3 flex min-h-11 items-center gap-2 font-[650]">
          <input type="checkbox" {...form.register('onSale')} className="size-4 accent-ink" />
          {t('field.onSale')}
        </label>
      </fieldset>

      <Field id="field-reason" label={name('reason')} hint={t('form.reasonHint')} error={error('reason')}>
        {(ids) => <TextInput {...ids} {...form.register('reason')} maxLength={500} className={tight} />}
      </Field>
      <div className="flex flex-wrap gap-3">
        <Button type="submit" busy={save.isPending}>
          {t('form.save')}
        </Button>
        <Button
          kind="plain"
          disabled={!form.formState.isDirty}
          onClick={() => {
            form.reset(formOf(seen))
            save.reset()
            setNothing(false)
          }}
        >
          {t('form.undo')}
        </Button>
      </div>
    </form>
  )
}
