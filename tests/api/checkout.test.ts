/** From a fitting to a paid order, over the wire: real database, real SDK, the payment stand-in's own pages. */
import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { BasketView } from '../../server/contract/basket.ts'
import { dropOrder } from '../../server/features/checkout/drop-order.ts'
import { settleCheckout } from '../../server/features/checkout/settle.ts'
import { lookUpHeldOrders } from '../../server/jobs/look-up-held.ts'
import { releaseLapsedHolds } from '../../server/jobs/release-holds.ts'
import { IdempotencyKey } from '../../server/models/idempotency-key.ts'
import { Order } from '../../server/models/order.ts'
import { OrderEvent } from '../../server/models/order-event.ts'
import { OutboxMail } from '../../server/models/outbox-mail.ts'
import { createPayments } from '../../server/payments/create.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { address, answers, pathOf, tillOf, until, type PlacedReply } from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
const { fitting, firstChoice, fill, orderIt, bought, paid, payOn, state, stockOf, faults, see } = till
const MINUTE = 60_000

beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

describe('the path of a paid order', () => {
  it('holds stock, is paid on the stand-in’s page, is placed by the event alone, and the receipt is written once', async () => {
    const before = await stockOf(await firstChoice(shop.agent()))
    const { sku, payUrl, orderNumber, orderUrl, agent } = await bought()
    expect(await stockOf(sku)).toMatchObject({ onHand: before.onHand, reserved: before.reserved + 1 })
    const reply = await payOn(payUrl)
    expect(reply.status).toBe(303)
    expect(reply.headers.get('location')).toContain(`/orders/${orderNumber}?key=`)
    await until(async () => (await state(orderNumber)) === 'cleared')
    expect(await stockOf(sku)).toMatchObject({ onHand: before.onHand - 1, reserved: before.reserved })
    expect(await OutboxMail.count({ where: { kind: 'receipt', ref: orderNumber } })).toBe(1)
    const { money, state: shown, payUrl: stillOpen } = await see(agent, orderUrl)
    expect(shown).toBe('cleared')
    expect(stillOpen).toBeNull()
    expect(money.goodsCents + money.deliveryCents).toBe(money.totalCents)
    expect(money.takenCents).toBe(money.totalCents)
    expect(await till.ledger(orderNumber)).toEqual([{ kind: 'taken', amountCents: money.totalCents }])
  })

  it('is placed by the return page when every event is lost', async () => {
    await faults({ deliver: 'drop' }, async () => {
      const { payUrl, orderNumber, orderUrl, agent } = await bought()
      await payOn(payUrl)
      expect(await state(orderNumber)).toBe('holding')
      await agent.post(pathOf(orderUrl, '/refresh')).expect(200)
      expect(await state(orderNumber)).toBe('cleared')
    })
  })

  it('is placed by the look-up job when events are lost and the buyer never returns', async () => {
    await faults({ deliver: 'drop' }, async () => {
      const { payUrl, orderNumber } = await bought()
      await payOn(payUrl)
      await lookUpHeldOrders(shop.deps)
      expect(await state(orderNumber)).toBe('cleared')
    })
  })

  it('survives a declined card: the page stays open and the second try is paid', async () => {
    const { payUrl, orderNumber } = await bought()
    const declined = await fetch(`${payUrl}/decline`, { method: 'POST' })
    expect(await declined.text()).toContain('declined')
    expect(await state(orderNumber)).toBe('holding')
    await payOn(payUrl)
    await until(async () => (await state(orderNumber)) === 'cleared')
  })

  it('left without paying: nothing charged, stock back, basket as it was, and it can be ordered again', async () => {
    const { payUrl, orderNumber, orderUrl, agent, sku, basket } = await bought()
    const left = await fetch(`${payUrl}/leave`, { method: 'POST', redirect: 'manual' })
    expect(left.headers.get('location')).toContain('/left?key=')
    await agent.post(pathOf(orderUrl, '/cancel')).expect(200)
    await agent.post(pathOf(orderUrl, '/cancel')).expect(200)
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(0)
    const { body } = await agent.get('/api/basket').expect(200)
    expect(body).toMatchObject({ basketId: basket.basketId, canOrder: true, lines: basket.lines, heldOrder: null })
    // The page that was left is closed at the processor as well.
    expect((await payOn(payUrl)).headers.get('location')).toMatch(/^\/pay\//)
    await orderIt(agent, basket.basketId).expect(answers(201))
  })

  it('cannot be left once it is paid: the payment wins, whoever is told first', async () => {
    await faults({ deliver: 'drop' }, async () => {
      const { payUrl, orderNumber, orderUrl, agent } = await bought()
      await payOn(payUrl)
      const { body } = await agent.post(pathOf(orderUrl, '/cancel')).expect(200)
      expect(body).toMatchObject({ state: 'cleared' })
      expect(await state(orderNumber)).toBe('cleared')
      expect((await agent.post(pathOf(orderUrl, '/cancel'))).body).toMatchObject({ code: 'too-late-to-leave' })
    })
  })

  it('keeps its events: replaying them gives the state that is stored', async () => {
    const { orderNumber } = await paid()
    const order = await till.orderOf(orderNumber)
    const events = await OrderEvent.findAll({ where: { orderId: order.id }, order: ['id'] })
    let replayed: string | null = null
    for (const { fromState, toState } of events) {
      if (toState === null) continue
      expect(fromState).toBe(replayed)
      replayed = toState
    }
    expect(replayed).toBe(order.state)
  })
})

describe('ordering', () => {
  it('the same key gives the same order; without a key, or with the key of another request, it is refused', async () => {
    const agent = shop.agent()
    const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
    const key = randomUUID()
    const first = await orderIt(agent, basketId, {}, key).expect(answers(201))
    const second = await orderIt(agent, basketId, {}, key).expect(answers(201))
    expect(second.body).toEqual(first.body)
    expect(await Order.count()).toBe(1)
    await agent.post('/api/orders').send({ basketId, email: 'rider@mail.example', delivery: address }).expect(400)
    await orderIt(agent, basketId, { locale: 'pt' }, key).expect(422)
  })

  it('twenty at once under one key, and five under keys of their own, make one order with one payment page', async () => {
    const agent = shop.agent()
    const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
    const key = randomUUID()
    const replies = await Promise.all([
      ...Array.from({ length: 20 }, () => orderIt(agent, basketId, {}, key)),
      ...Array.from({ length: 5 }, () => orderIt(agent, basketId)),
    ])
    expect(replies.every(({ status }) => status === 201 || status === 409)).toBe(true)
    const made = replies.filter(({ status }) => status === 201).map(({ body }) => body as PlacedReply)
    expect(made.length).toBeGreaterThan(0)
    expect(new Set(made.map((one) => JSON.stringify(one))).size).toBe(1)
    expect(await Order.count()).toBe(1)
    expect(await IdempotencyKey.count({ where: { state: 'running' } })).toBe(0)
  })

  it('a corrected address replaces the unpaid order; its page is closed and stock is held once', async () => {
    const { agent, basket, sku, payUrl, orderNumber } = await bought()
    const reply = await orderIt(agent, basket.basketId, { delivery: { ...address, line1: 'Rua Outra 2' } }).expect(
      answers(201),
    )
    const anew = reply.body as PlacedReply
    expect(anew.orderNumber).not.toBe(orderNumber)
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(1)
    expect((await payOn(payUrl)).headers.get('location')).toMatch(/^\/pay\//)
    await payOn(anew.payUrl)
    await until(async () => (await state(anew.orderNumber)) === 'cleared')
    expect((await till.orderOf(anew.orderNumber)).delivery.line1).toBe('Rua Outra 2')
  })

  it('going back to the basket shows it with its unpaid order; changing it leaves that order', async () => {
    const { agent, sku, orderNumber, basket } = await bought()
    const shown = (await agent.get('/api/basket').expect(200)).body as BasketView
    expect(shown).toMatchObject({ basketId: basket.basketId, canOrder: true, heldOrder: { orderNumber } })
    await till.put(agent, [])
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(0)
  })

  it('another visitor cannot order it, another total than the one shown is refused, and so is another country', async () => {
    const agent = shop.agent()
    const { basketId, totalCents } = await fill(agent, await firstChoice(agent), await fitting(agent))
    await orderIt(shop.agent(), basketId).expect(404)
    const refused = await orderIt(agent, basketId, { expectedTotalCents: totalCents - 1 })
    expect(refused.body).toMatchObject({ code: 'price-changed', data: { totalCents } })
    const abroad = await orderIt(agent, basketId, { delivery: { ...address, country: 'ES' } })
    expect(abroad.status).toBe(400)
    expect(abroad.body).toMatchObject({ errors: [{ path: 'delivery.country', code: 'other-country' }] })
    expect(await Order.count()).toBe(0)
  })

  it.each(['totalCents', 'price', 'currency', 'discount', 'payUrl'])(
    'a field %s in the order is unknown',
    async (name) => {
      const agent = shop.agent()
      const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
      const reply = await orderIt(agent, basketId, { [name]: 1 })
      expect(reply.status).toBe(400)
      expect(reply.body).toMatchObject({ errors: [{ path: name, code: 'unknown' }] })
    },
  )

  it('without a fitting it needs the shopper’s word, and then waits in question, unbuilt', async () => {
    const agent = shop.agent()
    const { basketId, lines } = await fill(agent, await firstChoice(agent))
    expect(lines[0]?.limitCheck).toBe('unconfirmed')
    expect((await orderIt(agent, basketId)).body).toMatchObject({ code: 'limit-not-acknowledged' })
    const { body } = await orderIt(agent, basketId, { limitAcknowledged: true }).expect(answers(201))
    const { payUrl, orderNumber } = body as PlacedReply
    await payOn(payUrl)
    await until(async () => (await state(orderNumber)) === 'query')
    expect(await OutboxMail.count({ where: { kind: ['receipt', 'question'], ref: orderNumber } })).toBe(2)
  })

  it('an order opens with its key, for its owner and for support; for anybody else it is not there', async () => {
    const { orderUrl, orderNumber } = await bought()
    const stranger = shop.agent()
    const unknown = await stranger.get('/api/orders/F26-999999').expect(404)
    const hidden = await stranger.get(`/api/orders/${orderNumber}`).expect(404)
    expect((hidden.body as { code: string }).code).toBe((unknown.body as { code: string }).code)
    await stranger.get(`/api/orders/${orderNumber}?key=not-the-key`).expect(404)
    await stranger.get(pathOf(orderUrl)).expect(200)
    await (await shop.signedIn('support')).get(`/api/orders/${orderNumber}`).expect(200)
    await (await shop.signedIn('rider')).get(`/api/orders/${orderNumber}`).expect(404)
    await (await shop.signedIn('product')).get(`/api/orders/${orderNumber}`).expect(404)
    const { tokenHash } = await till.orderOf(orderNumber)
    expect(orderUrl).not.toContain(tokenHash)
  })

  it('belongs to the rider who was signed in, from any device', async () => {
    const agent = await shop.signedIn('rider')
    const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
    const { body } = await orderIt(agent, basketId).expect(answers(201))
    await (await shop.signedIn('rider')).get(`/api/orders/${(body as PlacedReply).orderNumber}`).expect(200)
  })
})

describe('when the processor fails', () => {
  it('a lost reply is asked for again under the same key: one payment page', async () => {
    const { payUrl, orderNumber } = await faults({ loseReply: true }, () => bought())
    await payOn(payUrl)
    await until(async () => (await state(orderNumber)) === 'cleared')
  })

  it('does not answer: the order is held, the basket kept, and it is paid once it answers, even half an hour later', async () => {
    const agent = shop.agent()
    const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
    const { payments } = shop.deps
    shop.deps.payments = createPayments({ ...shop.deps.config, STRIPE_FAKE_PORT: 9 }, shop.deps.clock)
    try {
      expect((await orderIt(agent, basketId)).body).toMatchObject({ code: 'payment-unavailable', status: 503 })
    } finally {
      shop.deps.payments = payments
    }
    const order = await Order.findOne({ rejectOnEmpty: true })
    expect(order.state).toBe('holding')
    shop.passTime(25 * MINUTE)
    const { heldOrder } = (await agent.get('/api/basket').expect(200)).body as BasketView
    const { body } = await agent.post(pathOf(heldOrder?.orderUrl ?? '', '/pay')).expect(answers(200))
    await payOn((body as { payUrl: string }).payUrl)
    await until(async () => (await state(order.number)) === 'cleared')
  }, 30_000)
})

describe('the hold', () => {
  it('that lapses is let go once, the basket is open again, and the payment page has died before it', async () => {
    const { orderNumber, sku, payUrl, agent, basket } = await bought()
    shop.passTime(33 * MINUTE)
    expect((await payOn(payUrl)).headers.get('location')).toMatch(/^\/pay\//)
    shop.passTime(3 * MINUTE)
    await releaseLapsedHolds(shop.deps)
    await releaseLapsedHolds(shop.deps)
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(0)
    await orderIt(agent, basket.basketId).expect(answers(201))
  })

  it('that is over is not in the way of ordering again at once', async () => {
    const { orderNumber, agent, basket, sku } = await bought()
    shop.passTime(34 * MINUTE)
    const { body } = await orderIt(agent, basket.basketId).expect(answers(201))
    expect((body as PlacedReply).orderNumber).not.toBe(orderNumber)
    expect((await stockOf(sku)).reserved).toBe(1)
  })

  it('paid in the moment it lapsed: placed after all while the wheels are there, and the basket is not ordered twice', async () => {
    const { orderNumber, orderUrl, payUrl, agent, basket, sku } = await faults({ deliver: 'drop' }, async () => {
      const order = await bought()
      await payOn(order.payUrl)
      return order
    })
    // As if the sweeper had read the page a moment before it was paid.
    await dropBehindTheBack(orderNumber)
    expect(await stockOf(sku)).toMatchObject({ reserved: 0 })
    await sendCompleted(payUrl)
    expect(await state(orderNumber)).toBe('cleared')
    expect((await see(agent, orderUrl)).state).toBe('cleared')
    expect((await orderIt(agent, basket.basketId)).body).toMatchObject({ code: 'already-ordered' })
  })

  it('paid after the last pair went to somebody else: all the money back with an apology, the second buyer keeps theirs', async () => {
    const sku = await firstChoice(shop.agent())
    await till.setStock(sku, 1)
    const late = await faults({ deliver: 'drop' }, async () => {
      const order = await bought()
      await payOn(order.payUrl)
      return order
    })
    await dropBehindTheBack(late.orderNumber)
    const second = await paid()
    expect(second.sku).toBe(sku)
    await sendCompleted(late.payUrl)
    const { money, state: shown } = await see(late.agent, late.orderUrl)
    expect(shown).toBe('dropped')
    expect(money.refundedCents).toBe(money.takenCents)
    expect(money.takenCents).toBeGreaterThan(0)
    expect(await OutboxMail.count({ where: { kind: 'sold-meanwhile' } })).toBe(1)
    expect(await stockOf(sku)).toMatchObject({ onHand: 0, reserved: 0 })
    expect(await state(second.orderNumber)).toBe('cleared')
  })
})

/** Drops an order as the sweeper does, without asking the processor. */
async function dropBehindTheBack(number: string) {
  await dropOrder(shop.deps, (await till.orderOf(number)).id, 'lapsed', { reason: 'hold-lapsed' })
}

/** What the event does, without its delivery. */
async function sendCompleted(payUrl: string) {
  await settleCheckout(shop.deps, payUrl.split('/').at(-1) ?? '')
}
