import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { staffReason } from '#contract/common.ts'
import type { RuleVersionView } from '#contract/product-desk-rules.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords } from '../../lib/form-words.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { Field, TextInput } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { versionDifferences } from './rule-differences.ts'
import { useDecideRules } from './rule-queries.ts'
import { useRuleWords } from './rule-words.ts'
import { RuleDifferences } from './RuleDifferences.tsx'

/** One version that waits: what it changes cell by cell, why, from when; then the second person's decision. */
export function RuleDecision({ change, base }: { change: RuleVersionView; base: RuleVersionView | undefined }) {
  const { t } = useTranslation(['product-desk', 'errors'])
  const f = useFormat()
  const words = useRuleWords(change.table)
  const decide = useDecideRules()
  const [reason, setReason] = useState('')
  const [wrong, setWrong] = useState<string>()
  const drafted = change.standing === 'drafted'

  const give = (decision: 'approve' | 'reject') => {
    const read = staffReason.safeParse(reason, { error: codeOf })
    setWrong(read.success ? undefined : inWords(t, read.error.issues[0]?.message))
    if (read.success) decide.mutate({ id: change.id, decision, reason: read.data })
  }

  return (
    <article className="border border-strong">
      <div className="grid gap-x-8 gap-y-4 p-4 lg:grid-cols-[minmax(0,1fr)_minmax(0,2fr)]">
        <div>
          <h3 className="text-lg!">{t('rules.versionIs', { version: change.version })}</h3>
          <p className="mt-0.5 text-xs text-soft">
            {t('limits.draftedBy', { name: change.draftedBy ?? t('nobody'), time: f.time(change.createdAt) })} ·{' '}
            {t(`limits.standing.${change.standing}`)}
          </p>
          <dl className="mt-2 grid gap-1.5 text-sm">
            <Told label={t('limits.reason')}>{change.reason}</Told>
            <Told label={t('limits.inForceFrom')}>
              {change.inForceFrom === null ? t('limits.atOnce') : f.time(change.inForceFrom)}
            </Told>
            <Told label={t('rules.basedOn')}>{change.basedOn ?? ''}</Told>
            {change.secondedBy !== null && <Told label={t('rules.secondedBy')}>{change.secondedBy}</Told>}
          </dl>
        </div>
        <div className="min-w-0">
          <h4 className="mb-1 text-sm font-bold">{t('rules.differences')}</h4>
          {base && <RuleDifferences found={versionDifferences(base, change)} words={words} />}
        </div>
      </div>
      <div className="no-print border-t border-line p-4">
        {change.stale && (
          <Notice tone="caution" title={t('errors:rule-change-stale.title')} className="mb-3">
            <p>{t('rules.staleExplain')}</p>
          </Notice>
        )}
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
          {drafted && !change.own && !change.stale && (
            <Button small busy={decide.isPending} onClick={() => give('approve')}>
              {t('limits.second')}
            </Button>
          )}
          <Button kind="plain" small busy={decide.isPending} onClick={() => give('reject')}>
            {t(drafted ? (change.own ? 'limits.takeBack' : 'limits.turnDown') : 'rules.stop')}
          </Button>
        </div>
        {change.own && drafted && <p className="mt-2 text-sm text-soft">{t('limits.ownHint')}</p>}
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
