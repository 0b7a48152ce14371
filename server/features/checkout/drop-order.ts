/** An unpaid order ends: stock goes back on the shelf, the basket is open again with everything in it. */
import { inTransaction } from '../../db.ts'
import type { Deps } from '../../deps.ts'
import { Basket } from '../../models/basket.ts'
import { OrderLine } from '../../models/order-line.ts'
import { Order } from '../../models/order.ts'
import { buyer, machine, moveOrder } from './move-order.ts'
import { release } from './stock.ts'

/** @returns whether there was something to drop; a repeat does nothing */
export function dropOrder(
  deps: Pick<Deps, 'db' | 'clock'>,
  orderId: number,
  move: 'lapsed' | 'dropped',
  more: { reason?: string } = {},
): Promise<boolean> {
  return inTransaction(deps.db, async (transaction) => {
    const order = await Order.findByPk(orderId, { transaction, lock: transaction.LOCK.UPDATE })
    if (order?.state !== 'holding') return false
    const { basketId } = order
    // The basket is remembered with the event: should a payment come late after all, it must not be ordered twice.
    const data = { data: { basketId } }
    await moveOrder(deps, order, move, move === 'dropped' ? buyer : machine, transaction, { ...more, ...data })
    const lines = await OrderLine.findAll({ where: { orderId }, transaction })
    await release(deps.db, lines, transaction)
    if (basketId !== null) await Basket.update({ state: 'open' }, { where: { id: basketId }, transaction })
    await order.update({ basketId: null, payUrl: null }, { transaction })
    return true
  })
}
