/** Work that nobody waits for: mails leave, lapsed holds are let go, orders that wait are looked up at the processor. */
import { Op } from 'sequelize'
import type { Deps } from '../deps.ts'
import { dropOrder } from '../features/checkout/drop-order.ts'
import { settleCheckout } from '../features/checkout/settle.ts'
import { createMailer, sendOutbox } from '../mail/send.ts'
import { Order } from '../models/order.ts'

/** Holds past their time: the payment page is read once more, then the stock goes back. @returns how many were let go */
export async function releaseLapsedHolds(deps: Deps): Promise<number> {
  const lapsed = await Order.findAll({
    where: { state: 'holding', holdExpiresAt: { [Op.lte]: deps.clock() } },
    limit: 50,
  })
  let dropped = 0
  for (const order of lapsed) {
    if (order.stripeSessionId !== null) {
      await deps.payments.expireCheckout(order.stripeSessionId)
      await settleCheckout(deps, order.stripeSessionId)
    }
    if (await dropOrder(deps, order.id, 'lapsed', { reason: 'hold-lapsed' })) dropped += 1
  }
  return dropped
}

/** Held orders with a payment page are looked up there, in case every event about them was lost. */
export async function lookUpHeldOrders(deps: Deps): Promise<void> {
  const held = await Order.findAll({ where: { state: 'holding', stripeSessionId: { [Op.ne]: null } }, limit: 50 })
  for (const { stripeSessionId } of held) if (stripeSessionId !== null) await settleCheckout(deps, stripeSessionId)
}

export function startJobs(deps: Deps) {
  const mailer = createMailer(deps)
  let stopping = false
  const running = new Set<Promise<unknown>>()
  const timers: NodeJS.Timeout[] = []
  const every = (name: string, ms: number, work: () => Promise<unknown>) => {
    let busy = false
    timers.push(
      setInterval(() => {
        if (busy || stopping) return
        busy = true
        const run = work()
          .catch((error: unknown) => {
            deps.log.error({ err: error, job: name }, 'job failed; it runs again at its next turn')
          })
          .finally(() => {
            busy = false
            running.delete(run)
          })
        running.add(run)
      }, ms),
    )
  }
  every('send-mails', 2_000, () => sendOutbox(deps, mailer))
  every('release-holds', 30_000, () => releaseLapsedHolds(deps))
  every('look-up-held', 60_000, () => lookUpHeldOrders(deps))
  return {
    stop: async () => {
      stopping = true
      timers.forEach(clearInterval)
      await Promise.allSettled([...running])
      mailer.close()
    },
  }
}
