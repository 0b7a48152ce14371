import { useState, type ReactNode } from 'react'
import { Field } from './Field.tsx'

interface NumberFieldProps {
  label: ReactNode
  unit: string
  hint?: ReactNode
  error?: string | undefined
  value: number | null
  onChange: (value: number | null) => void
  /** The rider's own number stands large and red. */
  large?: boolean
  name?: string
  /** For an error summary that points here. */
  id?: string
  className?: string
}

/** Reads `82,5` and `82.5` alike; text that is no number is kept as typed and reported as null. */
export function parseNumber(text: string): number | null {
  const trimmed = text.trim().replace(',', '.')
  return /^-?\d*\.?\d+$|^-?\d+\.$/.test(trimmed) ? Number(trimmed) : null
}

export function NumberField({
  label,
  unit,
  hint,
  error,
  value,
  onChange,
  large = false,
  name,
  id,
  className,
}: NumberFieldProps) {
  const [text, setText] = useState(value === null ? '' : String(value))
  // A value that changed from outside (unit switch, reset) replaces the text; the rider's own typing is never rewritten.
  const [seen, setSeen] = useState(value)
  if (value !== seen) {
    setSeen(value)
    if (parseNumber(text) !== value) setText(value === null ? '' : String(value))
  }
  return (
    <Field label={label} hint={hint} error={error} className={className} id={id}>
      {(ids) => (
        <div
          className={`flex max-w-72 border bg-sheet ${error !== undefined ? 'border-2 border-own' : 'border-ink'} focus-within:outline-3 focus-within:outline-offset-2 focus-within:outline-own`}
        >
          <input
            {...ids}
            name={name}
            inputMode="decimal"
            autoComplete="off"
            value={text}
            onChange={(event) => {
              setText(event.target.value)
              const next = parseNumber(event.target.value)
              setSeen(next)
              onChange(next)
            }}
            className={`min-w-0 flex-1 bg-transparent px-3.5 py-2.5 outline-none focus-visible:outline-none ${large ? 'text-2xl font-[650] text-own' : 'min-h-11 text-base font-semibold'}`}
          />
          <span className="flex items-center border-s border-line px-3.5 text-soft">{unit}</span>
        </div>
      )}
    </Field>
  )
}
