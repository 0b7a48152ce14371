/** One move of an order: its state, its lines' and the event that says who and why, together or not at all. */
import type { Transaction } from 'sequelize'
import type { Deps } from '../../deps.ts'
import { OrderEvent } from '../../models/order-event.ts'
import { OrderLine } from '../../models/order-line.ts'
import type { Order } from '../../models/order.ts'
import { nextState, type OrderMove } from './order-states.ts'

/** Kinds of event as the seeded history and the pages name them. */
const kinds: Record<OrderMove, string> = {
  paid: 'paid',
  cleared: 'cleared',
  queried: 'queried',
  dropped: 'dropped',
  lapsed: 'expired',
  'refunded-whole': 'dropped',
}

export interface Mover {
  id: number | null
  role: string
}
export const machine: Mover = { id: null, role: 'machine' }
export const buyer: Mover = { id: null, role: 'buyer' }

/** @returns false, and nothing is written, where the table does not allow the move */
export async function moveOrder(
  { clock }: Pick<Deps, 'clock'>,
  order: Order,
  move: OrderMove,
  by: Mover,
  transaction: Transaction,
  more: { reason?: string; data?: Record<string, unknown> } = {},
): Promise<boolean> {
  const toState = nextState(order.state, move)
  if (toState === null) return false
  const fromState = order.state
  await order.update({ state: toState }, { transaction })
  await OrderLine.update({ state: toState }, { where: { orderId: order.id }, transaction })
  await OrderEvent.create(
    {
      orderId: order.id,
      kind: kinds[move],
      fromState,
      toState: toState as typeof order.state,
      actorId: by.id,
      actorRole: by.role,
      reason: more.reason ?? null,
      data: more.data ?? null,
      createdAt: clock(),
    },
    { transaction },
  )
  return true
}
