/** Signed events on their way to the shop: at least once, never in the way of a reply, tried again when the shop does not take them. */
import { createHmac, randomInt } from 'node:crypto'
import { noFaults, type Faults } from './control.ts'
import type { StripeEvent } from './state.ts'
import { eventView } from './views.ts'

/** Waits before the second, third and fourth try, ms: within a minute the shop has it, or fetches it from the list. */
const RETRY_MS = [1_000, 5_000, 20_000]

export class Deliveries {
  readonly faults: Faults = noFaults()
  private readonly url: string
  private readonly secret: string
  private readonly clock: () => Date
  private readonly changed: () => void
  private readonly timers = new Set<NodeJS.Timeout>()
  private gathered: StripeEvent[] = []
  private halt = new AbortController()

  /** @param changed called when what became of an event has to be remembered */
  constructor(url: string, secret: string, clock: () => Date, changed: () => void) {
    this.url = url
    this.secret = secret
    this.clock = clock
    this.changed = changed
  }

  /** @param waiting events that were under way when the stand-in stopped */
  start(waiting: readonly StripeEvent[]) {
    this.halt = new AbortController()
    for (const event of waiting) this.later(0, () => this.attempt(event, 0))
  }

  send(event: StripeEvent) {
    const { deliver, copies, delayMs, shuffleMs } = this.faults
    if (deliver === 'drop') {
      this.settle(event, 'dropped')
      return
    }
    const times = deliver === 'duplicate' ? copies : 1
    for (let copy = 0; copy < times; copy += 1) {
      if (shuffleMs > 0) this.gather(event, shuffleMs)
      else this.later(delayMs, () => this.attempt(event, 0))
    }
  }

  stop() {
    this.halt.abort()
    for (const timer of this.timers) clearTimeout(timer)
    this.timers.clear()
    this.gathered = []
  }

  private later(ms: number, work: () => Promise<void>) {
    if (this.halt.signal.aborted) return
    const timer = setTimeout(() => {
      this.timers.delete(timer)
      void work()
    }, ms)
    this.timers.add(timer)
  }

  private gather(event: StripeEvent, ms: number) {
    this.gathered.push(event)
    if (this.gathered.length > 1) return
    this.later(ms, async () => {
      const batch = mixed(this.gathered)
      this.gathered = []
      for (const one of batch) await this.attempt(one, 0)
    })
  }

  private async attempt(event: StripeEvent, tries: number) {
    const { signal } = this.halt
    const stopped = () => signal.aborted
    if (stopped()) return
    const body = JSON.stringify(eventView(event))
    const secret = this.faults.wrongSignature ? `${this.secret} not` : this.secret
    const taken = await fetch(this.url, {
      method: 'POST',
      headers: {
        'Content-Type': 'application/json; charset=utf-8',
        'Stripe-Signature': signature(body, secret, this.clock()),
      },
      body,
      signal: AbortSignal.any([signal, AbortSignal.timeout(20_000)]),
    }).then(
      async (reply) => {
        await reply.body?.cancel()
        return reply.ok
      },
      () => false,
    )
    // Cut short by the stop: it goes out again at the next start.
    if (stopped()) return
    const wait = RETRY_MS[tries]
    if (taken) this.settle(event, 'taken')
    else if (wait !== undefined) this.later(wait, () => this.attempt(event, tries + 1))
    else if (event.delivery !== 'taken') this.settle(event, 'given-up')
  }

  private settle(event: StripeEvent, delivery: 'taken' | 'dropped' | 'given-up') {
    if (event.delivery === delivery) return
    event.delivery = delivery
    this.changed()
  }
}

/** In another order than before, wherever there is another. */
function mixed(events: readonly StripeEvent[]): StripeEvent[] {
  const drawn = events.map((event) => ({ event, lot: randomInt(2 ** 32) }))
  const order = drawn.sort((a, b) => a.lot - b.lot).map(({ event }) => event)
  const ids = (list: readonly StripeEvent[]) => list.map(({ id }) => id).join()
  return ids(order) === ids(events) ? order.toReversed() : order
}

/** `t=<unix s>,v1=<HMAC-SHA256 of "t.body">`, keyed with the whole secret. */
export function signature(body: string, secret: string, at: Date): string {
  const stamp = Math.floor(at.getTime() / 1000)
  return `t=${stamp},v1=${createHmac('sha256', secret).update(`${stamp}.${body}`).digest('hex')}`
}
