/** Error objects of the protocol: `{ error: { type, code?, message, param? } }`. */
import type { NextFunction, Request, Response } from 'express'

export class Refusal extends Error {
  readonly status: number
  readonly body: { error: Record<string, unknown> }
  /** Refused while being carried out, not for its parameters: such a reply is kept under its idempotency key. */
  begun = false
  constructor(status: number, type: string, message: string, more: Record<string, unknown> = {}) {
    super(message)
    this.status = status
    this.body = { error: { type, message, ...more } }
  }
}

export const invalid = (message: string, param?: string, code?: string) =>
  new Refusal(400, 'invalid_request_error', message, { ...(param ? { param } : {}), ...(code ? { code } : {}) })

export function refusedAtWork(message: string, param?: string, code?: string) {
  const refusal = invalid(message, param, code)
  refusal.begun = true
  return refusal
}

export const absent = (param: string) => invalid(`Missing required param: ${param}.`, param, 'parameter_missing')

export const missing = (id: string, param = 'id') =>
  new Refusal(404, 'invalid_request_error', `No such object: ${id}`, { code: 'resource_missing', param })

/** Express's last handler. A body that cannot be read is the caller's fault, anything else the stand-in's. */
export function answerErrors(error: unknown, _req: Request, res: Response, next: NextFunction) {
  if (res.headersSent) {
    next(error)
    return
  }
  const refusal = error instanceof Refusal ? error : unread(error)
  res.status(refusal.status).json(refusal.body)
}

function unread(error: unknown): Refusal {
  const status = error instanceof Error && 'status' in error ? Number(error.status) : 500
  return status >= 400 && status < 500
    ? new Refusal(status, 'invalid_request_error', 'The request cannot be read.')
    : new Refusal(500, 'api_error', 'The stand-in failed.')
}
