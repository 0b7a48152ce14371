import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { useTranslation } from 'react-i18next'
import { signIn, type SessionUser, type SignIn } from '#contract/account.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useSignIn } from '../../lib/session.ts'
import { Button } from '../../ui/Button.tsx'
import { Field, TextInput } from '../../ui/Field.tsx'

export function SignInForm({ onDone }: { onDone: (user: SessionUser) => void }) {
  const { t } = useTranslation('account')
  const { register, handleSubmit, formState } = useForm<SignIn>({ resolver: zodResolver(signIn) })
  const enter = useSignIn()
  return (
    <form
      noValidate
      className="grid gap-4"
      onSubmit={(event) => {
        void handleSubmit((values) => {
          enter.mutate(values, { onSuccess: ({ user }) => user && onDone(user) }) // prettier-ignore
        })(event)
      }}
    >
      {enter.error && <ErrorNotice error={enter.error} />}
      <Field label={t('signIn.email')} error={formState.errors.email && t('signIn.emailWrong')}>
        {(ids) => <TextInput {...ids} {...register('email')} type="email" autoComplete="username" inputMode="email" />}
      </Field>
      <Field label={t('signIn.password')} error={formState.errors.password && t('signIn.passwordWrong')}>
        {(ids) => <TextInput {...ids} {...register('password')} type="password" autoComplete="current-password" />}
      </Field>
      <Button type="submit" busy={enter.isPending} className="justify-self-start">
        {t('signIn.enter')}
      </Button>
    </form>
  )
}
