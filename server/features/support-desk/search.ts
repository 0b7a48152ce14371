/** Finding an order from what somebody half remembers: number, name, e-mail, postcode. */
import { QueryTypes } from 'sequelize'
import { limitChecks, type DeskOrderFilters, type DeskOrderRow } from '#contract/support-desk.ts'
import type { Deps } from '../../deps.ts'
import { badField } from '../../http/errors.ts'

const PAGE = 50

interface StoredRow extends Omit<DeskOrderRow, 'placedAt' | 'createdAt' | 'titles' | 'limitCheck'> {
  id: number
  placedAt: Date | null
  createdAt: Date
  sortedAt: Date
}

/** `%`, `_` and the escape sign of a typed word stand for themselves. */
const plain = (word: string) => word.replace(/[!%_]/g, '!$&')

/**
 * Every word has to be met somewhere; a postcode may be typed with or without its blank. Letters compare without regard to
 * case and accents, as the columns' collation does. The digits alone of an order number are enough.
 */
function condition(q: string): { sql: string; values: Record<string, string> } {
  const values: Record<string, string> = { whole: `${plain(q.replace(/\s+/g, ''))}%` }
  const words = q.split(/\s+/).filter(Boolean)
  const perWord = words.map((word, index) => {
    values[`word${index}`] = plain(word)
    const w = `:word${index}`
    const digits = /^\d{1,6}$/.test(word) ? ` OR o.number LIKE CONCAT('%-', LPAD(${w}, 6, '0')) ESCAPE '!'` : ''
    return `(o.name LIKE CONCAT('%', ${w}, '%') ESCAPE '!' OR o.email LIKE CONCAT('%', ${w}, '%') ESCAPE '!'
      OR o.number LIKE CONCAT(${w}, '%') ESCAPE '!' OR o.postcode LIKE CONCAT(${w}, '%') ESCAPE '!'${digits})`
  })
  return { sql: `((${perWord.join(' AND ')}) OR REPLACE(o.postcode, ' ', '') LIKE :whole ESCAPE '!')`, values }
}

const cursorOf = (row: StoredRow) => Buffer.from(`${row.sortedAt.toISOString()} ${row.id}`).toString('base64url')

function readCursor(cursor: string) {
  const [time = '', id = ''] = Buffer.from(cursor, 'base64url').toString('utf8').split(' ')
  const afterAt = new Date(time)
  if (Number.isNaN(afterAt.getTime()) || !/^\d+$/.test(id)) throw badField('cursor', 'not-valid')
  return { afterAt, afterId: Number(id) }
}

/** Newest first: by the time it was placed, or started where nothing was paid. */
export async function findOrders({ db }: Pick<Deps, 'db'>, { q, state, limit = PAGE, cursor }: DeskOrderFilters) {
  const search = q === undefined || q === '' ? null : condition(q)
  const after = cursor === undefined ? null : readCursor(cursor)
  const where = [
    search?.sql,
    state === undefined ? undefined : 'o.state = :state',
    // Keyset: an order that arrives while somebody pages moves nothing.
    after
      ? '(COALESCE(o.placed_at, o.created_at) < :afterAt OR (COALESCE(o.placed_at, o.created_at) = :afterAt AND o.id < :afterId))'
      : undefined,
  ].filter((one) => one !== undefined)
  const rows = await db.query<StoredRow>(
    `SELECT o.id, o.number AS orderNumber, o.name, o.email, o.postcode, o.market AS country, o.state, o.total_cents AS totalCents,
       o.currency, o.placed_at AS placedAt, o.created_at AS createdAt, COALESCE(o.placed_at, o.created_at) AS sortedAt
     FROM orders o ${where.length > 0 ? `WHERE ${where.join(' AND ')}` : ''}
     ORDER BY sortedAt DESC, o.id DESC LIMIT :rows`,
    { replacements: { ...search?.values, ...after, state, rows: limit + 1 }, type: QueryTypes.SELECT },
  )
  const shown = rows.slice(0, limit)
  const lines = await readLines(db, shown)
  const items = shown.map(({ id, sortedAt: _, ...row }) => {
    const own = lines.filter((line) => line.orderId === id)
    return {
      ...row,
      placedAt: row.placedAt?.toISOString() ?? null,
      createdAt: row.createdAt.toISOString(),
      titles: own.map(({ title, quantity }) => (quantity > 1 ? `${quantity} × ${title}` : title)),
      limitCheck: own.map((line) => line.limitCheck).reduce(worse, 'within'),
    }
  })
  const last = shown.at(-1)
  return { items, nextCursor: rows.length > limit && last ? cursorOf(last) : null }
}

interface StoredLine {
  orderId: number
  title: string
  quantity: number
  limitCheck: DeskOrderRow['limitCheck']
}

const readLines = (db: Deps['db'], orders: readonly { id: number }[]) =>
  orders.length === 0
    ? Promise.resolve([])
    : db.query<StoredLine>(
        'SELECT order_id AS orderId, title, quantity, limit_check AS limitCheck FROM order_lines WHERE order_id IN (:ids) ORDER BY id',
        { replacements: { ids: orders.map(({ id }) => id) }, type: QueryTypes.SELECT },
      )

/** limitChecks stand from calm to doubtful. */
const worse = (a: DeskOrderRow['limitCheck'], b: DeskOrderRow['limitCheck']) =>
  limitChecks.indexOf(a) >= limitChecks.indexOf(b) ? a : b
