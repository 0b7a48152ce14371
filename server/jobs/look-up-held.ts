import { Op } from 'sequelize'
import type { Deps } from '../deps.ts'
import { settleCheckout } from '../features/checkout/settle.ts'
import { Order } from '../models/order.ts'

/** Held orders with a payment page are looked up there, in case every event about them was lost. */
export async function lookUpHeldOrders(deps: Deps): Promise<void> {
  const held = await Order.findAll({
    where: { state: 'holding', stripeSessionId: { [Op.ne]: null } },
    order: ['id'],
    limit: 200,
  })
  for (const { stripeSessionId, number } of held) {
    try {
      if (stripeSessionId !== null) await settleCheckout(deps, stripeSessionId)
    } catch (err) {
      deps.log.warn({ err, order: number }, 'a held order could not be looked up')
    }
  }
}
