/** The one way to the server. Replies are checked against the shared contract; refusals arrive as ApiError with the problem inside. */
import i18next from 'i18next'
import type { z } from 'zod'
import { problem, type Problem } from '#contract/common.ts'

export class ApiError extends Error {
  readonly problem: Problem
  constructor(given: Problem) {
    super(given.code)
    this.problem = given
  }
}

const offline = (code: 'offline' | 'unreadable', status = 0): ApiError =>
  new ApiError({ type: `/problems/${code}`, title: '', status, detail: '', instance: '', code, requestId: '' })

interface Options {
  signal?: AbortSignal
  /** Creating calls: the same key on a repeat gives the first answer again. */
  idempotencyKey?: string
}

async function call<S extends z.ZodType>(
  method: string,
  path: string,
  body: unknown,
  reply: S,
  options: Options = {},
): Promise<z.output<S>> {
  const headers: Record<string, string> = { Accept: 'application/json', 'Accept-Language': i18next.language }
  if (body !== undefined) headers['Content-Type'] = 'application/json'
  if (options.idempotencyKey !== undefined) headers['Idempotency-Key'] = options.idempotencyKey
  let response: Response
  try {
    response = await fetch(path, {
      method,
      headers,
      credentials: 'same-origin',
      ...(body !== undefined ? { body: JSON.stringify(body) } : {}),
      ...(options.signal ? { signal: options.signal } : {}),
    })
  } catch (error) {
    if (options.signal?.aborted) throw error
    throw offline('offline')
  }
  const data: unknown = await response.json().catch(() => null)
  if (!response.ok) {
    const known = problem.safeParse(data)
    throw known.success ? new ApiError(known.data) : offline('unreadable', response.status)
  }
  return reply.parse(data)
}

export const api = {
  get: <S extends z.ZodType>(path: string, reply: S, signal?: AbortSignal) =>
    call('GET', path, undefined, reply, signal ? { signal } : {}),
  post: <S extends z.ZodType>(path: string, body: unknown, reply: S, options?: Options) =>
    call('POST', path, body, reply, options),
  put: <S extends z.ZodType>(path: string, body: unknown, reply: S, options?: Options) =>
    call('PUT', path, body, reply, options),
  patch: <S extends z.ZodType>(path: string, body: unknown, reply: S, options?: Options) =>
    call('PATCH', path, body, reply, options),
  delete: <S extends z.ZodType>(path: string, reply: S, options?: Options) =>
    call('DELETE', path, undefined, reply, options),
}
