/** Sessions in MariaDB. The cookie's id is stored only as its SHA-256, so a copy of the table opens no session. */
import { createHash } from 'node:crypto'
import { Store, type SessionData } from 'express-session'
import { QueryTypes, type Sequelize } from 'sequelize'

const TOUCH_EVERY_MS = 5 * 60_000
const hash = (sid: string) => createHash('sha256').update(sid).digest('hex')

export class SqlSessionStore extends Store {
  private readonly db: Sequelize
  private readonly lifeMs: number
  private readonly clock: () => Date
  private readonly touched = new Map<string, number>()

  constructor(db: Sequelize, lifeMs: number, clock: () => Date) {
    super()
    this.db = db
    this.lifeMs = lifeMs
    this.clock = clock
  }

  override get(sid: string, done: (error: unknown, session?: SessionData | null) => void) {
    this.db
      .query<{ data: string | SessionData }>('SELECT data FROM sessions WHERE sid_hash = ? AND expires_at > ?', {
        replacements: [hash(sid), this.clock()],
        type: QueryTypes.SELECT,
      })
      .then(([row]) => {
        done(null, row ? (typeof row.data === 'string' ? (JSON.parse(row.data) as SessionData) : row.data) : null)
      }, done)
  }

  override set(sid: string, session: SessionData, done?: (error?: unknown) => void) {
    const userId = session.userId ?? null
    this.db
      .query(
        `INSERT INTO sessions (sid_hash, user_id, data, expires_at) VALUES (?, ?, ?, ?)
         ON DUPLICATE KEY UPDATE user_id = VALUES(user_id), data = VALUES(data), expires_at = VALUES(expires_at)`,
        { replacements: [hash(sid), userId, JSON.stringify(session), this.expiry()] },
      )
      .then(() => done?.())
      .catch((error: unknown) => done?.(error))
  }

  override destroy(sid: string, done?: (error?: unknown) => void) {
    this.touched.delete(sid)
    this.db
      .query('DELETE FROM sessions WHERE sid_hash = ?', { replacements: [hash(sid)] })
      .then(() => done?.())
      .catch((error: unknown) => done?.(error))
  }

  override touch(sid: string, _session: SessionData, done?: () => void) {
    const now = this.clock().getTime()
    if (now - (this.touched.get(sid) ?? 0) < TOUCH_EVERY_MS) {
      done?.()
      return
    }
    if (this.touched.size > 10_000) this.touched.clear()
    this.touched.set(sid, now)
    this.db
      .query('UPDATE sessions SET expires_at = ? WHERE sid_hash = ?', { replacements: [this.expiry(), hash(sid)] })
      .then(
        () => done?.(),
        () => done?.(),
      )
  }

  private expiry() {
    return new Date(this.clock().getTime() + this.lifeMs)
  }
}
