/** The one error handler. In: whatever was thrown. Out: application/problem+json (RFC 9457); nothing of our insides leaves. */
import { ForeignKeyConstraintError, OptimisticLockError } from 'sequelize'
import type { ErrorRequestHandler, Request, Response } from 'express'
import type { TFunction } from 'i18next'
import type { Logger } from 'pino'
import { ZodError, type core } from 'zod'
import type { Problem } from '#contract/common.ts'
import { AppError, type FieldError } from './errors.ts'
import { localeOf, textsIn } from './texts.ts'

/** The id that app.ts gives every request; a person may quote it. */
export const requestId = (req: Request) => (typeof req.id === 'string' ? req.id : '')

const connectionCodes = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'ER_GET_CONNECTION_TIMEOUT',
  'ER_SOCKET_UNEXPECTED_CLOSE',
  'ER_CONNECTION_TIMEOUT',
])

export function toAppError(error: unknown): AppError | null {
  if (error instanceof AppError) return error
  if (error instanceof ZodError) return new AppError('validation', 400, {}, error.issues.flatMap(fieldErrors))
  if (error instanceof OptimisticLockError) return new AppError('changed-meanwhile', 409)
  if (error instanceof ForeignKeyConstraintError) return new AppError('still-in-use', 409)
  if (!(error instanceof Error)) return null
  if (error.name.startsWith('SequelizeConnection') || connectionCodes.has((error as { code?: string }).code ?? '')) {
    return new AppError('unavailable', 503)
  }
  // body-parser and the router mark what they refuse with a 4xx status.
  const { status, type } = error as { status?: number; type?: string }
  if (type === 'entity.too.large') return new AppError('too-large', 413)
  if (type === 'entity.parse.failed') return new AppError('not-json', 400)
  if (status !== undefined && status >= 400 && status < 500) return new AppError('bad-request', status)
  return null
}

function fieldErrors(issue: core.$ZodIssue): FieldError[] {
  const path = issue.path.map(String)
  switch (issue.code) {
    case 'unrecognized_keys':
      return issue.keys.map((key) => ({ path: [...path, key].join('.'), code: 'unknown' }))
    case 'invalid_type':
      return [
        {
          path: path.join('.'),
          code: issue.input === undefined ? 'required' : 'wrong-type',
          data: { expected: issue.expected },
        },
      ]
    case 'too_small':
      return [
        {
          path: path.join('.'),
          code: issue.origin === 'string' ? 'too-short' : 'too-small',
          data: { minimum: Number(issue.minimum) },
        },
      ]
    case 'too_big':
      return [
        {
          path: path.join('.'),
          code: issue.origin === 'string' ? 'too-long' : 'too-large',
          data: { maximum: Number(issue.maximum) },
        },
      ]
    case 'invalid_value':
      return [
        {
          path: path.join('.'),
          code: issue.input === undefined ? 'required' : 'not-a-choice',
          data: { choices: issue.values.join(', ') },
        },
      ]
    case 'custom':
      return [{ path: path.join('.'), code: /^[a-z-]+$/.test(issue.message) ? issue.message : 'not-valid' }]
    default:
      return [{ path: path.join('.'), code: 'not-valid' }]
  }
}

function sendProblem(req: Request, res: Response, error: AppError) {
  const t: TFunction = textsIn(localeOf(req))
  const { fields } = error
  const problem: Problem = {
    type: `/problems/${error.code}`,
    title: t([`errors:${error.code}.title`, 'errors:unknown.title']),
    status: error.status,
    detail: t([`errors:${error.code}.detail`, 'errors:unknown.detail'], error.data),
    instance: req.originalUrl.split('?')[0] ?? '',
    code: error.code,
    requestId: requestId(req),
    ...(Object.keys(error.data).length > 0 ? { data: error.data } : {}),
    ...(fields
      ? {
          errors: fields.map(({ path, code, data, cell }) => {
            const message = t([`errors:field.${code}`, 'errors:field.not-valid'], data ?? {})
            const place = cell?.row === '' ? 'errors:field.at-value' : 'errors:field.at-cell'
            return { path, code, message: cell ? t(place, { ...cell, message }) : message }
          }),
        }
      : {}),
  }
  if (error.status === 503) res.set('Retry-After', '2')
  res.status(error.status).type('application/problem+json').send(JSON.stringify(problem))
}

export const problemHandler =
  (log: Logger): ErrorRequestHandler =>
  (error: unknown, req, res, next) => {
    if (res.headersSent) {
      next(error)
      return
    }
    const known = toAppError(error)
    if (!known || known.status >= 500) log.error({ err: error, requestId: req.id }, 'request failed')
    sendProblem(req, res, known ?? new AppError('unknown', 500))
  }
