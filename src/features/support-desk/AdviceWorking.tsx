import { useTranslation } from 'react-i18next'
import type { FrozenAdvice } from '#contract/support-desk.ts'

/** The working behind each frozen number: why the engine said what it said. */
export function AdviceWorking({ reasons }: { reasons: FrozenAdvice['reasons'] }) {
  const { t } = useTranslation('support-desk')
  const named = (list: string) =>
    list
      .split('; ')
      .map((name) => t([`answer.name.${name.replaceAll('.', '-')}`, 'answer.name.other'], { name }))
      .join(', ')
  return (
    <details className="mt-3">
      <summary className="font-[650] underline underline-offset-4">
        {t('working.title', { count: reasons.length })}
      </summary>
      <ul className="mt-2 grid gap-3">
        {reasons.map((reason) => (
          <li key={reason.quantity} className="border-s border-strong ps-3">
            <p className="font-bold">
              {t([`working.quantity.${reason.quantity.replace('.', '-')}`, 'answer.name.other'], {
                name: reason.quantity,
              })}
            </p>
            {reason.formula !== null && <p className="break-words">{reason.formula}</p>}
            <p className="text-xs text-soft">
              {[reason.label && t([`working.label.${reason.label}`, 'working.label.other']), reason.source]
                .filter(Boolean)
                .join(' · ')}
            </p>
            {reason.uncertainty !== null && (
              <p className="text-xs text-soft">{t('working.uncertainty', { text: reason.uncertainty })}</p>
            )}
            {reason.wouldChangeIf !== null && reason.wouldChangeIf !== '' && (
              <p className="text-xs text-soft">{t('working.wouldChangeIf', { text: named(reason.wouldChangeIf) })}</p>
            )}
            <p className="text-xs break-words text-soft">
              {reason.inputs === null
                ? t('working.inputsWithheld')
                : Object.entries(reason.inputs)
                    .map(([name, value]) => `${name} ${typeof value === 'string' ? value : JSON.stringify(value)}`)
                    .join(' · ')}
            </p>
          </li>
        ))}
      </ul>
    </details>
  )
}
