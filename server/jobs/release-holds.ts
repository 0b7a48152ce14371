import { Op } from 'sequelize'
import type { Deps } from '../deps.ts'
import { leaveOrder } from '../features/checkout/leave-order.ts'
import { Order } from '../models/order.ts'

/**
 * Holds past their time: the payment page is closed and read once more, then the stock goes back. One that cannot be asked about stays for the next
 * turn and stands in nobody's way.
 * @returns how many were let go
 */
export async function releaseLapsedHolds(deps: Deps): Promise<number> {
  const lapsed = await Order.findAll({
    where: { state: 'holding', holdExpiresAt: { [Op.lte]: deps.clock() } },
    order: ['holdExpiresAt'],
    limit: 200,
  })
  let dropped = 0
  for (const order of lapsed) {
    try {
      const left = await leaveOrder(deps, order, 'lapsed', { reason: 'hold-lapsed' })
      if (left.state === 'dropped') dropped += 1
    } catch (err) {
      deps.log.warn({ err, order: order.number }, 'a lapsed hold still waits')
    }
  }
  return dropped
}
