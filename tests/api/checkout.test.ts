/** From a fitting to a paid order and back, over the wire: real database, real SDK, the payment stand-in's own pages. */
import { randomUUID } from 'node:crypto'
import fc from 'fast-check'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { Order } from '../../server/models/order.ts'
import { OutboxMail } from '../../server/models/outbox-mail.ts'
import { Stock } from '../../server/models/stock.ts'
import { WebhookEvent } from '../../server/models/webhook-event.ts'
import { Wheelset } from '../../server/models/wheelset.ts'
import { releaseLapsedHolds } from '../../server/jobs/release-holds.ts'
import { signature } from '../../server/fakes/stripe/events.ts'
import { testApp, type TestApp } from '../support/test-app.ts'

let shop: TestApp
beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

/** Like supertest's own check of a status, but says what the server said. */
const answers = (status: number) => (reply: { status: number; body: unknown }) => {
  if (reply.status !== status) throw new Error(`${reply.status} ${JSON.stringify(reply.body)}`)
}

type Agent = ReturnType<TestApp['agent']>
interface AdviceReply {
  wheelsets: { sku: string; verdict: string; limitKg: number; rank: number | null }[]
  systemMassKg: number
}

const rider = (bodyMassKg: number) => ({
  ride: 'road-long',
  bodyMassKg,
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
})
const address = {
  name: 'Rider of the Test',
  line1: 'Rua Inventada 1',
  postcode: '3800-000',
  city: 'Aveiro',
  country: 'PT',
}

const fitting = async (agent: Agent, bodyMassKg = 75) => {
  const { body } = await agent.post('/api/advice-snapshots').send(rider(bodyMassKg)).expect(answers(201))
  return (body as { adviceId: string }).adviceId
}
const firstChoice = async (agent: Agent, bodyMassKg = 75) => {
  const { body } = await agent.post('/api/advice').send(rider(bodyMassKg)).expect(200)
  const stocked = new Set(
    (await Stock.findAll()).filter(({ onHand }) => onHand > 0).map(({ wheelsetId }) => wheelsetId),
  )
  const sets = await Wheelset.findAll()
  const offer = (body as AdviceReply).wheelsets.find(
    ({ rank, sku }) => rank !== null && stocked.has(sets.find((set) => set.sku === sku)?.id ?? 0),
  )
  if (!offer) throw new Error('no wheelset on offer')
  return offer.sku
}
/** Puts the line in with every open choice made from what the hub offers. */
const fill = async (agent: Agent, sku: string, adviceId?: string, quantity = 1) => {
  const line = { sku, quantity, ...(adviceId ? { adviceId } : {}) }
  const request = { market: 'PT', currency: 'EUR' }
  const first = await agent
    .put('/api/basket')
    .send({ ...request, lines: [{ ...line, options: {} }] })
    .expect(answers(200))
  const { optionChoices } = (first.body as { lines: { optionChoices: Record<string, string[]> }[] }).lines[0] ?? {
    optionChoices: {},
  }
  const options = Object.fromEntries(
    Object.entries(optionChoices).flatMap(([name, [choice]]) => (choice ? [[name, choice]] : [])),
  )
  const { body } = await agent
    .put('/api/basket')
    .send({ ...request, lines: [{ ...line, options }] })
    .expect(200)
  return body as {
    basketId: string
    totalCents: number
    canOrder: boolean
    lines: { limitCheck: string; problems: { code: string }[] }[]
  }
}
const orderIt = (agent: Agent, basketId: string, more: object = {}, key: string = randomUUID()) =>
  agent
    .post('/api/orders')
    .set('Idempotency-Key', key)
    .send({ basketId, email: 'rider@mail.example', delivery: address, ...more })

