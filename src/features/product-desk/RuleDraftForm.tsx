import { useId, useMemo, useState, type SubmitEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { ruleDraft, sourceLabels, type RuleTableView } from '#contract/product-desk-rules.ts'
import { checkTable } from '#core/rule-check.ts'
import type { TableName } from '#core/rules.ts'
import { ApiError } from '../../lib/api.ts'
import { ErrorNotice } from '../../lib/ErrorNotice.tsx'
import { codeOf, inWords } from '../../lib/form-words.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorSummary } from '../../ui/ErrorSummary.tsx'
import { Field, Select, TextArea, TextInput } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { versionDifferences } from './rule-differences.ts'
import { useDraftRules } from './rule-queries.ts'
import { changeAt, controlId, readTyped, shapeOf, typedOf, type Path } from './rule-shape.ts'
import { useRuleWords } from './rule-words.ts'
import { RuleDifferences } from './RuleDifferences.tsx'
import { RuleEditor } from './RuleEditor.tsx'

const tight = 'min-h-10! py-1.5!'
const formFields = ['source', 'label', 'reason', 'inForceFrom'] as const
type FieldName = (typeof formFields)[number]

interface Problem {
  /** `data.rows.2.maxBar` or the name of a field. */
  path: string
  message: string
}

/** Drafting a new version of a rule table over the newest one. What is typed stays until it is sent or thrown away. */
export function RuleDraftForm({ table, base: newest }: { table: TableName; base: RuleTableView['base'] }) {
  const { t } = useTranslation(['product-desk', 'errors'])
  const f = useFormat()
  const words = useRuleWords(table)
  const formId = useId()
  const send = useDraftRules()
  // The version that the typing began on; a newer one is pointed out, not slipped under it.
  const [base, setBase] = useState(newest)
  const shape = useMemo(() => shapeOf(table, base.data), [table, base])
  const [typed, setTyped] = useState(() => typedOf(shape, base.data))
  const start = (version: typeof base) => ({
    source: version.source,
    label: version.label,
    reason: '',
    inForceFrom: '',
  })
  const [fields, setFields] = useState(() => start(base))
  const [problems, setProblems] = useState<readonly Problem[]>([])
  const [tries, setTries] = useState(0)
  // One key for one draft: sending it again after a lost reply makes no second one.
  const [key, setKey] = useState('')
  const read = useMemo(() => readTyped(shape, typed), [shape, typed])
  const found = versionDifferences(base, { data: read.data, source: fields.source.trim(), label: fields.label })
  const faults = new Map(
    problems.flatMap(({ path, message }) => (path.startsWith('data.') ? [[path.slice(5), message] as const] : [])),
  )
  const fault = (name: FieldName) => problems.find(({ path }) => path === name)?.message
  const idOf = (path: string) =>
    path.startsWith('data.')
      ? controlId(path.slice(5).split('.'))
      : (formFields as readonly string[]).includes(path)
        ? `${formId}-${path}`
        : null
  const refused = send.error instanceof ApiError && (send.error.problem.errors ?? []).length > 0
  const comes = base.standing === 'seconded' && base.inForceFrom !== null

  const begin = (version: typeof base) => {
    setBase(version)
    setTyped(typedOf(shapeOf(table, version.data), version.data))
    setFields(start(version))
    setProblems([])
  }

  const untouched = found.length === 0 && fields.reason === '' && fields.inForceFrom === ''
  // Nobody loses anything by it, so there is nothing to ask.
  if (newest.version !== base.version && untouched) begin(newest)

  const check = () => {
    const at = fields.inForceFrom === '' ? null : new Date(fields.inForceFrom)
    const request = {
      ...{ table, data: read.data, source: fields.source, label: fields.label, reason: fields.reason },
      ...(at ? { inForceFrom: Number.isNaN(at.getTime()) ? 'unreadable' : at.toISOString() } : {}),
      basedOn: base.version,
    }
    const parsed = ruleDraft.safeParse(request, { error: codeOf })
    // A cell that cannot be read needs no second word about its shape.
    const unread = new Set(read.faults.map(({ path }) => path.join('.')))
    const others = checkTable(table, read.data, base.data).filter(({ path }) => !unread.has(path.join('.')))
    const cells = [...read.faults, ...others]
    const wrong: Problem[] = [
      ...cells.map((one) => ({ path: ['data', ...one.path].join('.'), message: words.fault(one, read.data) })),
      ...(parsed.error?.issues ?? []).map(({ path, message }) => ({
        path: path.join('.'),
        message: inWords(t, message) ?? '',
      })),
    ]
    return { wrong, draft: wrong.length === 0 ? parsed.data : undefined }
  }

  const submit = (event: SubmitEvent) => {
    event.preventDefault()
    const { wrong, draft } = check()
    setProblems(wrong)
    setTries(tries + 1)
    if (!draft) return
    const idempotencyKey = key === '' ? crypto.randomUUID() : key
    setKey(idempotencyKey)
    send.mutate(
      { draft, idempotencyKey },
      {
        onSuccess: () => {
          begin(newest)
        },
        onError: (error) => {
          setProblems(error instanceof ApiError ? (error.problem.errors ?? []) : [])
          setTries((before) => before + 1)
        },
        onSettled: (_data, error) => {
          // Without any answer the draft may have been made: the same key then finds it.
          if (!(error instanceof ApiError) || error.problem.status !== 0) setKey('')
        },
      },
    )
  }

  const field = (name: FieldName) => ({ id: `${formId}-${name}`, error: fault(name) })
  const set = (name: FieldName) => (event: { target: { value: string } }) => {
    setFields((old) => ({ ...old, [name]: event.target.value }))
  }

  return (
    <form noValidate className="grid grid-cols-1 gap-6" onSubmit={submit}>
      {problems.length > 0 && (
        <ErrorSummary
          key={tries}
          title={t('errors:validation.title')}
          problems={problems.map(({ path, message }) => ({
            controlId: idOf(path),
            message: (formFields as readonly string[]).includes(path)
              ? `${t(`rules.field.${path}`)}: ${message}`
              : message,
          }))}
        />
      )}
      {send.isSuccess && found.length === 0 && (
        <div role="status">
          <Notice tone="good" title={t('rules.draftKept')} />
        </div>
      )}
      {send.isError && !refused && <ErrorNotice error={send.error} />}
      {newest.version !== base.version && (
        <Notice tone="stop" title={t('rules.newer', { version: newest.version, old: base.version })}>
          <p>{t('rules.newerExplain')}</p>
          <div className="mt-3 flex flex-wrap gap-3">
            <Button small onClick={() => setBase(newest)}>
              {t('rules.keepTyping')}
            </Button>
            <Button kind="plain" small onClick={() => begin(newest)}>
              {t('rules.startAfresh', { version: newest.version })}
            </Button>
          </div>
        </Notice>
      )}
      {comes && (
        <Notice title={t('rules.coming', { version: base.version, time: f.time(base.inForceFrom ?? '') })}>
          <p>{t('rules.comingExplain')}</p>
        </Notice>
      )}
      <RuleEditor
        shape={shape}
        typed={typed}
        words={words}
        faults={faults}
        change={(path: Path, change) => {
          setTyped((old) => changeAt(old, path, change))
        }}
      />
      <div className="grid gap-x-8 gap-y-4 border-t border-ink pt-5 lg:grid-cols-2">
        <Field
          label={t('rules.field.source')}
          hint={t('rules.sourceHint')}
          {...field('source')}
          className="lg:row-span-2"
        >
          {(tied) => (
            <TextArea
              {...tied}
              value={fields.source}
              rows={5}
              maxLength={4000}
              className={tight}
              onChange={set('source')}
            />
          )}
        </Field>
        <Field label={t('rules.field.label')} {...field('label')}>
          {(tied) => (
            <Select {...tied} value={fields.label} className={tight} onChange={set('label')}>
              {sourceLabels.map((label) => (
                <option key={label} value={label}>
                  {t(`rules.label.${label}`)}
                </option>
              ))}
            </Select>
          )}
        </Field>
        <Field label={t('rules.field.inForceFrom')} hint={t('limits.inForceHint')} {...field('inForceFrom')}>
          {(tied) => (
            <TextInput
              {...tied}
              type="datetime-local"
              value={fields.inForceFrom}
              className={`${tight} max-w-72`}
              onChange={set('inForceFrom')}
            />
          )}
        </Field>
        <Field label={t('rules.field.reason')} {...field('reason')} className="lg:col-span-2">
          {(tied) => (
            <TextInput {...tied} value={fields.reason} maxLength={500} className={tight} onChange={set('reason')} />
          )}
        </Field>
      </div>
      <section aria-labelledby={`${formId}-changes`}>
        <h3 id={`${formId}-changes`} className="mb-1 text-sm font-bold">
          {t('rules.changes', { count: found.length })}
        </h3>
        {found.length > 0 && <RuleDifferences found={found} words={words} />}
      </section>
      <div className="flex flex-wrap gap-3">
        <Button type="submit" busy={send.isPending}>
          {t('rules.draft')}
        </Button>
        {found.length > 0 && (
          <Button kind="plain" onClick={() => begin(newest)}>
            {t('rules.undo', { version: newest.version })}
          </Button>
        )}
      </div>
    </form>
  )
}
