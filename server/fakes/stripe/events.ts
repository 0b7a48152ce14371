/** Signed events on their way to the shop: at least once, never in the way of a reply, tried again when the shop does not take them. */
import { createHmac } from 'node:crypto'
import { noFaults, type Faults } from './control.ts'
import type { StripeEvent } from './state.ts'
import { eventView } from './views.ts'

const RETRY_MS = [1_000, 5_000, 20_000]

export class Deliveries {
  readonly faults: Faults = noFaults()
  private readonly url: string
  private readonly secret: string
  private readonly clock: () => Date
  private readonly timers = new Set<NodeJS.Timeout>()

  constructor(url: string, secret: string, clock: () => Date) {
    this.url = url
    this.secret = secret
    this.clock = clock
  }

  send(event: StripeEvent) {
    if (this.faults.deliver === 'drop') return
    const times = this.faults.deliver === 'duplicate' ? 2 : 1
    for (let copy = 0; copy < times; copy += 1) this.later(this.faults.delayMs, () => void this.attempt(event, 0))
  }

  stop() {
    for (const timer of this.timers) clearTimeout(timer)
    this.timers.clear()
  }

  private later(ms: number, work: () => void) {
    const timer = setTimeout(() => {
      this.timers.delete(timer)
      work()
    }, ms)
    this.timers.add(timer)
  }

  private async attempt(event: StripeEvent, tries: number) {
    const body = JSON.stringify(eventView(event))
    const secret = this.faults.wrongSignature ? `${this.secret} not` : this.secret
    try {
      const { ok } = await fetch(this.url, {
        method: 'POST',
        headers: {
          'Content-Type': 'application/json; charset=utf-8',
          'Stripe-Signature': signature(body, secret, this.clock()),
        },
        body,
        signal: AbortSignal.timeout(20_000),
      })
      if (ok) return
    } catch {
      // Not there just now: tried again below. What is never taken stays in the list of events.
    }
    const wait = RETRY_MS[tries]
    if (wait !== undefined) this.later(wait, () => void this.attempt(event, tries + 1))
  }
}

/** `t=<unix s>,v1=<HMAC-SHA256 of "t.body">`, keyed with the whole secret. */
export function signature(body: string, secret: string, at: Date): string {
  const stamp = Math.floor(at.getTime() / 1000)
  return `t=${stamp},v1=${createHmac('sha256', secret).update(`${stamp}.${body}`).digest('hex')}`
}