const bought = async (bodyMassKg = 75) => {
  const agent = shop.agent()
  const sku = await firstChoice(agent, bodyMassKg)
  const basket = await fill(agent, sku, await fitting(agent, bodyMassKg))
  const { body } = await orderIt(agent, basket.basketId).expect(answers(201))
  return { agent, sku, basket, ...(body as { orderNumber: string; payUrl: string; orderUrl: string }) }
}
const path = (orderUrl: string, what = '') => {
  const url = new URL(orderUrl)
  return `/api${url.pathname}${what}${url.search}`
}
const until = async (done: () => Promise<boolean>) => {
  for (let tries = 0; tries < 100; tries += 1) {
    if (await done()) return
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  throw new Error('it did not come about')
}
const stockOf = async (sku: string) => {
  const set = await Wheelset.findOne({ where: { sku }, rejectOnEmpty: true })
  const { onHand, reserved } = await Stock.findByPk(set.id, { rejectOnEmpty: true })
  return { id: set.id, onHand, reserved }
}
const state = async (number: string) => (await Order.findOne({ where: { number }, rejectOnEmpty: true })).state

describe('the path of a paid order', () => {
  it('holds stock, is paid on the stand-in’s page, is placed by the event alone, and the receipt is written once', async () => {
    const before = await stockOf(await firstChoice(shop.agent()))
    const { sku, payUrl, orderNumber, orderUrl, agent } = await bought()
    expect(await stockOf(sku)).toMatchObject({ onHand: before.onHand, reserved: before.reserved + 1 })
    const paid = await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
    expect(paid.status).toBe(303)
    expect(paid.headers.get('location')).toContain(`/orders/${orderNumber}?key=`)
    await until(async () => (await state(orderNumber)) === 'cleared')
    expect(await stockOf(sku)).toMatchObject({ onHand: before.onHand - 1, reserved: before.reserved })
    expect(await OutboxMail.count({ where: { kind: 'receipt', ref: orderNumber } })).toBe(1)
    const { body } = await agent.get(path(orderUrl)).expect(200)
    expect(body).toMatchObject({ orderNumber, state: 'cleared', money: { refundedCents: 0 } })
    const { money } = body as {
      money: { goodsCents: number; deliveryCents: number; totalCents: number; takenCents: number }
    }
    expect(money.goodsCents + money.deliveryCents).toBe(money.totalCents)
    expect(money.takenCents).toBe(money.totalCents)
  })

  it('is placed by the return page when every event is lost', async () => {
    await fetch(`${shop.stripeUrl}/control/faults`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: '{"deliver":"drop"}',
    })
    try {
      const { payUrl, orderNumber, orderUrl, agent } = await bought()
      await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
      expect(await state(orderNumber)).toBe('holding')
      await agent.post(path(orderUrl, '/refresh')).expect(200)
      expect(await state(orderNumber)).toBe('cleared')
    } finally {
      await fetch(`${shop.stripeUrl}/control/faults`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: '{"deliver":"normal"}',
      })
    }
  })

  it('takes doubled events and return pages together as one payment', async () => {
    await fetch(`${shop.stripeUrl}/control/faults`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: '{"deliver":"duplicate"}',
    })
    try {
      const { payUrl, orderNumber, orderUrl, agent, sku } = await bought()
      const { onHand } = await stockOf(sku)
      await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
      await Promise.all(Array.from({ length: 6 }, () => agent.post(path(orderUrl, '/refresh'))))
      await until(async () => (await WebhookEvent.count({ where: { type: 'checkout.session.completed' } })) === 1)
      expect(await state(orderNumber)).toBe('cleared')
      expect((await stockOf(sku)).onHand).toBe(onHand - 1)
      expect(await OutboxMail.count({ where: { kind: 'receipt' } })).toBe(1)
    } finally {
      await fetch(`${shop.stripeUrl}/control/faults`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: '{"deliver":"normal"}',
      })
    }
  })

  it('survives a declined card: the page stays open and the second try is paid', async () => {
    const { payUrl, orderNumber } = await bought()
    const declined = await fetch(`${payUrl}/decline`, { method: 'POST' })
    expect(await declined.text()).toContain('declined')
    expect(await state(orderNumber)).toBe('holding')
    await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
    await until(async () => (await state(orderNumber)) === 'cleared')
  })

  it('left without paying: nothing charged, stock back, basket as it was', async () => {
    const { payUrl, orderNumber, orderUrl, agent, sku, basket } = await bought()
    const left = await fetch(`${payUrl}/leave`, { method: 'POST', redirect: 'manual' })
    expect(left.headers.get('location')).toContain('/left?key=')
    await agent.post(path(orderUrl, '/cancel')).expect(200)
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(0)
    const { body } = await agent.get('/api/basket').expect(200)
    expect(body).toMatchObject({ basketId: basket.basketId, canOrder: true })
    await orderIt(agent, basket.basketId).expect(answers(201))
  })

  it('a hold that lapses is let go once, and the pay page has died before it', async () => {
    const { orderNumber, sku } = await bought()
    shop.passTime(36 * 60_000)
    expect(await releaseLapsedHolds(shop.deps)).toBeLessThanOrEqual(1)
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(0)
  })
})

