import { useTranslation } from 'react-i18next'
import type { RuleVersionView } from '#contract/product-desk-rules.ts'
import { useFormat } from '../../lib/format.ts'
import { versionDifferences } from './rule-differences.ts'
import { useRuleWords } from './rule-words.ts'
import { RuleDifferences } from './RuleDifferences.tsx'

/** Every version of a table, newest first: dates, people, reason and source, and what it changed. */
export function RuleHistory({ versions }: { versions: readonly RuleVersionView[] }) {
  return (
    <ol className="text-sm">
      {versions.map((one) => (
        <Version key={one.id} one={one} before={versions.find(({ version }) => version === one.basedOn)} />
      ))}
    </ol>
  )
}

function Version({ one, before }: { one: RuleVersionView; before: RuleVersionView | undefined }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  const words = useRuleWords(one.table)
  const people = [
    one.inForceFrom && t('limits.from', { time: f.time(one.inForceFrom) }),
    one.draftedBy && t('limits.draftedByShort', { name: one.draftedBy }),
    one.secondedBy && t('limits.secondedByShort', { name: one.secondedBy }),
  ]
  return (
    <li className="grid gap-x-4 border-b border-line py-2 sm:grid-cols-[6rem_9rem_minmax(0,1fr)]">
      <span className={one.standing === 'in-force' ? 'font-bold' : one.standing === 'rejected' ? 'line-through' : ''}>
        {one.version}
      </span>
      <span className="font-[650]">{t(`limits.standing.${one.standing}`)}</span>
      <span className="min-w-0 break-words">
        {one.reason !== '' && <span className="block">{one.reason}</span>}
        <span className="block text-soft">
          {t('rules.sourceIs', { label: t(`rules.label.${one.label}`), source: one.source })}
        </span>
        <span className="block text-xs text-soft">{people.filter(Boolean).join(' · ')}</span>
        {before && (
          <details className="mt-1">
            <summary className="cursor-pointer underline decoration-1 underline-offset-4">
              {t('rules.changedFrom', { version: before.version })}
            </summary>
            <div className="mt-1">
              <RuleDifferences found={versionDifferences(before, one)} words={words} />
            </div>
          </details>
        )}
      </span>
    </li>
  )
}
