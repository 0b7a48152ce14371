/** Who is calling: a session cookie, and the person behind it read afresh on every call, so a changed role counts at once. */
import type { RequestHandler } from 'express'
import sessions from 'express-session'
import type { Locale, Role } from '#contract/common.ts'
import type { Deps } from '../deps.ts'
import { User } from '../models/user.ts'
import { SqlSessionStore } from './session-store.ts'

export interface SignedIn {
  id: number
  email: string
  name: string
  role: Role
  locale: Locale
}

declare module 'express-session' {
  interface SessionData {
    userId?: number
    basketId?: string
  }
}

const LIFE_MS = 14 * 24 * 3_600_000

export function sessionMiddleware({ config, db, clock }: Deps): RequestHandler {
  const secure = config.PUBLIC_URL.startsWith('https:')
  return sessions({
    // The __Host- prefix ties the cookie to this host; browsers accept it over TLS only.
    name: secure ? '__Host-felloe' : 'felloe',
    secret: config.SESSION_SECRET,
    store: new SqlSessionStore(db, LIFE_MS, clock),
    resave: false,
    saveUninitialized: false,
    rolling: false,
    proxy: secure,
    cookie: { httpOnly: true, sameSite: 'lax', secure, path: '/', maxAge: LIFE_MS },
  })
}

export async function readUser(userId: number | undefined): Promise<SignedIn | null> {
  if (userId === undefined) return null
  return User.findByPk(userId, { raw: true, attributes: ['id', 'email', 'name', 'role', 'locale'] })
}

/** A fresh session id on every change of person: an id planted before sign-in is worth nothing after it. The basket moves along. */
export function renewSession(req: Parameters<RequestHandler>[0]): Promise<void> {
  const { basketId } = req.session
  return new Promise((resolve, reject) => {
    req.session.regenerate((error) => {
      if (error) {
        reject(error instanceof Error ? error : new Error('session could not be renewed'))
        return
      }
      if (basketId !== undefined) req.session.basketId = basketId
      resolve()
    })
  })
}
