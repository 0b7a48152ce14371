import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Mass } from '../../lib/fitting.ts'
import { formatter, useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { Button } from '../../ui/Button.tsx'
import { Field, Select } from '../../ui/Field.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { NumberField } from '../../ui/NumberField.tsx'
import {
  checkMass,
  entryOf,
  LEAST_KG,
  massBands,
  MOST_KG,
  type MassEntry,
  type MassUnit,
  type Reading,
} from './mass-entry.ts'

const units: readonly MassUnit[] = ['kg', 'lb', 'st']

interface MassQuestionProps {
  mass: Mass | null
  onChange: (mass: Mass | null) => void
  /** Set once the rider wants to go on: only then is an open or impossible answer called wrong. */
  asked: boolean
  controlName: string
  /** Beside the findings there is less room. */
  small?: boolean
}

/** Number or band. A number that looks like a slip of the unit is asked about and not counted until it is confirmed. */
export function MassQuestion({ mass, onChange, asked, controlName, small = false }: MassQuestionProps) {
  const { t, i18n } = useTranslation('advisor')
  const format = useFormat()
  const preferences = usePreferences()
  const known = mass && 'bodyMassKg' in mass ? mass.bodyMassKg : null
  const [banded, setBanded] = useState(mass !== null && 'bodyMassBandKg' in mass)
  const [entry, setEntry] = useState<MassEntry>(() => entryOf(known, preferences.mass))
  const [confirmed, setConfirmed] = useState(known !== null)
  const check = checkMass(entry)
  const language = i18n.language === 'pt' ? 'pt-PT' : i18n.language
  const plain = (value: number) => new Intl.NumberFormat(language, { maximumFractionDigits: 1 }).format(value)
  const typed = (value: number, unit: MassUnit) => `${plain(value)}\u00a0${t(`fitting.mass.short.${unit}`)}`
  const typedNow = entry.value === null ? '' : typed(entry.value, entry.unit)
  const inKg = (kg: number) => formatter(language, { mass: 'kg', pressure: 'bar', length: 'mm' }).mass(kg).text

  const take = (next: MassEntry, sure: boolean) => {
    setEntry(next)
    setConfirmed(sure)
    const result = checkMass(next)
    onChange(
      result.verdict === 'fine' || (result.verdict === 'ask' && sure) ? { bodyMassKg: exactKg(result.kg) } : null,
    )
  }
  const switchUnit = (unit: MassUnit) => {
    preferences.set({ mass: unit })
    // What was typed stays; only what it is counted in changes.
    take({ ...entry, unit, pounds: unit === 'st' ? entry.pounds : null }, false)
  }
  const takeReading = ({ unit, value }: Reading) => {
    preferences.set({ mass: unit })
    take({ unit, value, pounds: null }, true)
  }

  if (banded) {
    const band = mass && 'bodyMassBandKg' in mass ? mass.bodyMassBandKg : null
    return (
      <div className="grid justify-items-start gap-3">
        <Field
          id={controlName}
          label={t('fitting.mass.bandLabel')}
          hint={t('fitting.mass.bandHint')}
          error={asked && !band ? t('fitting.mass.missing') : undefined}
          className="w-full max-w-72"
        >
          {(ids) => (
            <Select
              {...ids}
              className={band ? 'font-[650] text-own' : ''}
              value={band ? String(band.from) : ''}
              onChange={(event) => {
                const chosen = massBands.find(({ from }) => String(from) === event.target.value)
                onChange(chosen ? { bodyMassBandKg: chosen } : null)
              }}
            >
              <option value="">{t('fitting.mass.bandChoose')}</option>
              {massBands.map(({ from, to }) => (
                <option key={from} value={from}>
                  {t('fitting.mass.bandOption', { from: format.mass(from).value, to: format.mass(to).text })}
                </option>
              ))}
            </Select>
          )}
        </Field>
        <Button
          kind="quiet"
          className="px-0! text-start"
          onClick={() => {
            setBanded(false)
            onChange(null)
            setEntry(entryOf(null, preferences.mass))
          }}
        >
          {t('fitting.mass.exact')}
        </Button>
      </div>
    )
  }

  const impossible = check.verdict === 'low' || check.verdict === 'high'
  const error =
    asked && check.verdict === 'missing'
      ? t('fitting.mass.missing')
      : impossible && (asked || check.verdict === 'high' || String(entry.value).length > 1)
        ? t(`fitting.mass.${check.verdict}`, {
            typed: typedNow,
            least: format.mass(LEAST_KG, 'up').text,
            most: format.mass(MOST_KG, 'down').text,
          })
        : undefined
  const asking = check.verdict === 'ask' && !confirmed
  return (
    <div className={`grid grid-cols-1 justify-items-start gap-4 ${small ? '[&_input]:text-own' : ''}`}>
      <div className="flex flex-wrap items-end gap-x-3 gap-y-3">
        <NumberField
          label={t('fitting.mass.label')}
          unit={t(`fitting.mass.short.${entry.unit}`)}
          value={entry.value}
          onChange={(value) => {
            take({ ...entry, value }, false)
          }}
          large={!small}
          id={controlName}
          className={entry.unit === 'st' ? 'w-36' : 'w-56'}
        />
        {entry.unit === 'st' && (
          <NumberField
            label={<span className="sr-only">{t('fitting.mass.lb')}</span>}
            unit={t('fitting.mass.short.lb')}
            value={entry.pounds}
            onChange={(pounds) => {
              take({ ...entry, pounds }, false)
            }}
            large={!small}
            className="w-32"
          />
        )}
        <fieldset className="flex border border-strong">
          <legend className="sr-only">{t('fitting.mass.unit')}</legend>
          {units.map((unit) => (
            <label
              key={unit}
              className={`flex min-h-11 min-w-11 cursor-pointer items-center justify-center px-3 text-sm font-[650] not-first-of-type:border-s not-first-of-type:border-line has-focus-visible:outline-3 has-focus-visible:outline-own ${entry.unit === unit ? 'bg-ink text-sheet' : 'text-soft hover:text-ink'}`}
            >
              <input
                type="radio"
                name={`${controlName}-unit`}
                className="sr-only"
                checked={entry.unit === unit}
                onChange={() => {
                  switchUnit(unit)
                }}
              />
              {t(`fitting.mass.short.${unit}`)}
            </label>
          ))}
        </fieldset>
      </div>
      {error !== undefined && (
        <p
          id={`${controlName}-error`}
          role="alert"
          className="border-s-[3px] border-own ps-2 text-sm font-[650] text-own"
        >
          {error}
        </p>
      )}
      {entry.unit !== 'kg' && (check.verdict === 'fine' || asking) && (
        <p className="text-sm text-soft">{t('fitting.mass.equals', { kg: inKg(check.kg) })}</p>
      )}
      {(asking || (error !== undefined && impossible && check.readings.length > 0)) && (
        <Notice tone="caution" title={t('fitting.mass.ask', { typed: typedNow })} className="max-w-xl">
          <p>{t('fitting.mass.askText')}</p>
          <div className="mt-3 flex flex-wrap gap-2">
            {(asking || impossible ? check.readings : []).map((reading) => (
              <Button
                key={`${reading.unit}${reading.value}`}
                kind="plain"
                small
                onClick={() => {
                  takeReading(reading)
                }}
              >
                {reading.unit === 'kg'
                  ? t('fitting.mass.meant', { reading: typed(reading.value, reading.unit) })
                  : t('fitting.mass.meantIs', {
                      reading: typed(reading.value, reading.unit),
                      kg: inKg(reading.kg),
                    })}
              </Button>
            ))}
            {asking && (
              <Button
                kind="plain"
                small
                onClick={() => {
                  take(entry, true)
                }}
              >
                {t('fitting.mass.right', { typed: typedNow })}
              </Button>
            )}
          </div>
        </Notice>
      )}
      <Button
        kind="quiet"
        className={`px-0! text-start ${small ? 'text-sm!' : ''}`}
        onClick={() => {
          setBanded(true)
          onChange(null)
        }}
      >
        {t('fitting.mass.band')}
      </Button>
    </div>
  )
}

/** Pounds and stone have endless digits in kilograms; a milligram is enough. */
const exactKg = (kg: number) => Math.round(kg * 1e6) / 1e6
