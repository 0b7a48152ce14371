import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { Link, useParams } from 'react-router-dom'
import type { RuleTableView } from '#contract/product-desk-rules.ts'
import type { TableName } from '#core/rules.ts'
import { AuditTrail } from '../../features/product-desk/AuditTrail.tsx'
import { ruleTableQuery } from '../../features/product-desk/rule-queries.ts'
import { useRuleWords } from '../../features/product-desk/rule-words.ts'
import { RuleDecision } from '../../features/product-desk/RuleDecision.tsx'
import { RuleDraftForm } from '../../features/product-desk/RuleDraftForm.tsx'
import { RuleHistory } from '../../features/product-desk/RuleHistory.tsx'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { useFormat } from '../../lib/format.ts'
import { useTitle } from '../../lib/title.ts'
import { Waiting } from '../../ui/Waiting.tsx'

/** One table of the sums: what waits, a new draft over the newest version, and all versions. */
export function RuleTablePage() {
  const { t } = useTranslation(['product-desk', 'common'])
  const { name = '' } = useParams()
  const { tableName } = useRuleWords(name)
  useTitle(tableName)
  const { data, error, isPending, refetch } = useQuery(ruleTableQuery(name))
  if (isPending) return <Waiting label={t('common:waiting')} rows={8} />
  if (error) return <ErrorNotice error={error} onRetry={() => void refetch()} />
  return <TableSheet key={data.name} table={data} />
}

function TableSheet({ table: { name, base, versions } }: { table: RuleTableView }) {
  const { t } = useTranslation('product-desk')
  const f = useFormat()
  const { tableName } = useRuleWords(name)
  const current = versions.find(({ standing }) => standing === 'in-force')
  const waiting = versions.filter(({ standing }) => standing === 'drafted' || standing === 'seconded')
  return (
    <>
      <p className="no-print mb-1 text-sm">
        <Link to="/product/rules" className="underline decoration-1 underline-offset-4">
          {t('rules.back')}
        </Link>
      </p>
      <h1 className="text-2xl!">{tableName}</h1>
      {current?.inForceFrom && (
        <p className="mt-1 mb-5 max-w-[90ch] text-sm break-words text-soft">
          <span className="font-[650] text-ink">
            {t('rules.inForce', { version: current.version, time: f.date(current.inForceFrom) })}
          </span>{' '}
          {t('rules.sourceIs', { label: t(`rules.label.${current.label}`), source: current.source })}
        </p>
      )}
      {waiting.length > 0 && (
        <section aria-labelledby="waiting" className="mb-8">
          <h2 id="waiting" className="mb-3 border-b border-ink pb-1 text-base!">
            {t('rules.waiting', { count: waiting.length })}
          </h2>
          <div className="grid gap-4">
            {waiting.map((change) => (
              <RuleDecision
                key={change.id}
                change={change}
                base={versions.find(({ version }) => version === change.basedOn)}
              />
            ))}
          </div>
        </section>
      )}
      <section aria-labelledby="draft" className="no-print mb-10">
        <h2 id="draft" className="mb-4 border-b border-ink pb-1 text-base!">
          {t('rules.draftTitle', { version: base.version })}
        </h2>
        {/* The server lists only tables of this program, so the name is one of them. */}
        <RuleDraftForm table={name as TableName} base={base} />
      </section>
      <div className="grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1.6fr)_minmax(0,1fr)]">
        <section aria-labelledby="versions">
          <h2 id="versions" className="border-b border-ink pb-1 text-base!">
            {t('rules.versions')}
          </h2>
          <RuleHistory versions={versions} />
        </section>
        <section aria-labelledby="rule-audit">
          <h2 id="rule-audit" className="mb-1 border-b border-ink pb-1 text-base!">
            {t('audit.title')}
          </h2>
          <AuditTrail subjectType="rule-table" subjectId={name} />
        </section>
      </div>
    </>
  )
}
