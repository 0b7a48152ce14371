import { zodResolver } from '@hookform/resolvers/zod'
import { useEffect } from 'react'
import { useForm, type FieldPath } from 'react-hook-form'
import { useTranslation } from 'react-i18next'
import { z } from 'zod'
import { delivery } from '#contract/checkout.ts'
import type { MarketCode } from '#contract/common.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorSummary } from '../../ui/ErrorSummary.tsx'
import { Field, TextInput } from '../../ui/Field.tsx'

const KEPT = 'felloe.delivery'
const emptyAsMissing = (value: unknown) => (typeof value === 'string' && value.trim() === '' ? undefined : value)

const form = z.object({
  email: z.email(),
  ...delivery.omit({ country: true }).shape,
  line2: z.preprocess(emptyAsMissing, delivery.shape.line2),
  region: z.preprocess(emptyAsMissing, delivery.shape.region),
  phone: z.preprocess(emptyAsMissing, delivery.shape.phone),
  limitAcknowledged: z.boolean().optional(),
})
const controlId = (name: string) => `till-${name}`
export type DeliveryInput = z.output<typeof form>

/** What is typed stays over a reload and a refusal; it is forgotten with the window. */
function kept(): z.input<typeof form> {
  const empty = { email: '', name: '', line1: '', line2: '', postcode: '', city: '', region: '', phone: '' }
  try {
    return { ...empty, ...(JSON.parse(sessionStorage.getItem(KEPT) ?? '{}') as object) }
  } catch {
    return empty
  }
}

interface Props {
  country: MarketCode
  email: string | null
  /** A wheelset without a fitting: the shopper confirms to have added up the total. */
  mustAcknowledge: boolean
  limits: string
  payLabel: string
  busy: boolean
  onSubmit: (input: DeliveryInput) => void
}

export function DeliveryForm({ country, email, mustAcknowledge, limits, payLabel, busy, onSubmit }: Props) {
  const { t, i18n } = useTranslation('checkout')
  const { register, handleSubmit, formState, subscribe, setError } = useForm<
    z.input<typeof form>,
    unknown,
    DeliveryInput
  >({
    resolver: zodResolver(form),
    defaultValues: { ...kept(), ...(email !== null && kept().email === '' ? { email } : {}), limitAcknowledged: false },
  })
  useEffect(
    () =>
      subscribe({
        formState: { values: true },
        callback: ({ values }) => {
          try {
            sessionStorage.setItem(KEPT, JSON.stringify({ ...values, limitAcknowledged: false }))
          } catch {
            // Not kept; it still stands in the form.
          }
        },
      }),
    [subscribe],
  )
  const { errors, submitCount } = formState
  type Name = FieldPath<z.input<typeof form>>
  const field = (
    name: Exclude<Name, 'limitAcknowledged'>,
    autoComplete: string,
    more: { type?: string; hint?: string; className?: string } = {},
  ) => (
    <Field
      id={controlId(name)}
      label={t(`field.${name}`)}
      hint={more.hint}
      error={errors[name] && t(`wrong.${name}`)}
      className={more.className}
    >
      {(control) => (
        <TextInput {...control} {...register(name)} type={more.type ?? 'text'} autoComplete={autoComplete} />
      )}
    </Field>
  )
  const problems = Object.keys(errors).map((name) => ({
    controlId: controlId(name),
    message: t(`wrong.${name}`),
  }))
  return (
    <form
      noValidate
      className="grid gap-5"
      onSubmit={(event) => {
        void handleSubmit((input) => {
          if (mustAcknowledge && input.limitAcknowledged !== true) setError('limitAcknowledged', { message: 'needed' })
          else onSubmit(input)
        })(event)
      }}
    >
      {problems.length > 0 && submitCount > 0 && (
        <ErrorSummary key={submitCount} title={t('summary')} problems={problems} />
      )}
      {field('email', 'email', { type: 'email', hint: t('field.emailHint') })}
      <fieldset className="grid gap-5 sm:grid-cols-6">
        <legend className="mb-3 text-lg font-bold">{t('deliveryTo')}</legend>
        {field('name', 'shipping name', { className: 'sm:col-span-6' })}
        {field('line1', 'shipping address-line1', { className: 'sm:col-span-6' })}
        {field('line2', 'shipping address-line2', { className: 'sm:col-span-6' })}
        {field('postcode', 'shipping postal-code', { className: 'sm:col-span-2' })}
        {field('city', 'shipping address-level2', { className: 'sm:col-span-4' })}
        {field('region', 'shipping address-level1', { className: 'sm:col-span-3' })}
        {field('phone', 'shipping tel', { type: 'tel', className: 'sm:col-span-3' })}
        <p className="sm:col-span-6">
          <span className="block font-[650]">{t('field.country')}</span>
          {new Intl.DisplayNames([i18n.language], { type: 'region' }).of(country)}
          <span className="block text-sm text-soft">{t('field.countryHint')}</span>
        </p>
      </fieldset>
      {mustAcknowledge && (
        <div>
          <label
            className={`flex items-start gap-3 border p-4 ${errors.limitAcknowledged ? 'border-2 border-own' : 'border-near bg-near-wash'}`}
          >
            <input
              type="checkbox"
              id={controlId('limitAcknowledged')}
              className="mt-1 size-5 flex-none accent-(--own)"
              {...register('limitAcknowledged')}
            />
            <span>{t('acknowledge', { limits })}</span>
          </label>
          {errors.limitAcknowledged && (
            <p className="mt-1 text-sm font-[650] text-own">{t('wrong.limitAcknowledged')}</p>
          )}
        </div>
      )}
      <Button type="submit" busy={busy} className="justify-self-start">
        {payLabel}
      </Button>
    </form>
  )
}
