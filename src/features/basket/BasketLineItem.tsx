import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { BasketLineView, BasketProblem, LineOptions } from '#contract/basket.ts'
import type { Currency } from '#contract/common.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { Field, Select } from '../../ui/Field.tsx'
import { Verdict, type Standing } from '../../ui/Verdict.tsx'

const standings: Record<BasketLineView['limitCheck'], Standing> = {
  within: 'within',
  'no-margin': 'near',
  'over-limit': 'over',
  unconfirmed: 'mismatch',
}
const optionNames = ['frontAxle', 'rearAxle', 'freehub', 'rotorMount'] as const

interface Props {
  line: BasketLineView
  currency: Currency
  busy: boolean
  onChange: (change: { quantity?: number; options?: LineOptions }) => void
  onRemove: () => void
}

/** One wheelset in the basket: what it is, whether it carries the rider, what is still to be chosen, what it costs. */
export function BasketLineItem({ line, currency, busy, onChange, onRemove }: Props) {
  const { t } = useTranslation(['basket', 'account'])
  const format = useFormat()
  const word = (value: string) => t([`account:bike.values.${value}`, value])
  const limit = format.mass(line.limitKg, 'down').text
  const total = line.readyToRideKg === null ? '' : format.mass(line.readyToRideKg, 'up').text
  const gap = format.mass(Math.abs(line.marginKg ?? 0), (line.marginKg ?? 0) < 0 ? 'up' : 'down').text
  return (
    <li className="grid gap-x-8 gap-y-4 border-b border-line py-6 md:grid-cols-[minmax(0,1.3fr)_minmax(0,1fr)_auto]">
      <div>
        <h2 className="text-xl">
          <Link to={`/range/${line.slug}`} className="no-underline hover:underline">
            {line.name}
          </Link>
        </h2>
        <p className="mt-2">
          <Verdict standing={standings[line.limitCheck]}>
            {t(`limit.${line.limitCheck}`, { limit, total, gap })}
          </Verdict>
        </p>
        <p className="mt-1.5 max-w-[46ch] text-sm text-soft">
          {t(`limitText.${line.limitCheck}`, { limit, total, gap })}
        </p>
        {line.problems.length > 0 && (
          <ul className="mt-3 grid gap-2">
            {line.problems.map((problem) => (
              <Problem key={problem.code + problem.path} problem={problem} />
            ))}
          </ul>
        )}
        {line.limitCheck === 'unconfirmed' && (
          <Link to="/fitting" className="mt-2 inline-block text-sm font-[650]">
            {t('doFitting')}
          </Link>
        )}
      </div>
      <div className="grid content-start gap-3">
        {optionNames.map((name) => {
          const choices = line.optionChoices[name]
          if (choices.length === 0) return null
          if (choices.length === 1) {
            return (
              <p key={name} className="text-sm">
                <span className="block text-soft">{t(`account:bike.${name}`)}</span>
                {word(choices[0] ?? '')}
              </p>
            )
          }
          const missing = line.problems.some(({ path, code }) => code === 'option-missing' && path.endsWith(`.${name}`))
          return (
            <Field key={name} label={t(`account:bike.${name}`)} error={missing ? t('chooseOne') : undefined}>
              {(ids) => (
                <Select
                  {...ids}
                  value={line.options[name] ?? ''}
                  disabled={busy}
                  onChange={(event) => {
                    onChange({
                      options: { ...line.options, [name]: event.target.value === '' ? null : event.target.value },
                    })
                  }}
                >
                  <option value="">{t('chooseOne')}</option>
                  {choices.map((choice) => (
                    <option key={choice} value={choice}>
                      {word(choice)}
                    </option>
                  ))}
                </Select>
              )}
            </Field>
          )
        })}
      </div>
      <div className="flex items-start justify-between gap-4 md:flex-col md:items-end">
        <p className="figure text-2xl">{format.money(line.lineCents, currency)}</p>
        <div className="flex items-end gap-2">
          <label className="grid gap-1 text-sm text-soft">
            {t('quantity')}
            <Select
              className="w-20!"
              value={line.quantity}
              disabled={busy}
              onChange={(event) => {
                onChange({ quantity: Number(event.target.value) })
              }}
            >
              {[1, 2, 3, 4, 5].map((count) => (
                <option key={count}>{count}</option>
              ))}
            </Select>
          </label>
          <Button kind="plain" disabled={busy} onClick={onRemove} aria-label={t('removeOne', { name: line.name })}>
            {t('remove')}
          </Button>
        </div>
      </div>
    </li>
  )
}

function Problem({ problem: { code, data } }: { problem: BasketProblem }) {
  const { t } = useTranslation(['basket', 'catalogue'])
  const reason =
    typeof data.reason === 'string'
      ? t([`catalogue:verdict.rule.${data.reason}`, 'catalogue:verdict.mismatch', 'basket:problem.other'])
      : ''
  return (
    <li className="border-s-[3px] border-own ps-3 text-sm font-[650]">
      {t([`problem.${code}`, 'problem.other'], { ...data, reason })}
    </li>
  )
}
