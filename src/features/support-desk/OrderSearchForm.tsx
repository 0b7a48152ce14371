import { useEffect, useRef, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { orderStates, type OrderState } from '#contract/checkout.ts'
import { useSlashKey } from '../../lib/slash-key.ts'
import { focusFirstRow } from '../../ui/DataTable.tsx'
import { Select, TextInput } from '../../ui/Field.tsx'
import type { OrderSearch } from './queries.ts'

/** A pause in typing this long asks the server. */
const PAUSE_MS = 250

/** `/` comes here, the arrow down leaves for the rows. What is typed goes into the address after a pause. */
export function OrderSearchForm({
  search,
  onChange,
}: {
  search: OrderSearch
  onChange: (search: OrderSearch) => void
}) {
  const { t } = useTranslation('support-desk')
  const field = useRef<HTMLInputElement>(null)
  useSlashKey(field)
  const [text, setText] = useState(search.q)
  const [seen, setSeen] = useState(search.q)
  // Back and forward change the address from outside.
  if (search.q !== seen) {
    setSeen(search.q)
    if (text.trim() !== search.q) setText(search.q)
  }
  useEffect(() => {
    const q = text.trim()
    if (q === search.q) return
    const timer = setTimeout(() => {
      onChange({ ...search, q })
    }, PAUSE_MS)
    return () => {
      clearTimeout(timer)
    }
  }, [text, search, onChange])
  return (
    <form
      role="search"
      className="no-print flex flex-wrap items-end gap-3"
      onSubmit={(event) => {
        event.preventDefault()
        onChange({ ...search, q: text.trim() })
      }}
    >
      <label className="min-w-0 flex-1 basis-72 text-sm font-[650]">
        <span className="flex items-baseline justify-between">
          {t('search.label')}
          <kbd aria-hidden className="hidden border border-line px-1.5 font-sans text-xs text-soft md:block">
            /
          </kbd>
        </span>
        <TextInput
          ref={field}
          type="search"
          value={text}
          maxLength={100}
          autoComplete="off"
          spellCheck={false}
          placeholder={t('search.hint')}
          className="mt-1 min-h-10! py-1.5!"
          onChange={(event) => {
            setText(event.target.value)
          }}
          onKeyDown={(event) => {
            if (event.key !== 'ArrowDown') return
            event.preventDefault()
            focusFirstRow()
          }}
        />
      </label>
      <label className="text-sm font-[650] max-sm:w-full">
        {t('search.state')}
        <Select
          value={search.state}
          className="mt-1 min-h-10! py-1.5!"
          onChange={(event) => {
            onChange({ q: text.trim(), state: event.target.value as OrderState | '' })
          }}
        >
          <option value="">{t('search.everyState')}</option>
          {orderStates.map((state) => (
            <option key={state} value={state}>
              {t(`state.${state}`)}
            </option>
          ))}
        </Select>
      </label>
    </form>
  )
}
