/** Whom a limit change touches: frozen totals above the new limit, in baskets and in orders. */
import { QueryTypes } from 'sequelize'
import type { LimitImpact } from '#contract/product-desk.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../http/errors.ts'
import { LimitVersion } from '../../models/limit-version.ts'
import type { OrderState } from '#contract/checkout.ts'
import { currentLimit } from './limits.ts'

/** More than this many are counted but not listed. */
const LISTED = 200

const delivered: readonly OrderState[] = ['handed-over', 'arrived', 'settled']

interface Touched {
  orderNumber: string | null
  state: OrderState | null
  systemMassKg: number
}

// A line's own advice counts; a basket's line without one falls back on the last advice its shopper saw.
const TOUCHED = `
  SELECT NULL AS orderNumber, NULL AS state, CAST(JSON_VALUE(a.advice, '$.systemMassKg') AS DOUBLE) AS systemMassKg
  FROM basket_lines l JOIN baskets b ON b.id = l.basket_id AND b.state = 'open'
  JOIN advice_snapshots a ON a.id = COALESCE(l.advice_id, b.advice_id)
  WHERE l.wheelset_id = :wheelsetId AND CAST(JSON_VALUE(a.advice, '$.systemMassKg') AS DOUBLE) > :newKg
  UNION ALL
  SELECT o.number, o.state, CAST(JSON_VALUE(a.advice, '$.systemMassKg') AS DOUBLE)
  FROM order_lines l JOIN orders o ON o.id = l.order_id AND o.state <> 'dropped'
  JOIN advice_snapshots a ON a.id = l.advice_id
  WHERE l.wheelset_id = :wheelsetId AND l.state <> 'dropped' AND CAST(JSON_VALUE(a.advice, '$.systemMassKg') AS DOUBLE) > :newKg
  ORDER BY systemMassKg DESC`

export async function limitImpact({ db, clock }: Pick<Deps, 'db' | 'clock'>, id: number): Promise<LimitImpact> {
  const version = await LimitVersion.findByPk(id)
  if (!version) throw notFound()
  const current = await currentLimit(version.wheelsetId, clock())
  const rows = await db.query<Touched>(TOUCHED, {
    replacements: { wheelsetId: version.wheelsetId, newKg: version.limitKg },
    type: QueryTypes.SELECT,
  })
  const over = rows.map(({ orderNumber, state, systemMassKg }) => ({
    kind: kindOf(state),
    orderNumber,
    overKg: systemMassKg - version.limitKg,
  }))
  const count = (kind: LimitImpact['over'][number]['kind']) => over.filter((one) => one.kind === kind).length
  return {
    currentKg: current?.limitKg ?? null,
    newKg: version.limitKg,
    openBaskets: count('basket'),
    unpaidOrders: count('unpaid'),
    placedOrders: count('placed'),
    deliveredOrders: count('delivered'),
    over: over.slice(0, LISTED),
  }
}

function kindOf(state: OrderState | null): LimitImpact['over'][number]['kind'] {
  if (state === null) return 'basket'
  if (state === 'holding') return 'unpaid'
  return delivered.includes(state) ? 'delivered' : 'placed'
}
