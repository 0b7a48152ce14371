/** The gate once more, over an order's own lines: does each wheelset still carry and fit, under the limits in force now? */
import type { Transaction } from 'sequelize'
import type { BasketProblem } from '#contract/basket.ts'
import type { Deps } from '../../deps.ts'
import { OrderLine } from '../../models/order-line.ts'
import type { Order } from '../../models/order.ts'
import { Fittings, passGate } from '../basket/gate.ts'
import { readCatalogue } from '../catalogue/read.ts'

/**
 * @param transaction reads on its connection
 * @returns what stands against building it; empty when all is well
 */
export async function checkOrder(
  deps: Pick<Deps, 'db' | 'clock'>,
  order: Order,
  transaction: Transaction,
): Promise<BasketProblem[]> {
  const lines = await OrderLine.findAll({ where: { orderId: order.id }, order: ['id'], transaction })
  const catalogue = new Map((await readCatalogue(deps, order.locale, true, transaction)).map((set) => [set.id, set]))
  const fittings = new Fittings(deps, transaction)
  const problems: BasketProblem[] = []
  for (const [index, { wheelsetId, options, adviceId }] of lines.entries()) {
    const path = `lines.${index}`
    const set = catalogue.get(wheelsetId)
    if (set) problems.push(...(await passGate(options, set, adviceId, fittings, path)).problems)
    else problems.push({ code: 'left-range', path, data: {} })
  }
  return problems
}
