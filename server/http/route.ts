/**
 * One table says what every route takes, answers and who may call it. Handlers, the OpenAPI document and the access test
 * are all made from it, so none of them can drift from the others. A route that names no roles does not compile.
 */
import type { Request, Response } from 'express'
import type { z } from 'zod'
import type { Role } from '#contract/common.ts'
import type { Deps } from '../deps.ts'
import type { SignedIn } from './session.ts'

export type Access = 'anyone' | readonly Role[]
type Schema = z.ZodType
type Out<S extends Schema | undefined> = S extends Schema ? z.output<S> : undefined

export interface RouteSpec<
  P extends Schema | undefined,
  Q extends Schema | undefined,
  B extends Schema | undefined,
  R extends Schema,
> {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  /** Express form, `/api/orders/:orderNumber`. */
  path: string
  feature: string
  access: Access
  summary: string
  params?: P
  query?: Q
  body?: B
  reply: R
  /**
   * The reply is sent as the handler made it. Elsewhere the schema takes out what it does not name; here the sums name every field themselves, and
   * tests hold them to the schema, because looking through some two thousand values costs more than working them out.
   */
  asMade?: boolean
  /** Status of a good answer; 200 unless said. */
  status?: number
  /** Whether the call takes an Idempotency-Key: a repeat with the same key and body gets the first answer again. */
  idempotency?: 'required' | 'optional'
  /** The body arrives as raw bytes (signed webhooks). */
  raw?: boolean
  /** Asks nobody who they are: mounted before the session is looked for, which costs more than many an answer. For `anyone` only. */
  sessionless?: boolean
  /** The reply is not JSON: the handler writes it itself. */
  contentType?: string
}

export interface Call<P, Q, B> {
  deps: Deps
  req: Request
  res: Response
  params: P
  query: Q
  body: B
  /** Null for a visitor; never null where `access` names roles. */
  user: SignedIn | null
}

export interface Route {
  spec: RouteSpec<Schema | undefined, Schema | undefined, Schema | undefined, Schema>
  handle: (call: Call<never, never, never>) => Promise<unknown>
}

export function route<
  R extends Schema,
  P extends Schema | undefined = undefined,
  Q extends Schema | undefined = undefined,
  B extends Schema | undefined = undefined,
>(spec: RouteSpec<P, Q, B, R>, handle: (call: Call<Out<P>, Out<Q>, Out<B>>) => Promise<z.input<R> | undefined>): Route {
  return { spec, handle: handle }
}

/** The signed-in person of a route whose `access` names roles. */
export function signedIn(call: { user: SignedIn | null }): SignedIn {
  if (!call.user) throw new Error('route with roles reached without a signed-in user')
  return call.user
}
