import { useTranslation } from 'react-i18next'
import { useState, useSyncExternalStore, type ReactNode } from 'react'
import type { Advice } from '#contract/advisor.ts'
import { inToMm, kgToLb, lbToKg, mmToIn, psiToBar, barToPsi } from '#core/units.ts'
import type { Draft, Mass } from '../../lib/fitting.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { Field as Labelled, Select } from '../../ui/Field.tsx'
import { NumberField } from '../../ui/NumberField.tsx'
import { MassQuestion } from './MassQuestion.tsx'
import { asked, assumedValue, groups, readPath, writePath, type Field } from './sharpen-fields.ts'
import { usualSetup } from './tyre-widths.ts'
import { useAdviceWords } from './words.ts'

interface SharpenProps {
  advice: Advice
  draft: Draft
  setDraft: (change: Draft) => void
  mass: Mass | null
  setMass: (mass: Mass | null) => void
  /** The result in one line, kept in sight while the answers change. */
  summary: ReactNode
}

/** Every answer with its value, assumed ones marked, each to be given or changed where it stands. */
export function Sharpen({ advice, draft, setDraft, mass, setMass, summary }: SharpenProps) {
  const { t } = useTranslation('advisor')
  const wide = useWide()
  return (
    <section className="border-t border-ink print:hidden" aria-labelledby="sharpen">
      <div className="px-5 pt-7 pb-5 md:px-9">
        <h2 id="sharpen" tabIndex={-1} className="text-2xl!">
          {t('findings.sharpen.title')}
        </h2>
        <p className="mt-1 max-w-[64ch] text-soft">{t('findings.sharpen.text')}</p>
      </div>
      <div className="grid border-t border-line md:grid-cols-2 xl:grid-cols-4">
        {groups.map(({ name, fields }) => {
          const shown = fields.filter((one) => asked(one, draft))
          const open = shown.filter(({ path }) => readPath(draft, path) === undefined).length
          return (
            <details
              key={`${name}${wide}`}
              open={wide}
              id={`group-${name}`}
              className="group min-w-0 border-line px-5 max-md:not-first:border-t md:px-9 md:py-5 md:not-first:border-s xl:px-6 xl:first:ps-9 xl:last:pe-9 md:max-xl:nth-[n+3]:border-t md:max-xl:odd:border-s-0"
            >
              <summary
                id={name === 'tyre' ? 'sharpen-tyre' : undefined}
                tabIndex={0}
                className="flex items-baseline justify-between gap-3 py-3.5 md:py-0"
              >
                <h3 className="text-lg!">{t(`groups.${name}`)}</h3>
                <span className="text-sm text-soft">
                  {t('findings.sharpen.count', { count: open })}
                  <span aria-hidden className="ms-2 inline-block transition-transform group-open:rotate-90 md:hidden">
                    ›
                  </span>
                </span>
              </summary>
              <div className="grid grid-cols-1 gap-3.5 pb-5 md:mt-4 md:pb-0">
                {name === 'load' && (
                  <MassQuestion mass={mass} onChange={setMass} asked controlName="sharpen-mass" small />
                )}
                {shown.map((one) => (
                  <Control key={one.path} field={one} advice={advice} draft={draft} setDraft={setDraft} />
                ))}
              </div>
            </details>
          )
        })}
      </div>
      <div className="sticky bottom-0 z-10 border-t border-ink bg-sheet px-5 py-2.5 md:mx-2 md:px-7 [@media(max-height:30rem)]:static">
        {summary}
      </div>
    </section>
  )
}

interface ControlProps {
  field: Field
  advice: Advice
  draft: Draft
  setDraft: (change: Draft) => void
}