describe('ordering', () => {
  it('the same key gives the same order; without a key, or with the key of another request, it is refused', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const { basketId } = await fill(agent, sku, await fitting(agent))
    const key = randomUUID()
    const [first, second] = [
      await orderIt(agent, basketId, {}, key).expect(answers(201)),
      await orderIt(agent, basketId, {}, key).expect(answers(201)),
    ]
    expect(second.body).toEqual(first.body)
    expect(await Order.count()).toBe(1)
    await agent.post('/api/orders').send({ basketId, email: 'rider@mail.example', delivery: address }).expect(400)
    await orderIt(agent, basketId, { locale: 'pt' }, key).expect(422)
  })

  it('sixty shoppers for the last pair: one order, fifty-nine polite refusals', async () => {
    const sku = await firstChoice(shop.agent())
    const { id } = await stockOf(sku)
    await Stock.update({ onHand: 1, reserved: 0 }, { where: { wheelsetId: id } })
    const shoppers = await Promise.all(
      Array.from({ length: 60 }, async () => {
        const agent = shop.agent()
        const { basketId } = await fill(agent, sku, await fitting(agent))
        return { agent, basketId }
      }),
    )
    const replies = await Promise.all(shoppers.map(({ agent, basketId }) => orderIt(agent, basketId)))
    expect(replies.filter(({ status }) => status === 201)).toHaveLength(1)
    expect(replies.filter(({ status }) => status === 409)).toHaveLength(59)
    expect(await stockOf(sku)).toMatchObject({ onHand: 1, reserved: 1 })
  }, 60_000)

  it('prices come from the server: fields that name one are unknown, and another total than the one shown is refused', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const cheap = await agent
      .put('/api/basket')
      .send({ market: 'PT', currency: 'EUR', lines: [{ sku, quantity: 1, options: {}, unitCents: 1 }] })
    expect(cheap.status).toBe(400)
    expect((cheap.body as { errors: { path: string; code: string }[] }).errors).toContainEqual(
      expect.objectContaining({ path: 'lines.0.unitCents', code: 'unknown' }),
    )
    const { basketId, totalCents } = await fill(agent, sku, await fitting(agent))
    const refused = await orderIt(agent, basketId, { expectedTotalCents: totalCents - 1 })
    expect(refused.body).toMatchObject({ code: 'price-changed', data: { totalCents } })
    await agent.put('/api/basket').send({ market: 'PT', currency: 'USD', lines: [] }).expect(400)
  })

  it('without a fitting it needs the shopper’s word, and then waits in question, unbuilt', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const { basketId, lines } = await fill(agent, sku)
    expect(lines[0]?.limitCheck).toBe('unconfirmed')
    expect((await orderIt(agent, basketId)).body).toMatchObject({ code: 'limit-not-acknowledged' })
    const { body } = await orderIt(agent, basketId, { limitAcknowledged: true }).expect(answers(201))
    const { payUrl, orderNumber } = body as { payUrl: string; orderNumber: string }
    await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
    await until(async () => (await state(orderNumber)) === 'query')
  })

  it('an order opens with its key, for its owner and for support; for anybody else it is not there', async () => {
    const { orderUrl, orderNumber } = await bought()
    const stranger = shop.agent()
    await stranger.get(`/api/orders/${orderNumber}`).expect(404)
    await stranger.get(`/api/orders/${orderNumber}?key=not-the-key`).expect(404)
    await stranger.get(path(orderUrl)).expect(200)
    await (await shop.signedIn('support')).get(`/api/orders/${orderNumber}`).expect(200)
    await (await shop.signedIn('rider')).get(`/api/orders/${orderNumber}`).expect(404)
  })
})

