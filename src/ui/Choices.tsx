import type { ReactNode } from 'react'

export interface Choice<V extends string> {
  value: V
  label: ReactNode
  hint?: ReactNode
  /** A small drawing of our own beside the words. */
  picture?: ReactNode
}

interface ChoicesProps<V extends string> {
  legend: ReactNode
  /** The legend is already said by the page's heading. */
  legendHidden?: boolean
  name: string
  choices: readonly Choice<V>[]
  value: V | null
  onChange: (value: V) => void
  columns?: 1 | 2 | 3
  error?: string | undefined
}

const grids = { 1: '', 2: 'sm:grid-cols-2', 3: 'sm:grid-cols-2 lg:grid-cols-3' }

/** One of several, as large radio cards. Native radios underneath: arrow keys, forms and screen readers work as people know them. */
export function Choices<V extends string>({
  legend,
  legendHidden = false,
  name,
  choices,
  value,
  onChange,
  columns = 1,
  error,
}: ChoicesProps<V>) {
  return (
    <fieldset aria-describedby={error !== undefined ? `${name}-error` : undefined}>
      <legend className={legendHidden ? 'sr-only' : 'mb-2 text-lg font-bold'}>{legend}</legend>
      <div className={`grid gap-2 ${grids[columns]}`}>
        {choices.map((choice) => {
          const on = choice.value === value
          return (
            <label
              key={choice.value}
              className={`relative flex min-h-14 items-center gap-3 border px-3.5 py-2.5 has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-own ${on ? 'border-own bg-own-wash outline-1 -outline-offset-2 outline-own' : 'border-strong bg-sheet hover:border-ink'}`}
            >
              <input
                type="radio"
                className="peer sr-only"
                name={name}
                value={choice.value}
                checked={on}
                onChange={() => {
                  onChange(choice.value)
                }}
              />
              <span
                aria-hidden
                className={`size-4 flex-none rounded-full border-[1.5px] ${on ? 'border-[5px] border-own' : 'border-strong'}`}
              />
              <span className="min-w-0 flex-1">
                <span className="block font-[650] leading-snug">{choice.label}</span>
                {choice.hint !== undefined && (
                  <span className="block text-sm leading-snug text-soft">{choice.hint}</span>
                )}
              </span>
              {choice.picture}
            </label>
          )
        })}
      </div>
      {error !== undefined && (
        <p id={`${name}-error`} className="mt-2 border-s-[3px] border-own ps-2 text-sm font-[650] text-own">
          {error}
        </p>
      )}
    </fieldset>
  )
}
