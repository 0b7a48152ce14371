/** The way an invented order went: which states, when, who moved it. */
import type { OrderState } from '#contract/checkout.ts'
import type { Prng } from './prng.ts'

export interface Step {
  kind: string
  fromState: OrderState | null
  toState: OrderState
  actorId: number | null
  actorRole: 'buyer' | 'machine' | 'support'
  reason: string | null
  at: Date
}

const SUPPORT_ID = 2
const MINUTE = 60_000
const HOUR = 60 * MINUTE
const DAY = 24 * HOUR

const dropReasons = [
  'Buyer wrote that the frame takes another axle and asked for the money back.',
  'Ordered twice by mistake; this one dropped at the buyer’s request.',
  'Buyer changed their mind before the build began.',
  'Rim out of stock at the bench; buyer preferred the money to waiting.',
]
const queryReasons = [
  'House number missing, asked the buyer.',
  'No fitting with this order: asked which bike it is for.',
]

/**
 * The steps up to `now`, oldest first. Every order starts as holding; one in thirty is never paid and expires; about one in
 * eighteen of the paid ones is dropped by the desk with a full refund.
 */
export function inventLife(
  random: Prng,
  startedAt: Date,
  now: Date,
  build: 'shelf' | 'bench',
  withAdvice: boolean,
): Step[] {
  const steps: Step[] = []
  let at = startedAt
  let state: OrderState | null = null
  const move = (
    kind: string,
    toState: OrderState,
    actorRole: Step['actorRole'],
    afterMs: number,
    reason: string | null = null,
  ) => {
    const then = new Date(at.getTime() + afterMs)
    if (then > now) return false
    steps.push({
      kind,
      fromState: state,
      toState,
      actorId: actorRole === 'support' ? SUPPORT_ID : null,
      actorRole,
      reason,
      at: then,
    })
    at = then
    state = toState
    return true
  }
  const later = (fromMs: number, toMs: number) => Math.round(fromMs + (toMs - fromMs) * random.next())

  move('created', 'holding', 'buyer', 0)
  if (random.chance(1 / 30)) {
    move('expired', 'dropped', 'machine', 35 * MINUTE)
    return steps
  }
  if (!move('paid', 'placed', 'machine', later(1 * MINUTE, 10 * MINUTE))) return steps
  if (random.chance(1 / 18)) {
    move('dropped', 'dropped', 'support', later(2 * HOUR, 60 * HOUR), random.pick(dropReasons))
    return steps
  }
  if (random.chance(withAdvice ? 0.08 : 0.6)) {
    if (!move('queried', 'query', 'support', later(HOUR, 20 * HOUR), random.pick(queryReasons))) return steps
    if (!move('cleared', 'cleared', 'support', later(12 * HOUR, 5 * DAY), 'Buyer answered; all as ordered.'))
      return steps
  } else if (!move('cleared', 'cleared', 'machine', later(1 * HOUR, 36 * HOUR))) return steps
  if (build === 'bench') {
    if (!move('queued', 'queued', 'machine', later(HOUR, DAY))) return steps
    if (!move('build-started', 'on-bench', 'machine', later(2 * DAY, 7 * DAY))) return steps
  }
  if (!move('handed-over', 'handed-over', 'machine', later(20 * HOUR, 3 * DAY))) return steps
  if (!move('arrived', 'arrived', 'machine', later(2 * DAY, 6 * DAY))) return steps
  // a fortnight to change one's mind, a little to spare
  move('settled', 'settled', 'machine', later(15 * DAY, 18 * DAY))
  return steps
}
