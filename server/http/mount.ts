/** Turns the table of routes into Express handlers: roles first, then the checked input, then the use case, then the named reply. */
import express, { type Express, type Request, type RequestHandler, type Response } from 'express'
import type { Deps } from '../deps.ts'
import { AppError } from './errors.ts'
import { once } from './idempotency.ts'
import type { Access, Route } from './route.ts'
import { readUser, type SignedIn } from './session.ts'

const BODY_LIMIT = '100kb'
/** Issues then carry what was sent: a field that is missing is told from one of the wrong kind. Nothing of it is sent back. */
const READ = { reportInput: true }
const readJson = express.json({ limit: BODY_LIMIT, type: 'application/json' })
const readRaw = express.raw({ limit: '1mb', type: () => true })

function mayCall(access: Access, user: SignedIn | null) {
  if (access === 'anyone') return
  if (!user) throw new AppError('sign-in-needed', 401)
  if (!access.includes(user.role)) throw new AppError('not-allowed', 403)
}

const jsonOnly: RequestHandler = (req, _res, next) => {
  const hasBody =
    req.headers['content-length'] !== undefined
      ? req.headers['content-length'] !== '0'
      : req.headers['transfer-encoding'] !== undefined
  next(hasBody && !req.is('application/json') ? new AppError('json-only', 415) : undefined)
}

/** Signed webhooks come without a session, and some routes have no use for one: these are mounted before the session is looked for. */
export const beforeSession = ({ raw, sessionless }: Route['spec']) => raw === true || sessionless === true

export function mountRoutes(app: Express, routes: readonly Route[], deps: Deps) {
  for (const { spec, handle } of routes) {
    const readBody = spec.raw ? [readRaw] : spec.body ? [jsonOnly, readJson] : []
    const work = async (req: Request, res: Response) => {
      const params = spec.params?.parse(req.params, READ)
      const query = spec.query ? spec.query.parse(req.query, READ) : undefined
      const body = spec.body ? spec.body.parse(req.body ?? {}, READ) : undefined
      const user = res.locals.user as SignedIn | null
      const call = { deps, req, res, params, query, body, user } as never
      const answer = async () => ({
        status: spec.status ?? 200,
        body: spec.contentType ? undefined : spec.asMade ? await handle(call) : spec.reply.parse(await handle(call)),
      })

      if (spec.contentType) {
        await handle(call)
        return
      }
      const caller = user ? `user ${user.id}` : `session ${req.sessionID}`
      const { status, body: reply } = spec.idempotency
        ? await once(req, caller, spec.idempotency, deps.clock, answer)
        : await answer()
      if (!res.hasHeader('Cache-Control')) res.set('Cache-Control', 'no-store')
      res.status(status).json(reply)
    }
    const guard: RequestHandler = async (req, res, next) => {
      const user = beforeSession(spec) ? null : await readUser(req.session.userId)
      mayCall(spec.access, user)
      res.locals.user = user
      next()
    }
    app[spec.method](spec.path, guard, ...readBody, work)
  }
}
