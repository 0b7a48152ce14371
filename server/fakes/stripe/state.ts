/** Everything the stand-in remembers, and the rules by which it changes. Amounts in minor units, times in Unix seconds. */
import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs'

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
  /** Files written before deliveries could be priced apart have none. */
  shipping?: { name: string; amount: number } | null
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
  /** Waiting ones go out again after a restart; dropped and given-up ones can only be fetched. */
  delivery?: 'waiting' | 'taken' | 'dropped' | 'given-up'
}
export interface KeptReply {
  at: number
  fingerprint: string
  status: number
  body: unknown
}

export interface Memory {
  sessions: Record<string, Session>
  intents: Record<string, Intent>
  charges: Record<string, Charge>
  refunds: Record<string, Refund>
  events: StripeEvent[]
  replies: Record<string, KeptReply>
}

export const newId = (prefix: string) => `${prefix}_${randomBytes(14).toString('hex')}`
export const goodsOf = (session: Session) =>
  session.lines.reduce((sum, { unitAmount, quantity }) => sum + unitAmount * quantity, 0)
export const amountOf = (session: Session) => goodsOf(session) + (session.shipping?.amount ?? 0)

/** The list of events goes back 30 days. */
const EVENTS_KEPT_S = 30 * 86_400

/** @returns null for a file that is no memory */
function readMemory(file: string): Partial<Memory> | null {
  try {
    const kept: unknown = JSON.parse(readFileSync(file, 'utf8'))
    if (typeof kept !== 'object' || kept === null || Array.isArray(kept)) return null
    const isPart = ([name, part]: [string, unknown]) =>
      typeof part === 'object' && part !== null && Array.isArray(part) === (name === 'events')
    return Object.entries(kept).every(isPart) ? kept : null
  } catch {
    return null
  }
}

export class State {
  readonly memory: Memory
  private readonly file: string | null

  constructor(file: string | null) {
    this.file = file
    const empty: Memory = { sessions: {}, intents: {}, charges: {}, refunds: {}, events: [], replies: {} }
    const kept = file === null || !existsSync(file) ? {} : readMemory(file)
    if (file !== null && kept === null) {
      // Begun afresh, but what cannot be read is put aside, not written over.
      const aside = `${file}.unreadable`
      renameSync(file, aside)
      console.warn(
        `The memory of the stand-in for payments could not be read. It begins with an empty one; the old file is now ${aside}.`,
      )
    }
    this.memory = { ...empty, ...kept }
  }

  /** @param event entered as the newest; those of more than 30 days before it are let go */
  enter(event: StripeEvent) {
    const oldest = event.created - EVENTS_KEPT_S
    if ((this.memory.events[0]?.created ?? oldest) < oldest)
      this.memory.events = this.memory.events.filter(({ created }) => created >= oldest)
    this.memory.events.push(event)
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