function Control({ field, advice, draft, setDraft }: ControlProps) {
  const { t } = useTranslation('advisor')
  const { field: nameOf, answer } = useAdviceWords()
  const { path } = field
  const value = readPath(draft, path)
  const guess = advice.assumed.includes(path) ? assumedValue(advice, path) : undefined
  const guessed =
    guess === undefined || guess === null
      ? t('findings.sharpen.notSaid')
      : t('findings.sharpen.assumedValue', { value: answer(path, guess) })
  const set = (next: unknown) => {
    setDraft(writePath(draft, path, next, usualSetup(draft)))
  }
  if (field.kind === 'number')
    return (
      <Figure key={path} field={field} value={typeof value === 'number' ? value : null} guessed={guessed} set={set} />
    )
  return (
    <Labelled label={<span className="text-sm">{nameOf(path)}</span>}>
      {(ids) => (
        <Select
          {...ids}
          className={`min-h-11! py-1.5! text-[0.9375rem]! ${value === undefined ? 'text-soft!' : 'font-[650] text-own!'}`}
          value={
            typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean' ? String(value) : ''
          }
          onChange={(event) => {
            set(field.options.find((one) => String(one) === event.target.value))
          }}
        >
          {field.required !== true && <option value="">{guessed}</option>}
          {field.options.map((one) => (
            <option key={String(one)} value={String(one)}>
              {answer(path, one)}
            </option>
          ))}
        </Select>
      )}
    </Labelled>
  )
}

interface FigureProps {
  field: Extract<Field, { kind: 'number' }>
  value: number | null
  guessed: string
  set: (value: number | undefined) => void
}

const rounded = (value: number, digits: number) => Math.round(value * 10 ** digits) / 10 ** digits

/** A number in the visitor's unit. What lies outside the bounds is named and not sent. */
function Figure({ field: { path, unit, least, most }, value, guessed, set }: FigureProps) {
  const { t } = useTranslation('advisor')
  const { format, field: nameOf } = useAdviceWords()
  const units = usePreferences()
  const [shown, read, name]: [(value: number) => number, (typed: number) => number, string] =
    unit === 'mass' && units.mass !== 'kg'
      ? [kgToLb, lbToKg, 'lb']
      : unit === 'pressure' && units.pressure === 'psi'
        ? [barToPsi, psiToBar, 'psi']
        : unit === 'width' && units.length === 'in'
          ? [mmToIn, inToMm, 'in']
          : unit === 'share'
            ? [(share) => share * 100, (percent) => percent / 100, '%']
            : [(same) => same, (same) => same, { mass: 'kg', pressure: 'bar', width: 'mm', speed: 'km/h' }[unit]]
  const digits = name === 'in' ? 2 : 1
  const [refused, setRefused] = useRefused(value)
  return (
    <NumberField
      id={`sharpen-${path}`}
      className={value === null ? '' : '[&_input]:text-own'}
      label={<span className="text-sm">{nameOf(path)}</span>}
      hint={value === null && refused === null ? guessed : undefined}
      unit={name}
      value={value === null ? refused : rounded(shown(value), digits)}
      error={
        refused === null
          ? undefined
          : t('findings.sharpen.range', {
              from: format.number(Math.ceil(shown(least) - 1e-9), 0),
              to: `${format.number(Math.floor(shown(most) + 1e-9))}\u00a0${name}`,
            })
      }
      onChange={(typed) => {
        const next = typed === null ? null : read(typed)
        const fits = next === null || (next >= least && next <= most)
        setRefused(fits ? null : typed)
        set(next === null || !fits ? undefined : rounded(next, 4))
      }}
    />
  )
}

/** A typed number that lies outside its bounds, until another value comes in. */
function useRefused(value: number | null): [number | null, (typed: number | null) => void] {
  const [refused, setRefused] = useState<number | null>(null)
  return [value === null ? refused : null, setRefused]
}

const WIDE = '(min-width: 48rem)'

/** On a phone the groups open one by one. */
function useWide(): boolean {
  return useSyncExternalStore(
    (tell) => {
      const media = window.matchMedia(WIDE)
      media.addEventListener('change', tell)
      return () => {
        media.removeEventListener('change', tell)
      }
    },
    () => window.matchMedia(WIDE).matches,
    () => true,
  )
}
