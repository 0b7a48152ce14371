/** Everything the stand-in remembers, and the rules by which it changes. Amounts in minor units, times in Unix seconds. */
import { randomBytes } from 'node:crypto'
import { readFileSync, renameSync, writeFileSync } from 'node:fs'

export interface LineItem {
  name: string
  unitAmount: number
  quantity: number
}
export interface Session {
  id: string
  created: number
  expiresAt: number
  status: 'open' | 'complete' | 'expired'
  paid: boolean
  currency: string
  lines: LineItem[]
  clientReferenceId: string | null
  customerEmail: string | null
  locale: string
  metadata: Record<string, string>
  intentMetadata: Record<string, string>
  intentId: string | null
  successUrl: string
  cancelUrl: string
}
export interface Intent {
  id: string
  created: number
  amount: number
  currency: string
  status: 'requires_payment_method' | 'succeeded'
  chargeId: string | null
  metadata: Record<string, string>
  lastError: { code: string; decline_code: string; message: string } | null
}
export interface Charge {
  id: string
  created: number
  amount: number
  refunded: number
  currency: string
  intentId: string
}
export interface Refund {
  id: string
  created: number
  amount: number
  currency: string
  chargeId: string
  intentId: string
  metadata: Record<string, string>
  reason: string | null
}
export interface StripeEvent {
  id: string
  created: number
  type: string
  object: Record<string, unknown>
}
export interface KeptReply {
  at: number
  fingerprint: string
  status: number
  body: unknown
}

interface Memory {
  sessions: Record<string, Session>
  intents: Record<string, Intent>
  charges: Record<string, Charge>
  refunds: Record<string, Refund>
  events: StripeEvent[]
  replies: Record<string, KeptReply>
}

export const newId = (prefix: string) => `${prefix}_${randomBytes(14).toString('hex')}`
export const amountOf = (session: Session) =>
  session.lines.reduce((sum, { unitAmount, quantity }) => sum + unitAmount * quantity, 0)

export class State {
  readonly memory: Memory
  private readonly file: string | null

  constructor(file: string | null) {
    this.file = file
    this.memory = { sessions: {}, intents: {}, charges: {}, refunds: {}, events: [], replies: {} }
    if (file === null) return
    try {
      Object.assign(this.memory, JSON.parse(readFileSync(file, 'utf8')) as Memory)
    } catch {
      // First start, or a file that no longer reads: the stand-in begins with an empty memory.
    }
  }

  /** Written whole and renamed into place: a crash leaves the old memory or the new one, never half. */
  save() {
    if (this.file === null) return
    writeFileSync(`${this.file}.new`, JSON.stringify(this.memory), { mode: 0o600 })
    renameSync(`${this.file}.new`, this.file)
  }

  /** @returns the intent of a session, made at the first attempt to pay */
  intentOf(session: Session, now: number): Intent {
    const known = session.intentId === null ? undefined : this.memory.intents[session.intentId]
    if (known) return known
    const intent: Intent = {
      id: newId('pi'),
      created: now,
      amount: amountOf(session),
      currency: session.currency,
      status: 'requires_payment_method',
      chargeId: null,
      metadata: session.intentMetadata,
      lastError: null,
    }
    this.memory.intents[intent.id] = intent
    session.intentId = intent.id
    return intent
  }

  /** @returns false where the session cannot be paid any more; a second click changes nothing */
  pay(session: Session, now: number): boolean {
    if (session.status !== 'open') return false
    const intent = this.intentOf(session, now)
    const charge: Charge = {
      id: newId('ch'),
      created: now,
      amount: intent.amount,
      refunded: 0,
      currency: intent.currency,
      intentId: intent.id,
    }
    this.memory.charges[charge.id] = charge
    intent.status = 'succeeded'
    intent.chargeId = charge.id
    intent.lastError = null
    session.status = 'complete'
    session.paid = true
    return true
  }

  decline(session: Session, now: number): Intent | null {
    if (session.status !== 'open') return null
    const intent = this.intentOf(session, now)
    intent.lastError = { code: 'card_declined', decline_code: 'generic_decline', message: 'Your card was declined.' }
    return intent
  }
}
