import { useTranslation } from 'react-i18next'
import { useId, useState, type ReactNode } from 'react'
import { Link } from 'react-router-dom'
import type { Reason } from '#contract/advisor.ts'
import { Formula } from './Formula.tsx'
import { showValue, useAdviceWords } from './words.ts'

/** Reasons that share their words: front and rear are worked alike. */
export const reasonKind = (key: string) => key.split('.')[0] ?? key

interface WithWorkingProps {
  label: ReactNode
  /** Which answer the button belongs to, for those who only hear it. */
  name: string
  reasons: readonly { key: string; title?: string; reason: Reason | undefined }[]
  children: ReactNode
}

/** A figure with its working one press away: formula, what went in, source, label, doubt, what would change it. */
export function WithWorking({ label, name, reasons, children }: WithWorkingProps) {
  const { t } = useTranslation('advisor')
  const [open, setOpen] = useState(false)
  const id = useId()
  const shown = reasons.filter((one) => one.reason !== undefined)
  return (
    <>
      <div className="flex items-baseline justify-between gap-3">
        <h2 className="text-sm! font-medium! tracking-normal! text-soft">{label}</h2>
        {shown.length > 0 && (
          <button
            type="button"
            aria-expanded={open}
            aria-controls={id}
            aria-label={`${t(open ? 'working.hide' : 'working.show')}: ${name}`}
            className="quiet-link -my-2 py-2 text-sm print:hidden"
            onClick={() => {
              setOpen(!open)
            }}
          >
            {t(open ? 'working.hide' : 'working.show')}
          </button>
        )}
      </div>
      {children}
      <div id={id} hidden={!open}>
        {open && (
          <div className={shown.length > 1 ? 'grid gap-x-8 sm:grid-cols-2' : ''}>
            {shown.map(
              ({ key, title, reason }) =>
                reason && <Reasoning key={key} kind={reasonKind(key)} title={title} reason={reason} />,
            )}
          </div>
        )}
        {open && (
          <Link to="/working" className="quiet-link mt-2 inline-block text-sm">
            {t('working.more')}
          </Link>
        )}
      </div>
    </>
  )
}

/** A figure with its unit stays in one piece; words may break. */
const isShort = (text: string) => text.length <= 14

function Reasoning({ kind, title, reason }: { kind: string; title: string | undefined; reason: Reason }) {
  const { t } = useTranslation('advisor')
  const { format, answer, field } = useAdviceWords()
  const { formula, inputs, constants, source, label, uncertainty, wouldChangeIf } = reason
  const show = (name: string, value: unknown): string =>
    typeof value === 'number'
      ? showValue(name, value, format)
      : name === 'governedBy' || name === 'ceilingFrom'
        ? t([`findings.${name}.${String(value)}`, `findings.${name}.other`])
        : name === 'frontRule'
          ? String(value)
          : answer(name, value)
  const lines = [...Object.entries(inputs), ...Object.entries(constants)].filter(([, value]) => value !== null)
  return (
    <div className="mt-3 border-s-2 border-strong ps-3.5 text-sm">
      {title !== undefined && <h3 className="text-sm">{title}</h3>}
      <p className="mt-1 font-[650] break-words">
        <Formula text={t(`working.formula.${kind}`, { defaultValue: formula })} />
      </p>
      <dl className="mt-2">
        {lines.map(([name, value]) => (
          <div key={name} className="flex justify-between gap-4 border-b border-line py-0.5">
            <dt className="text-soft">{t([`working.value.${name}`, `field.${name}`, 'working.value.other'])}</dt>
            <dd
              className={`text-end font-semibold ${isShort(show(name, value)) ? 'whitespace-nowrap' : 'min-w-0 break-words'}`}
            >
              <Formula text={show(name, value)} />
            </dd>
          </div>
        ))}
      </dl>
      <p className="mt-2">
        <span className="font-[650]">{t('working.source')}</span>{' '}
        {t(`working.sources.${kind}`, { defaultValue: source })}{' '}
        <span className="border border-strong px-1.5 text-xs font-[650] whitespace-nowrap">
          {t(`working.labels.${label}.name`)}
        </span>
      </p>
      <p className="mt-1 text-soft">{t(`working.labels.${label}.short`)}</p>
      <p className="mt-1">
        <span className="font-[650]">{t('working.doubt')}</span>{' '}
        {t(`working.doubts.${uncertainty}`, { defaultValue: uncertainty })}
      </p>
      <p className="mt-1">
        <span className="font-[650]">{t('working.changes')}</span> {format.list(wouldChangeIf.map(field))}
      </p>
    </div>
  )
}
