/** Work that nobody waits for: mails leave, lapsed holds are let go, orders and refunds that wait are looked up at the processor. */
import type { Deps } from '../deps.ts'
import { finishRefunds } from '../features/checkout/refunds.ts'
import { createMailer, sendOutbox } from '../mail/send.ts'
import { lookUpHeldOrders } from './look-up-held.ts'
import { releaseLapsedHolds } from './release-holds.ts'
import { tidy } from './tidy.ts'

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
  every('finish-refunds', 60_000, () => finishRefunds(deps))
  every('tidy', 3_600_000, () => tidy(deps))
  return {
    stop: async () => {
      stopping = true
      timers.forEach(clearInterval)
      // A mail in the hands of a stalled server is cut off; it waits in the outbox.
      mailer.close()
      await Promise.allSettled([...running])
    },
  }
}