describe('the limit', () => {
  const heavy = 125
  const overLimit = async (agent: Agent) => {
    const { body } = await agent.post('/api/advice').send(rider(heavy)).expect(200)
    const found = (body as AdviceReply).wheelsets.filter(
      ({ verdict, limitKg }) => verdict === 'over-limit' && limitKg < (body as AdviceReply).systemMassKg,
    )
    return found.map(({ sku }) => sku)
  }

  it('no sequence of calls leads to a payment page for a wheelset over the rider’s limit', async () => {
    const skus = (await overLimit(shop.agent())).slice(0, 3)
    expect(skus.length).toBeGreaterThan(0)
    const call = fc.oneof(
      fc.record({
        do: fc.constant('put' as const),
        sku: fc.constantFrom(...skus),
        withFitting: fc.boolean(),
        quantity: fc.integer({ min: 1, max: 2 }),
      }),
      fc.record({ do: fc.constant('empty' as const) }),
      fc.record({ do: fc.constant('order' as const), limitAcknowledged: fc.boolean() }),
      fc.record({ do: fc.constant('look' as const) }),
    )
    await fc.assert(
      fc.asyncProperty(fc.array(call, { minLength: 2, maxLength: 7 }), async (calls) => {
        const agent = shop.agent()
        const adviceId = await fitting(agent, heavy)
        // The visitor's fitting is known to the basket from the first line on.
        let { basketId } = await fill(agent, skus[0] ?? '', adviceId)
        for (const one of calls) {
          if (one.do === 'put')
            ({ basketId } = await fill(agent, one.sku, one.withFitting ? adviceId : undefined, one.quantity))
          else if (one.do === 'empty')
            await agent.put('/api/basket').send({ market: 'PT', currency: 'EUR', lines: [] }).expect(200)
          else if (one.do === 'look') await agent.get('/api/basket').expect(200)
          else {
            const reply = await orderIt(agent, basketId, { limitAcknowledged: one.limitAcknowledged })
            expect(reply.status).toBe(409)
            expect(reply.body).not.toHaveProperty('payUrl')
          }
        }
      }),
      { numRuns: 12 },
    )
    expect(await Order.count()).toBe(0)
  }, 60_000)

  it('a limit lowered while the payment page is open stops the payment, and a payment already made waits in question', async () => {
    const { orderNumber, orderUrl, agent, sku, payUrl } = await bought()
    const { id } = await stockOf(sku)
    await shop.deps.db.query(
      `INSERT INTO limit_versions (wheelset_id, limit_kg, proof, reason, state, in_force_from) VALUES (:id, 60, 'a proof of the test', 'lowered by the test', 'in-force', NOW(3))`,
      { replacements: { id } },
    )
    await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
    await until(async () => (await state(orderNumber)) === 'query')
    await agent.post(path(orderUrl, '/pay')).expect(409)
  })
})

describe('events', () => {
  const event = (over: object = {}) =>
    JSON.stringify({
      id: `evt_${randomUUID()}`,
      object: 'event',
      type: 'charge.refunded',
      created: 1,
      livemode: false,
      data: { object: { id: 'ch_1', object: 'charge' } },
      ...over,
    })
  const post = (body: string, header: string) =>
    shop
      .agent()
      .post('/api/webhooks/stripe')
      .set('Content-Type', 'application/json')
      .set('Stripe-Signature', header)
      .send(body)
  const secret = 'whsec_stand_in_of_the_tests'
  const at = (seconds: number) => new Date(shop.deps.clock().getTime() + seconds * 1000)

  it('signed now are taken, and a second time change nothing', async () => {
    const body = event()
    await post(body, signature(body, secret, at(0))).expect(200)
    await post(body, signature(body, secret, at(0))).expect(200)
    expect(await WebhookEvent.count()).toBe(1)
  })
  it.each([
    ['another secret', (body: string) => signature(body, 'whsec_another', at(0))],
    ['an old stamp', (body: string) => signature(body, secret, at(-400))],
    ['a stamp from the future', (body: string) => signature(body, secret, at(400))],
    ['an edited body', (body: string) => signature(`${body} `, secret, at(0))],
    ['no version we know', (body: string) => signature(body, secret, at(0)).replace('v1=', 'v0=')],
    ['no signature', () => ''],
  ])('with %s are refused and leave nothing', async (_title, header) => {
    const body = event()
    const reply = await post(body, header(body))
    expect(reply.status).toBe(400)
    expect(reply.body).toMatchObject({ code: 'bad-signature' })
    expect(await WebhookEvent.count()).toBe(0)
  })
})
