/** The gate once more, over an order's own lines: does each wheelset still carry and fit, under the limits in force now? */
import type { BasketProblem } from '#contract/basket.ts'
import type { Deps } from '../../deps.ts'
import { OrderLine } from '../../models/order-line.ts'
import type { Order } from '../../models/order.ts'
import { Fittings, passGate } from '../basket/gate.ts'
import { readCatalogue } from '../catalogue/read.ts'

/** @returns what stands against building it; empty when all is well */
export async function checkOrder(deps: Pick<Deps, 'db' | 'clock'>, order: Order): Promise<BasketProblem[]> {
  const lines = await OrderLine.findAll({ where: { orderId: order.id }, order: ['id'] })
  const catalogue = new Map((await readCatalogue(deps, order.locale, true)).map((set) => [set.id, set]))
  const fittings = new Fittings(deps)
  const results = await Promise.all(
    lines.map((line, index) => {
      const { sku, quantity, options, adviceId } = line
      return passGate(
        { sku, quantity, options, adviceId },
        catalogue.get(line.wheelsetId),
        adviceId,
        fittings,
        `lines.${index}`,
      )
    }),
  )
  return results.flatMap(({ problems }) => problems)
}
