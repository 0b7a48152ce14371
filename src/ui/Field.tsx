import { useId, type ComponentProps, type ReactNode } from 'react'

interface FieldProps {
  label: ReactNode
  hint?: ReactNode
  error?: string | undefined
  className?: string
  /** For a control that others point at by a name of their own. */
  id?: string
  children: (ids: { id: string; 'aria-describedby': string | undefined; 'aria-invalid': true | undefined }) => ReactNode
}

/** Label above, hint below it, error beside the control and tied to it. */
export function Field({ label, hint, error, className, id: given, children }: FieldProps) {
  const own = useId()
  const id = given ?? own
  const described = [hint !== undefined ? `${id}-hint` : '', error !== undefined ? `${id}-error` : '']
    .filter(Boolean)
    .join(' ')
  return (
    <div className={className}>
      <label htmlFor={id} className="block font-[650]">
        {label}
      </label>
      {hint !== undefined && (
        <p id={`${id}-hint`} className="mt-0.5 text-sm text-soft">
          {hint}
        </p>
      )}
      <div className="mt-1.5">
        {children({ id, 'aria-describedby': described || undefined, 'aria-invalid': error !== undefined || undefined })}
      </div>
      {error !== undefined && (
        <p id={`${id}-error`} className="mt-1 border-s-[3px] border-own ps-2 text-sm font-[650] text-own">
          {error}
        </p>
      )}
    </div>
  )
}

const control =
  'min-h-12 w-full border border-strong bg-sheet px-3.5 py-2.5 text-base text-ink aria-invalid:border-2 aria-invalid:border-own'

export const TextInput = ({ className, ...rest }: ComponentProps<'input'>) => (
  <input {...rest} className={`${control} ${className ?? ''}`} />
)

export const TextArea = ({ className, ...rest }: ComponentProps<'textarea'>) => (
  <textarea rows={4} {...rest} className={`${control} ${className ?? ''}`} />
)

export const Select = ({ className, ...rest }: ComponentProps<'select'>) => (
  <select {...rest} className={`${control} ${className ?? ''}`} />
)
