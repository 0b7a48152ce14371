import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Wheelset } from '#contract/catalogue.ts'
import { Button } from '../../ui/Button.tsx'
import { offered, openOptions, optionNames, type OptionName, type Options } from './options.ts'
import { Segments } from './Segments.tsx'
import { useWheelRows } from './wheel-rows.ts'

interface OptionsFormProps {
  set: Wheelset
  /** What is certain already: the only choice, or the rider's own bike. */
  initial: Options
  busy: boolean
  onPut: (options: Options) => void
}

/** Axles, gear body and rotor mount of one wheelset, then the basket. An open choice is asked for, never guessed. */
export function OptionsForm({ set, initial, busy, onPut }: OptionsFormProps) {
  const { t } = useTranslation(['catalogue', 'account'])
  const { part } = useWheelRows()
  const [chosen, setChosen] = useState<Partial<Options>>({})
  const [asked, setAsked] = useState(false)
  const options = { ...initial, ...chosen }
  const choices = offered(set)
  const open = openOptions(set, options)
  const label = (name: OptionName) => t(`account:bike.${name}`)
  const id = (name: OptionName) => `option-${name}`
  const fixed = optionNames.filter((name) => choices[name].length === 1)
  const free = optionNames.filter((name) => choices[name].length > 1)
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault()
        const first = open[0]
        if (first === undefined) {
          onPut(options)
          return
        }
        setAsked(true)
        document.querySelector<HTMLInputElement>(`#${id(first)} input`)?.focus()
      }}
    >
      <h2>{t('wheelset.options')}</h2>
      <p className="mt-1 text-sm text-soft">{t(free.length > 0 ? 'wheelset.optionsHint' : 'wheelset.optionsOnly')}</p>
      <div className="mt-4 grid gap-4">
        {free.map((name) => (
          <Segments
            key={name}
            id={id(name)}
            stacked
            legend={label(name)}
            choices={choices[name].map((code) => ({ value: code, label: part(code) }))}
            value={options[name]}
            onChange={(code) => {
              setChosen((before) => ({ ...before, [name]: code }))
            }}
            error={
              asked && open.includes(name) ? t('wheelset.choose', { label: label(name).toLowerCase() }) : undefined
            }
          />
        ))}
        {fixed.length > 0 && (
          <ul className="text-sm text-soft">
            {fixed.map((name) => (
              <li key={name}>{t('wheelset.only', { label: label(name), value: part(choices[name][0] ?? '') })}</li>
            ))}
          </ul>
        )}
      </div>
      <Button type="submit" busy={busy} className="mt-5 w-full">
        {t('wheelset.put')}
      </Button>
    </form>
  )
}
