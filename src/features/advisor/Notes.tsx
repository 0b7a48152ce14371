import { useTranslation } from 'react-i18next'
import type { Advice } from '#contract/advisor.ts'
import { Notice } from '../../ui/Notice.tsx'
import { useAdviceWords } from './words.ts'

/** Said beside the pressures with every answer, in words of their own. */
const standing = new Set(['start-value', 'lower-maximum-wins', 'mechanic', 'makers-and-rules'])
/** Said by the page that refuses. */
const refusing = new Set(['who-can-help', 'metal-rim-36', 'none-for-bike', 'over-every-limit'])

/** The four cautions that go with every number. */
export function Cautions() {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const step =
    format.pressure(0.1).unit === 'bar' ? `${format.number(0.1, 1)}\u00a0bar` : `${format.number(2)}\u00a0psi`
  return (
    <Notice tone="caution" title={t('findings.cautionsTitle')}>
      <ul className="mt-1 grid gap-1">
        {(['start', 'lower', 'mechanic', 'makers'] as const).map((one) => (
          <li key={one}>{t(`findings.cautions.${one}`, { step })}</li>
        ))}
      </ul>
    </Notice>
  )
}

/** What else holds for this rider, cautions first. */
export function Notes({ advice }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { note } = useAdviceWords()
  const notes = advice.notes.filter(
    ({ code, severity }) => severity !== 'stop' && !standing.has(code) && !refusing.has(code),
  )
  if (notes.length === 0) return null
  const sorted = [...notes].sort((a, b) => Number(a.severity !== 'caution') - Number(b.severity !== 'caution'))
  return (
    <section>
      <h2>{t('findings.notesTitle')}</h2>
      <ul className="mt-2 border-t border-line">
        {sorted.map((one) => (
          <li key={one.code} className="flex gap-3 border-b border-line py-2 text-[0.9375rem]">
            <Mark caution={one.severity === 'caution'} />
            <span>
              {one.severity === 'caution' && <span className="sr-only">{t('findings.caution')} </span>}
              {note(one)}
            </span>
          </li>
        ))}
      </ul>
    </section>
  )
}

function Mark({ caution }: { caution: boolean }) {
  return (
    <svg
      aria-hidden
      viewBox="0 0 16 16"
      className={`mt-1 size-3.5 flex-none ${caution ? 'text-near' : 'text-soft'}`}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.8"
    >
      {caution ? (
        <path d="M8 2 15 14H1ZM8 6.5V10M8 11.4v.8" />
      ) : (
        <path d="M8 1.5A6.5 6.5 0 1 1 8 14.5 6.5 6.5 0 0 1 8 1.5ZM8 7v4.5M8 4.3v1" />
      )}
    </svg>
  )
}
