import { useEffect, useRef } from 'react'

export interface FieldProblem {
  /** The id of the control, or null where the problem belongs to none. */
  controlId: string | null
  message: string
}

/** What is wrong, at the top of a form, each with a link to its field. Takes the focus when it appears. */
export function ErrorSummary({ title, problems }: { title: string; problems: readonly FieldProblem[] }) {
  const ref = useRef<HTMLDivElement>(null)
  useEffect(() => {
    ref.current?.focus()
  }, [])
  return (
    <div ref={ref} tabIndex={-1} role="alert" className="border-2 border-own px-4 py-3">
      <p className="font-bold">{title}</p>
      <ul className="mt-1 list-disc ps-5">
        {problems.map(({ controlId, message }) => (
          <li key={`${controlId ?? ''}${message}`}>
            {controlId === null ? (
              message
            ) : (
              <a
                href={`#${controlId}`}
                className="text-own underline"
                onClick={(event) => {
                  event.preventDefault()
                  document.getElementById(controlId)?.focus()
                }}
              >
                {message}
              </a>
            )}
          </li>
        ))}
      </ul>
    </div>
  )
}
