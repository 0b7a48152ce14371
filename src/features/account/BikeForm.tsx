import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { useTranslation } from 'react-i18next'
import { z } from 'zod'
import { bikeFacts, type Bike, type BikeFacts } from '#contract/account.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { bikeChoices } from '../../lib/bike-choices.ts'
import { Button } from '../../ui/Button.tsx'
import { Field, Select, TextInput } from '../../ui/Field.tsx'
import { useKeepBike } from './queries.ts'

/** An empty control means "not known". */
const unknownWhenEmpty = (value: unknown) => (value === '' || value === undefined || Number.isNaN(value) ? null : value)
const number = (value: unknown) =>
  typeof value === 'string' && value.trim() !== '' ? Number(value.replace(',', '.')) : unknownWhenEmpty(value)
const form = z.object({
  ...bikeFacts.shape,
  brakes: z.preprocess(unknownWhenEmpty, bikeFacts.shape.brakes),
  beadSeatMm: z.preprocess(number, bikeFacts.shape.beadSeatMm),
  frontAxle: z.preprocess(unknownWhenEmpty, bikeFacts.shape.frontAxle),
  rearAxle: z.preprocess(unknownWhenEmpty, bikeFacts.shape.rearAxle),
  freehub: z.preprocess(unknownWhenEmpty, bikeFacts.shape.freehub),
  rotorMount: z.preprocess(unknownWhenEmpty, bikeFacts.shape.rotorMount),
  maxTyreMm: z.preprocess(number, bikeFacts.shape.maxTyreMm),
  caliperOpeningMm: z.preprocess(number, bikeFacts.shape.caliperOpeningMm),
})

export function BikeForm({ bike, onDone }: { bike: Bike | null; onDone: () => void }) {
  const { t } = useTranslation('account')
  const keep = useKeepBike(bike?.id ?? null)
  const { register, handleSubmit, formState } = useForm<z.input<typeof form>, unknown, BikeFacts>({
    resolver: zodResolver(form),
    defaultValues: bike ?? { name: '' },
  })
  const choice = (
    name: 'brakes' | 'frontAxle' | 'rearAxle' | 'freehub' | 'rotorMount' | 'beadSeatMm',
    values: readonly string[],
  ) => (
    <Field label={t(`bike.${name}`)}>
      {(ids) => (
        <Select {...ids} {...register(name)}>
          <option value="">{t('bike.unknown')}</option>
          {values.map((value) => (
            <option key={value} value={value}>
              {t([`bike.values.${value}`, value])}
            </option>
          ))}
        </Select>
      )}
    </Field>
  )
  return (
    <form
      noValidate
      className="grid gap-4 sm:grid-cols-2"
      onSubmit={(event) => {
        void handleSubmit((facts) => {
          keep.mutate(facts, { onSuccess: onDone })
        })(event)
      }}
    >
      {keep.error && <ErrorNotice error={keep.error} className="sm:col-span-2" />}
      <Field
        label={t('bike.name')}
        hint={t('bike.nameHint')}
        error={formState.errors.name && t('bike.nameWrong')}
        className="sm:col-span-2"
      >
        {(ids) => <TextInput {...ids} {...register('name')} autoComplete="off" />}
      </Field>
      {choice('brakes', ['disc', 'rim'])}
      {choice('beadSeatMm', ['622', '584'])}
      {choice('frontAxle', bikeChoices.frontAxle)}
      {choice('rearAxle', bikeChoices.rearAxle)}
      {choice('freehub', bikeChoices.freehub)}
      {choice('rotorMount', bikeChoices.rotorMount)}
      <Field
        label={t('bike.maxTyreMm')}
        error={formState.errors.maxTyreMm && t('bike.numberWrong', { from: 18, to: 80 })}
      >
        {(ids) => <TextInput {...ids} {...register('maxTyreMm')} inputMode="decimal" />}
      </Field>
      <Field
        label={t('bike.caliperOpeningMm')}
        error={formState.errors.caliperOpeningMm && t('bike.numberWrong', { from: 15, to: 60 })}
      >
        {(ids) => <TextInput {...ids} {...register('caliperOpeningMm')} inputMode="decimal" />}
      </Field>
      <p className="flex gap-3 sm:col-span-2">
        <Button type="submit" busy={keep.isPending}>
          {t('bike.keep')}
        </Button>
        <Button kind="plain" onClick={onDone}>
          {t('bike.leave')}
        </Button>
      </p>
    </form>
  )
}
