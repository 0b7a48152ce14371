/** The life of an order as a pure table: (state, event) → state. What is not in it does not happen. Names of people's order life, section 5. */
import type { OrderState } from '#contract/checkout.ts'

export type OrderMove = 'paid' | 'cleared' | 'queried' | 'dropped' | 'lapsed' | 'refunded-whole'

const table: Partial<Record<OrderState, Partial<Record<OrderMove, OrderState>>>> = {
  holding: { paid: 'placed', lapsed: 'dropped', dropped: 'dropped' },
  placed: { cleared: 'cleared', queried: 'query', 'refunded-whole': 'dropped' },
  cleared: { queried: 'query', 'refunded-whole': 'dropped' },
  query: { cleared: 'cleared', 'refunded-whole': 'dropped' },
  queued: { 'refunded-whole': 'dropped' },
  // Paid in the last moment of a hold that had already lapsed: placed after all when the stock is still there.
  dropped: { paid: 'placed' },
}

/** @returns the state after the move, or null where the move is not allowed (a repeat, or one that comes too late) */
export const nextState = (state: OrderState, move: OrderMove): OrderState | null => table[state]?.[move] ?? null
