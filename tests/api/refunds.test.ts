/** Money back: never more than was taken, once, and never lost between us and the processor. */
import { randomUUID } from 'node:crypto'
import fc from 'fast-check'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { finishRefunds } from '../../server/features/checkout/refunds.ts'
import { AppError } from '../../server/http/errors.ts'
import { AuditRow } from '../../server/models/audit-row.ts'
import { OutboxMail } from '../../server/models/outbox-mail.ts'
import { Refund } from '../../server/models/refund.ts'
import { createPayments } from '../../server/payments/create.ts'
import type { Payments } from '../../server/payments/index.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { answers, tillOf, type Agent } from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
const { paid, see, state, stockOf } = till

beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const REASON = 'the test asks for it'
const refund = (desk: Agent, number: string, body: object, key: string = randomUUID()) =>
  desk
    .post(`/api/desk/orders/${number}/refunds`)
    .set('Idempotency-Key', key)
    .send({ reason: REASON, ...body })
const withPayments = async <T>(change: (real: Payments) => Partial<Payments>, work: () => Promise<T>): Promise<T> => {
  const real = shop.deps.payments
  shop.deps.payments = { ...real, ...change(real) }
  try {
    return await work()
  } finally {
    shop.deps.payments = real
  }
}

describe('a refund', () => {
  it('of everything, before anything is built, ends the order and puts the pair back on the shelf', async () => {
    const { orderNumber, orderUrl, agent, sku } = await paid()
    const { onHand } = await stockOf(sku)
    const { totalCents } = (await see(agent, orderUrl)).money
    const desk = await shop.signedIn('support')
    await refund(desk, orderNumber, { amountCents: totalCents }).expect(answers(201))
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).onHand).toBe(onHand + 1)
    const { money } = await see(agent, orderUrl)
    expect(money.refundedCents).toBe(totalCents)
    const mail = await OutboxMail.findOne({ where: { kind: 'refund' }, rejectOnEmpty: true })
    expect(mail.text).toContain('nothing will be built or sent')
    expect(await AuditRow.count({ where: { action: 'order.refunded', subjectId: orderNumber, reason: REASON } })).toBe(
      1,
    )
  })

  it('of a part leaves the order going; what is over is refused with what is left', async () => {
    const { orderNumber, orderUrl, agent, sku } = await paid()
    const { onHand } = await stockOf(sku)
    const { totalCents } = (await see(agent, orderUrl)).money
    const desk = await shop.signedIn('support')
    await refund(desk, orderNumber, { amountCents: 1000 }).expect(answers(201))
    const over = await refund(desk, orderNumber, { amountCents: totalCents })
    expect(over.body).toMatchObject({ code: 'refund-too-much', data: { leftCents: totalCents - 1000 } })
    expect(await state(orderNumber)).toBe('cleared')
    expect((await stockOf(sku)).onHand).toBe(onHand)
    await refund(desk, orderNumber, { amountCents: totalCents - 1000 }).expect(answers(201))
    expect(await state(orderNumber)).toBe('dropped')
    expect((await refund(desk, orderNumber, { amountCents: 1 })).body).toMatchObject({ code: 'nothing-to-refund' })
  })

  it('asked for ten times under one key is one refund', async () => {
    const { orderNumber } = await paid()
    const desk = await shop.signedIn('support')
    const key = randomUUID()
    const replies = await Promise.all(
      Array.from({ length: 10 }, () => refund(desk, orderNumber, { amountCents: 1000 }, key)),
    )
    expect(replies.every(({ status }) => status === 201 || status === 409)).toBe(true)
    expect(await Refund.count()).toBe(1)
    expect((await till.ledger(orderNumber)).filter(({ kind }) => kind === 'refunded')).toEqual([
      { kind: 'refunded', amountCents: -1000 },
    ])
  })

  it('by two people at once: together never above what was taken, whatever they ask for', async () => {
    const desks = [await shop.signedIn('support'), await shop.signedIn('admin')]
    await fc.assert(
      fc.asyncProperty(
        fc.array(
          fc.record({ desk: fc.integer({ min: 0, max: 1 }), share: fc.double({ min: 0.1, max: 1, noNaN: true }) }),
          {
            minLength: 2,
            maxLength: 5,
          },
        ),
        async (asked) => {
          const { orderNumber, orderUrl, agent, sku } = await paid()
          await till.setStock(sku, 20)
          const { totalCents } = (await see(agent, orderUrl)).money
          await Promise.all(
            asked.map(({ desk, share }) =>
              refund(desks[desk] ?? agent, orderNumber, { amountCents: Math.ceil(totalCents * share) }),
            ),
          )
          const { money, state: now } = await see(agent, orderUrl)
          expect(money.refundedCents).toBeLessThanOrEqual(money.takenCents)
          expect(now === 'dropped').toBe(money.refundedCents === money.takenCents)
        },
      ),
      { numRuns: 6 },
    )
  }, 60_000)

  it('that the processor refuses is marked failed, nothing moved, and it can be given again under the same key', async () => {
    const { orderNumber } = await paid()
    const desk = await shop.signedIn('support')
    const key = randomUUID()
    const refused = await withPayments(
      () => ({ refund: () => Promise.reject(new AppError('payment-refused', 409)) }),
      () => refund(desk, orderNumber, { amountCents: 1000 }, key),
    )
    expect(refused.body).toMatchObject({ code: 'refund-refused' })
    expect((await Refund.findOne({ rejectOnEmpty: true })).state).toBe('failed')
    expect((await till.ledger(orderNumber)).map(({ kind }) => kind)).toEqual(['taken'])
    await refund(desk, orderNumber, { amountCents: 1000 }, key).expect(answers(201))
    expect(await Refund.count()).toBe(1)
    expect((await Refund.findOne({ rejectOnEmpty: true })).state).toBe('done')
  })

  it('whose answer is lost stays asked for, its amount set aside, and is carried out once when asked again', async () => {
    const { orderNumber, orderUrl, agent } = await paid()
    const { totalCents } = (await see(agent, orderUrl)).money
    const desk = await shop.signedIn('support')
    // The processor does it, and the answer never comes: the worst of the cases.
    const lost = await withPayments(
      (real) => ({
        refund: async (request) => {
          await real.refund(request)
          throw new AppError('payment-unavailable', 503)
        },
      }),
      () => refund(desk, orderNumber, { amountCents: totalCents - 1 }),
    )
    expect(lost.body).toMatchObject({ code: 'refund-unconfirmed' })
    const second = await refund(desk, orderNumber, { amountCents: totalCents - 1 })
    expect(second.body).toMatchObject({ code: 'refund-too-much', data: { leftCents: 1 } })
    shop.passTime(2 * 60_000)
    expect(await finishRefunds(shop.deps)).toBe(1)
    expect(await finishRefunds(shop.deps)).toBe(0)
    const { money } = await see(agent, orderUrl)
    expect(money.refundedCents).toBe(totalCents - 1)
    expect(await OutboxMail.count({ where: { kind: 'refund' } })).toBe(1)
  })

  it('waits while the processor cannot be reached, over the real SDK', async () => {
    const { orderNumber } = await paid()
    const desk = await shop.signedIn('support')
    const away = createPayments({ ...shop.deps.config, STRIPE_FAKE_PORT: 9 }, shop.deps.clock)
    const reply = await withPayments(
      () => away,
      () => refund(desk, orderNumber, { amountCents: 1000 }),
    )
    expect(reply.status).toBe(503)
    shop.passTime(2 * 60_000)
    expect(await finishRefunds(shop.deps)).toBe(1)
    expect((await till.ledger(orderNumber)).at(-1)).toEqual({ kind: 'refunded', amountCents: -1000 })
  }, 30_000)
})
