import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { staffReason } from '#contract/common.ts'
import type { LimitRow, LimitVersionView } from '#contract/product-desk.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords } from '../../lib/form-words.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { Field, TextInput } from '../../ui/Field.tsx'
import { LimitImpactView } from './LimitImpactView.tsx'
import { LimitScale } from './LimitScale.tsx'
import { useDecideLimit } from './queries.ts'

/** One change that waits: from what to what, why, on what proof, whom it touches; then the second person's decision. */
export function LimitDecision({ row, change }: { row: LimitRow; change: LimitVersionView }) {
  const { t } = useTranslation(['product-desk', 'errors'])
  const f = useFormat()
  const decide = useDecideLimit()
  const [reason, setReason] = useState('')
  const [wrong, setWrong] = useState<string>()
  const kg = (value: number) => `${f.number(value, Number.isInteger(value) ? 0 : 1)}\u00a0kg`
  const currentKg = row.current?.limitKg ?? null

  const give = (decision: 'approve' | 'reject') => {
    const read = staffReason.safeParse(reason, { error: codeOf })
    setWrong(read.success ? undefined : inWords(t, read.error.issues[0]?.message))
    if (read.success) decide.mutate({ id: change.id, decision, reason: read.data })
  }

  return (
    <article className="border border-strong">
      <div className="grid gap-x-8 gap-y-3 p-4 md:grid-cols-[minmax(0,1fr)_minmax(0,1.15fr)]">
        <div>
          <h3 className="text-lg!">
            {row.name}
            {', '}
            <span className="whitespace-nowrap">
              {currentKg === null
                ? kg(change.limitKg)
                : t('limits.fromTo', { from: kg(currentKg), to: kg(change.limitKg) })}
            </span>
          </h3>
          <p className="mt-0.5 text-xs text-soft">
            {t('limits.draftedBy', { name: change.draftedBy ?? t('nobody'), time: f.time(change.createdAt) })} ·{' '}
            {change.sku}
          </p>
          <div className="mt-3">
            <LimitScale currentKg={currentKg} newKg={change.limitKg} />
          </div>
          <dl className="mt-2 grid gap-1.5 text-sm">
            <Told label={t('limits.reason')}>{change.reason}</Told>
            <Told label={t('limits.proof')}>{change.proof === '' ? t('limits.noProof') : change.proof}</Told>
            <Told label={t('limits.inForceFrom')}>
              {change.inForceFrom === null ? t('limits.atOnce') : f.time(change.inForceFrom)}
            </Told>
          </dl>
        </div>
        <div>
          <h4 className="mb-1 text-sm font-bold">{t('impact.title')}</h4>
          <LimitImpactView id={change.id} />
        </div>
      </div>
      <div className="no-print border-t border-line p-4">
        {decide.isError && <ErrorNotice error={decide.error} className="mb-3" />}
        <div className="flex flex-wrap items-end gap-3">
          <Field label={t('limits.decisionReason')} error={wrong} className="min-w-0 flex-1 basis-72 text-sm">
            {(ids) => (
              <TextInput
                {...ids}
                value={reason}
                maxLength={500}
                className="min-h-10! py-1.5!"
                onChange={(event) => {
                  setReason(event.target.value)
                }}
              />
            )}
          </Field>
          {change.standing === 'drafted' && !change.own && (
            <Button small busy={decide.isPending} onClick={() => give('approve')}>
              {t('limits.second')}
            </Button>
          )}
          <Button kind="plain" small busy={decide.isPending} onClick={() => give('reject')}>
            {t(change.own ? 'limits.takeBack' : 'limits.turnDown')}
          </Button>
        </div>
        {change.own && change.standing === 'drafted' && <p className="mt-2 text-sm text-soft">{t('limits.ownHint')}</p>}
      </div>
    </article>
  )
}

const Told = ({ label, children }: { label: string; children: string }) => (
  <div>
    <dt className="text-xs text-soft">{label}</dt>
    <dd className="break-words">{children}</dd>
  </div>
)
