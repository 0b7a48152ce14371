/** Puts what zod or the server found wrong with a form into words, field by field. Both use the codes of errors.json `field.*`. */
import type { TFunction } from 'i18next'
import type { FieldErrors, FieldValues, Path, UseFormSetError } from 'react-hook-form'
import type { core } from 'zod'
import { ApiError } from './api.ts'

const SPLIT = '|'

/** For a resolver's parse options: `code|figure` instead of zod's own English. */
export const codeOf: core.$ZodErrorMap = (issue) => {
  switch (issue.code) {
    case 'invalid_type':
      return 'required'
    case 'too_small':
      return issue.origin === 'string' && Number(issue.minimum) <= 1
        ? 'required'
        : `${issue.origin === 'string' ? 'too-short' : 'too-small'}${SPLIT}${String(issue.minimum)}`
    case 'too_big':
      return `${issue.origin === 'string' ? 'too-long' : 'too-large'}${SPLIT}${String(issue.maximum)}`
    default:
      return issue.message ?? 'not-valid'
  }
}

/** @param message `code` or `code|figure` from the browser's own check, or a sentence from the server */
export function inWords(t: TFunction, message: string | undefined): string | undefined {
  if (message === undefined) return undefined
  const [code = '', figure] = message.split(SPLIT)
  if (!/^[a-z-]+$/.test(code)) return message
  return t([`errors:field.${code}`, 'errors:field.not-valid'], { minimum: figure, maximum: figure })
}

/** Every message of a form's errors with the dotted name of its field, in the form's own order. */
export function listErrors(errors: FieldErrors, before = ''): { name: string; message: string }[] {
  return Object.entries(errors).flatMap(([key, one]) => {
    const name = before === '' ? key : `${before}.${key}`
    if (typeof one !== 'object') return []
    if ('message' in one && typeof one.message === 'string' && one.message !== '')
      return [{ name, message: one.message }]
    return key === 'ref' ? [] : listErrors(one as FieldErrors, name)
  })
}

/** Hangs the server's field errors on their fields. @returns false where the refusal was about something else */
export function takeFieldErrors<F extends FieldValues>(error: unknown, setError: UseFormSetError<F>): boolean {
  const found = error instanceof ApiError ? (error.problem.errors ?? []) : []
  for (const { path, message } of found) setError(path as Path<F>, { type: 'server', message })
  return found.length > 0
}

/** `1180`, `1180,5` and `1180.50` in minor units; null for anything else, thousands marks among it: `1.180` could be either. */
export function readMoney(text: string): number | null {
  const match = /^(\d{1,7})(?:[.,](\d{1,2}))?$/.exec(text.trim())
  return match ? Number(match[1]) * 100 + Number((match[2] ?? '').padEnd(2, '0')) : null
}

export const typeMoney = (cents: number) => (cents / 100).toFixed(2)
