import { useId, type ReactNode } from 'react'

interface SegmentsProps<V extends string> {
  legend: ReactNode
  choices: readonly { value: V; label: ReactNode }[]
  value: V | null
  onChange: (value: V) => void
  /** One below the other, for longer words. */
  stacked?: boolean
  error?: string | undefined
  id?: string
}

/** A short choice as a row of joined radio buttons. */
export function Segments<V extends string>({
  legend,
  choices,
  value,
  onChange,
  stacked = false,
  error,
  id,
}: SegmentsProps<V>) {
  const name = useId()
  return (
    <fieldset id={id} className="min-w-0" aria-describedby={error === undefined ? undefined : `${name}-error`}>
      <legend className="text-sm leading-6 font-[650]">{legend}</legend>
      <div className={`mt-1.5 flex border border-strong ${stacked ? 'flex-col' : ''}`}>
        {choices.map((choice, index) => {
          const on = choice.value === value
          // The accent belongs to what a rider chose; "any" is no choice yet.
          const look = !on
            ? 'text-soft hover:text-ink'
            : choice.value === ''
              ? 'font-[650] shadow-[inset_0_-2px_0_var(--ink)]'
              : 'bg-own-wash font-[650] shadow-[inset_0_-2px_0_var(--own)]'
          const between = index === 0 ? '' : stacked ? 'border-t border-line' : 'border-s border-line'
          return (
            <label
              key={choice.value}
              className={`relative flex min-h-11 flex-1 cursor-pointer items-center gap-2 px-2.5 py-1.5 text-[0.9375rem] leading-tight has-focus-visible:z-10 has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-own ${stacked ? '' : 'justify-center text-center'} ${between} ${look} ${on ? 'forced-colors:outline-2 forced-colors:-outline-offset-2' : ''}`}
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
              {stacked && (
                <span
                  aria-hidden
                  className={`size-3.5 flex-none rounded-full border-[1.5px] ${on ? 'border-[4px] border-own' : 'border-strong'}`}
                />
              )}
              <span>{choice.label}</span>
            </label>
          )
        })}
      </div>
      {error !== undefined && (
        <p id={`${name}-error`} className="mt-1 border-s-[3px] border-own ps-2 text-sm font-[650] text-own">
          {error}
        </p>
      )}
    </fieldset>
  )
}
