/** The life of an order as a table: what may follow what, whatever order the events come in. */
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { orderStates, type OrderState } from '../../server/contract/checkout.ts'
import { nextState, type OrderMove } from '../../server/features/checkout/order-states.ts'

const moves: OrderMove[] = ['paid', 'cleared', 'queried', 'dropped', 'lapsed', 'refunded-whole']
const run = (from: OrderState, events: readonly OrderMove[]) =>
  events.reduce((state, move) => nextState(state, move) ?? state, from)

describe('an order', () => {
  it('is cleared for building only out of a payment', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...moves), { maxLength: 7 }), (events) => {
        const end = run('holding', events)
        if (end === 'placed' || end === 'cleared' || end === 'query') expect(events).toContain('paid')
        if (!events.includes('paid')) expect(['holding', 'dropped']).toContain(end)
      }),
      { numRuns: 5000 },
    )
  })

  it('takes a repeat of any event as nothing: every event twice in a row ends where once does', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...moves), { maxLength: 7 }), (events) => {
        expect(
          run(
            'holding',
            events.flatMap((event) => [event, event]),
          ),
        ).toBe(run('holding', events))
      }),
      { numRuns: 5000 },
    )
  })

  it('ends paid whichever of payment and lapse comes first', () => {
    expect(run('holding', ['paid', 'lapsed'])).toBe('placed')
    expect(run('holding', ['lapsed', 'paid'])).toBe('placed')
    expect(run('holding', ['lapsed', 'paid', 'cleared', 'lapsed', 'dropped'])).toBe('cleared')
  })

  it('that is being built or was sent is not ended by a refund alone', () => {
    const built: OrderState[] = ['on-bench', 'handed-over', 'arrived', 'settled']
    for (const state of built) for (const move of moves) expect(nextState(state, move)).toBeNull()
  })

  it('knows no state outside the contract', () => {
    for (const state of orderStates)
      for (const move of moves) expect([...orderStates, null]).toContain(nextState(state, move))
  })
})
