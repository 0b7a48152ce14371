import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { useTranslation } from 'react-i18next'
import type { DeskLine, DeskMoney, RefundRequest } from '#contract/support-desk.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords, readMoney } from '../../lib/form-words.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { Field, TextArea, TextInput } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { useRefund } from './queries.ts'
import { emptyRefund, linesCents, refundSchema, type RefundForm } from './refund-form.ts'

const modes = ['all', 'lines', 'amount'] as const

interface RefundBoxProps {
  orderNumber: string
  buyer: string
  lines: readonly DeskLine[]
  money: DeskMoney
}

/** Money back: everything left, whole lines, or an amount. Cannot ask for more than is left, and asks once more before it pays. */
export function RefundBox({ orderNumber, buyer, lines, money }: RefundBoxProps) {
  const { t } = useTranslation(['support-desk', 'errors', 'common'])
  const f = useFormat()
  const refund = useRefund(orderNumber)
  const form = useForm<RefundForm, unknown, RefundRequest>({
    resolver: zodResolver(refundSchema(money, lines), { error: codeOf }),
    defaultValues: emptyRefund,
  })
  const [asked, setAsked] = useState<RefundRequest | null>(null)
  // One key for one decision: a second click or a repeat after a lost reply is the same refund.
  const [key, setKey] = useState('')
  const typed = useWatch({ control: form.control })
  // Kept by hand: a form library reads a lone checkbox as one value, not as a list of one.
  const chosen = typed.lines ?? []
  const { errors } = form.formState
  const left = money.leftToRefundCents
  const centsOf = ({ mode, amount }: typeof typed) =>
    mode === 'all' ? left : mode === 'lines' ? linesCents(chosen, lines, money) : (readMoney(amount ?? '') ?? 0)
  const price = (cents: number) => f.money(cents, money.currency)

  if (money.takenCents === 0) return <p className="text-soft">{t('refund.nothingTaken')}</p>
  if (left === 0 && !refund.isSuccess) return <p className="text-soft">{t('refund.nothingLeft')}</p>

  const pay = () => {
    if (!asked) return
    refund.mutate(
      { request: asked, idempotencyKey: key },
      {
        onSuccess: () => {
          form.reset(emptyRefund)
        },
        onSettled: () => {
          setAsked(null)
        },
      },
    )
  }

  return (
    <>
      {refund.isSuccess && (
        <Notice tone="good" title={t('refund.done', { amount: price(refund.data.amountCents) })} className="mb-3">
          <p>{t('refund.doneMore', { left: price(refund.data.leftToRefundCents) })}</p>
        </Notice>
      )}
      {refund.isError && <ErrorNotice error={refund.error} className="mb-3" />}
      {left > 0 && (
        <form
          noValidate
          className="grid gap-3"
          onSubmit={form.handleSubmit((request) => {
            setKey(crypto.randomUUID())
            refund.reset()
            setAsked(request)
          })}
        >
          <fieldset>
            <legend className="sr-only">{t('refund.what')}</legend>
            <div className="flex flex-wrap gap-x-6">
              {modes.map((mode) => (
                <label key={mode} className="inline-flex min-h-9 items-center gap-2 font-[650]">
                  <input type="radio" value={mode} {...form.register('mode')} className="size-4 accent-ink" />
                  {t(`refund.mode.${mode}`, { amount: price(left) })}
                </label>
              ))}
            </div>
          </fieldset>
          {typed.mode === 'lines' && (
            <fieldset aria-describedby={errors.lines ? 'refund-lines-error' : undefined}>
              <legend className="text-soft">{t('refund.lines')}</legend>
              {lines.map((line) => (
                <label
                  key={line.id}
                  className={`flex min-h-9 items-center gap-2 ${line.refunded ? 'text-soft line-through' : ''}`}
                >
                  <input
                    type="checkbox"
                    checked={chosen.includes(String(line.id))}
                    disabled={line.refunded}
                    onChange={(event) => {
                      const others = chosen.filter((id) => id !== String(line.id))
                      form.setValue('lines', event.target.checked ? [...others, String(line.id)] : others)
                      form.clearErrors('lines')
                    }}
                    className="size-4 accent-ink"
                  />
                  <span className="flex-1">{t('refund.line', { title: line.title, quantity: line.quantity })}</span>
                  {price(line.lineCents + (money.taxIncluded ? 0 : line.taxCents))}
                </label>
              ))}
              {errors.lines && (
                <p id="refund-lines-error" className="border-s-[3px] border-own ps-2 font-[650] text-own">
                  {inWords(t, errors.lines.message)}
                </p>
              )}
            </fieldset>
          )}
          {typed.mode === 'amount' && (
            <Field
              label={t('refund.amount', { currency: money.currency })}
              hint={t('refund.atMost', { amount: price(left) })}
              error={inWords(t, errors.amount?.message)}
            >
              {(ids) => (
                <TextInput
                  {...ids}
                  {...form.register('amount')}
                  inputMode="decimal"
                  autoComplete="off"
                  className="max-w-48 min-h-10! py-1.5!"
                />
              )}
            </Field>
          )}
          <Field label={t('reason.label')} hint={t('refund.reasonHint')} error={inWords(t, errors.reason?.message)}>
            {(ids) => (
              <TextArea {...ids} {...form.register('reason')} rows={2} maxLength={500} className="min-h-10! py-1.5!" />
            )}
          </Field>
          <div>
            <Button type="submit" small>
              {t('refund.ask', { amount: price(Math.min(centsOf(typed), left)) })}
            </Button>
          </div>
        </form>
      )}
      <Dialog
        open={asked !== null}
        onClose={() => setAsked(null)}
        title={t('refund.confirmTitle', { amount: price(centsOf(typed)) })}
      >
        <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-[0.9375rem]">
          <dt className="text-soft">{t('column.number')}</dt>
          <dd>{orderNumber}</dd>
          <dt className="text-soft">{t('refund.to')}</dt>
          <dd>{buyer}</dd>
          <dt className="text-soft">{t('reason.label')}</dt>
          <dd className="break-words">{asked?.reason}</dd>
          <dt className="text-soft">{t('refund.leftAfter')}</dt>
          <dd>{price(Math.max(0, left - centsOf(typed)))}</dd>
        </dl>
        <p className="mt-3 text-sm text-soft">{t('refund.cannotUndo')}</p>
        <div className="mt-5 flex flex-wrap gap-3">
          <Button busy={refund.isPending} onClick={pay}>
            {t('refund.confirm', { amount: price(centsOf(typed)) })}
          </Button>
          <Button kind="plain" onClick={() => setAsked(null)}>
            {t('common:cancel')}
          </Button>
        </div>
      </Dialog>
    </>
  )
}
