import { useEffect, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { rides } from '#contract/advisor.ts'
import { useFormat } from '../../lib/format.ts'
import { Field, Select, TextInput } from '../../ui/Field.tsx'
import type { FilterName, Filters } from './filters.ts'
import { useLimitText } from './limit-text.ts'
import { Segments } from './Segments.tsx'

const steps = (from: number, to: number, by: number) =>
  Array.from({ length: Math.floor((to - from) / by) + 1 }, (_, i) => String(from + i * by))
const depths = steps(20, 80, 5)
const limits = steps(90, 150, 5)
const spokes = ['20', '24', '28', '32', '36']
const tyres = ['23', '25', '28', '30', '32', '35', '38', '40', '45', '50', '55', '60']

interface FilterFormProps {
  filters: Filters
  onChange: (change: Partial<Record<FilterName, string>>, typing?: boolean) => void
}

/** Each control writes straight to the address; the list follows. */
export function FilterForm({ filters, onChange }: FilterFormProps) {
  const { t } = useTranslation(['catalogue', 'advisor'])
  const format = useFormat()
  const limitText = useLimitText()
  const segments = (name: 'brake' | 'beadSeatMm' | 'material' | 'seat', words: string, values: readonly string[]) => (
    <Segments
      legend={t(`filter.${name}`)}
      choices={[
        { value: '', label: t('filter.any') },
        ...values.map((value) => ({ value, label: t(`filter.${words}.${value}`) })),
      ]}
      value={filters[name] ?? ''}
      onChange={(value) => {
        onChange({ [name]: value })
      }}
    />
  )
  const select = (
    name: FilterName,
    values: readonly string[],
    word: (value: string) => string,
    none = t('filter.free'),
  ) => (
    <Field label={<span className="text-sm">{t(`filter.${name}`)}</span>}>
      {(ids) => (
        <Select
          {...ids}
          className="block min-h-11! py-1.5! text-[0.9375rem]!"
          value={filters[name] ?? ''}
          onChange={(event) => {
            onChange({ [name]: event.target.value })
          }}
        >
          <option value="">{none}</option>
          {/* A value from a shared address may lie between our steps. */}
          {withOwn(values, filters[name]).map((value) => (
            <option key={value} value={value}>
              {word(value)}
            </option>
          ))}
        </Select>
      )}
    </Field>
  )
  const tick = (name: 'assist' | 'inStock') => (
    <label className="flex min-h-11 items-center gap-3 text-[0.9375rem]">
      <input
        type="checkbox"
        className="size-5 flex-none accent-own"
        checked={filters[name] === 'yes'}
        onChange={(event) => {
          onChange({ [name]: event.target.checked ? 'yes' : '' })
        }}
      />
      {t(`filter.${name}`)}
    </label>
  )
  const depth = (value: string) => format.depth(Number(value)).text
  return (
    <form
      role="search"
      className="grid grid-cols-1 gap-4"
      onSubmit={(event) => {
        event.preventDefault()
      }}
    >
      <Search value={filters.q ?? ''} onChange={onChange} />
      {select('ride', rides, (ride) => t(`advisor:ride.${ride}.label`), t('filter.anyRide'))}
      {segments('brake', 'brakes', ['disc', 'rim'])}
      <div className="grid grid-cols-2 gap-3">
        {select('depthFromMm', depths, depth)}
        {select('depthToMm', depths, depth)}
      </div>
      {select('limitFromKg', limits, (kg) => limitText(Number(kg)).text)}
      {select('spokesFrom', spokes, (count) => count)}
      {select('tyreMm', tyres, (mm) => format.width(Number(mm)).text)}
      {segments('material', 'materials', ['carbon', 'alloy'])}
      {segments('beadSeatMm', 'sizes', ['622', '584'])}
      {segments('seat', 'seats', ['hooked', 'hookless'])}
      <div>
        {tick('assist')}
        {tick('inStock')}
      </div>
    </form>
  )
}

const withOwn = (values: readonly string[], own: string | undefined) =>
  own === undefined || values.includes(own) ? values : [...values, own]

const TYPING_MS = 250

/** Typing is not sent letter by letter. */
function Search({ value, onChange }: { value: string; onChange: FilterFormProps['onChange'] }) {
  const { t } = useTranslation('catalogue')
  const [text, setText] = useState(value)
  const [seen, setSeen] = useState(value)
  // The address changed from elsewhere (a chip taken away, Back).
  if (value !== seen) {
    setSeen(value)
    setText(value)
  }
  useEffect(() => {
    const typed = text.trim()
    if (typed === value) return
    const timer = setTimeout(() => {
      setSeen(typed)
      onChange({ q: typed }, true)
    }, TYPING_MS)
    return () => {
      clearTimeout(timer)
    }
  }, [text, value, onChange])
  return (
    <Field label={<span className="text-sm">{t('filter.q')}</span>}>
      {(ids) => (
        <TextInput
          {...ids}
          type="search"
          maxLength={80}
          autoComplete="off"
          className="block min-h-11! py-1.5!"
          value={text}
          onChange={(event) => {
            setText(event.target.value)
          }}
        />
      )}
    </Field>
  )
}
