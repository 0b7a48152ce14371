/** Events of the payment processor: signed, at least once, in any order. */
import { createHmac, randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { LedgerEntry } from '../../server/models/ledger-entry.ts'
import { Order } from '../../server/models/order.ts'
import { OrderEvent } from '../../server/models/order-event.ts'
import { OutboxMail } from '../../server/models/outbox-mail.ts'
import { WebhookEvent } from '../../server/models/webhook-event.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { pathOf, tillOf, until } from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
const { bought, payOn, state, stockOf, faults } = till

beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const SECRET = 'whsec_stand_in_of_the_tests'
const eventText = (type: string, object: object, id = `evt_${randomUUID()}`) =>
  JSON.stringify({ id, object: 'event', type, created: 1, livemode: false, data: { object } })
const ofCharge = () => eventText('charge.refunded', { id: 'ch_1', object: 'charge' })
const ofSession = (payUrl: string, type = 'checkout.session.completed', more: object = {}, id?: string) =>
  eventText(type, { id: payUrl.split('/').at(-1), object: 'checkout.session', ...more }, id)

/** The scheme as the processor's public reference gives it: HMAC-SHA256 over `t.body`, keyed with the whole secret. Written out here on its own. */
const v1 = (body: string, stamp: number, secret = SECRET) =>
  createHmac('sha256', secret).update(`${stamp}.${body}`).digest('hex')
const stampAt = (seconds: number) => Math.floor(shop.deps.clock().getTime() / 1000) + seconds
const header = (body: string, seconds = 0, secret = SECRET) =>
  `t=${stampAt(seconds)},v1=${v1(body, stampAt(seconds), secret)}`
const post = (body: string, signature: string) =>
  shop
    .agent()
    .post('/api/webhooks/stripe')
    .set('Content-Type', 'application/json')
    .set('Stripe-Signature', signature)
    .send(body)

describe('signatures', () => {
  it.each([
    ['fresh', (body: string) => header(body)],
    ['just inside five minutes', (body: string) => header(body, -298)],
    [
      'with the old and the new secret during a change',
      (body: string) => `t=${stampAt(0)},v1=${v1(body, stampAt(0), 'whsec_old')},v1=${v1(body, stampAt(0))}`,
    ],
  ])('%s: taken', async (_title, sign) => {
    const body = ofCharge()
    const reply = await post(body, sign(body))
    expect(reply.body).toEqual({ received: true })
    expect(await WebhookEvent.count()).toBe(1)
  })

  it.each([
    ['another secret', (body: string) => header(body, 0, 'whsec_another')],
    ['a stamp older than five minutes', (body: string) => header(body, -302)],
    ['a stamp more than five minutes ahead', (body: string) => header(body, 305)],
    ['a stamp a day ahead', (body: string) => header(body, 86_400)],
    ['the signature of an edited body', (body: string) => header(body.replace('ch_1', 'ch_2'))],
    [
      'the signature of the same JSON written otherwise',
      (body: string) => header(JSON.stringify(JSON.parse(body), null, 1)),
    ],
    ['an old scheme only', (body: string) => header(body).replace('v1=', 'v0=')],
    ['no scheme', () => `t=${stampAt(0)}`],
    ['no stamp', (body: string) => `v1=${v1(body, stampAt(0))}`],
    ['nothing', () => ''],
    ['words', () => 'not a signature'],
  ])('with %s: refused, and nothing is kept', async (_title, sign) => {
    const body = ofCharge()
    const reply = await post(body, sign(body))
    expect(reply.status).toBe(400)
    expect(reply.body).toMatchObject({ code: 'bad-signature' })
    expect(await WebhookEvent.count()).toBe(0)
  })
})

describe('events', () => {
  it('of a kind nothing hangs on are taken and kept', async () => {
    const body = eventText('customer.created', { id: 'cus_1', object: 'customer' })
    await post(body, header(body)).expect(200)
    expect((await WebhookEvent.findOne({ rejectOnEmpty: true })).type).toBe('customer.created')
  })

  it('about a page the processor does not know are taken, kept and change nothing', async () => {
    const body = ofSession('/cs_test_unknown')
    await post(body, header(body)).expect(200)
    expect(await WebhookEvent.count()).toBe(1)
    expect(await LedgerEntry.count()).toBe(0)
  })

  it('the same one eight times at once is one row and one effect', async () => {
    const { payUrl, orderNumber, sku } = await faults({ deliver: 'drop' }, async () => {
      const order = await bought()
      await payOn(order.payUrl)
      return order
    })
    const { onHand } = await stockOf(sku)
    const body = ofSession(payUrl)
    const replies = await Promise.all(Array.from({ length: 8 }, () => post(body, header(body))))
    expect(replies.map(({ status }) => status)).toEqual(Array.from({ length: 8 }, () => 200))
    expect(await WebhookEvent.count()).toBe(1)
    expect(await state(orderNumber)).toBe('cleared')
    expect((await stockOf(sku)).onHand).toBe(onHand - 1)
    expect(await LedgerEntry.count()).toBe(1)
  })

  it('two events for one payment, doubled, beside six return pages: placed once', async () => {
    await faults({ deliver: 'duplicate' }, async () => {
      const { payUrl, orderNumber, orderUrl, agent, sku } = await bought()
      const { onHand } = await stockOf(sku)
      await payOn(payUrl)
      const another = ofSession(payUrl)
      await Promise.all([
        ...Array.from({ length: 6 }, () => agent.post(pathOf(orderUrl, '/refresh'))),
        post(another, header(another)),
        post(another, header(another)),
      ])
      await until(async () => (await WebhookEvent.count({ where: { type: 'checkout.session.completed' } })) === 2)
      expect(await state(orderNumber)).toBe('cleared')
      expect((await stockOf(sku)).onHand).toBe(onHand - 1)
      expect(await OutboxMail.count({ where: { kind: 'receipt' } })).toBe(1)
      expect(await LedgerEntry.count()).toBe(1)
      expect(await OrderEvent.count({ where: { kind: 'paid' } })).toBe(1)
    })
  })

  it('that came after the return page find the order placed', async () => {
    await faults({ delayMs: 300 }, async () => {
      const { payUrl, orderNumber, orderUrl, agent } = await bought()
      await payOn(payUrl)
      await agent.post(pathOf(orderUrl, '/refresh')).expect(200)
      expect(await state(orderNumber)).toBe('cleared')
      await until(async () => (await WebhookEvent.count({ where: { type: 'checkout.session.completed' } })) === 1)
      expect(await LedgerEntry.count()).toBe(1)
    })
  })

  it('that say paid place nothing while the page itself is unpaid', async () => {
    const { payUrl, orderNumber } = await bought()
    const body = ofSession(payUrl, 'checkout.session.completed', { payment_status: 'paid', amount_total: 1 })
    await post(body, header(body)).expect(200)
    expect(await state(orderNumber)).toBe('holding')
    expect(await LedgerEntry.count()).toBe(0)
  })

  it('of an expired page let the stock go; one that comes after the payment changes nothing', async () => {
    const { payUrl, orderNumber, sku } = await bought()
    shop.passTime(33 * 60_000)
    const body = ofSession(payUrl, 'checkout.session.expired')
    await post(body, header(body)).expect(200)
    expect(await state(orderNumber)).toBe('dropped')
    expect((await stockOf(sku)).reserved).toBe(0)

    const second = await till.paid()
    const late = ofSession(second.payUrl, 'checkout.session.expired')
    await post(late, header(late)).expect(200)
    expect(await state(second.orderNumber)).toBe('cleared')
  })

  it('that come once more after all the money went back bring nothing back to life', async () => {
    const { payUrl, orderNumber, sku } = await till.paid()
    const { totalCents } = await till.orderOf(orderNumber)
    const desk = await shop.signedIn('support')
    await desk
      .post(`/api/desk/orders/${orderNumber}/refunds`)
      .set('Idempotency-Key', randomUUID())
      .send({ amountCents: totalCents, reason: 'the test asks for it' })
      .expect(201)
    const before = await stockOf(sku)
    for (const type of ['checkout.session.completed', 'checkout.session.expired']) {
      const body = ofSession(payUrl, type)
      await post(body, header(body)).expect(200)
    }
    expect(await state(orderNumber)).toBe('dropped')
    expect(await stockOf(sku)).toEqual(before)
    expect(await LedgerEntry.count()).toBe(2)
  })

  it('for a payment of another amount: money written down, nobody builds, the buyer is asked', async () => {
    const { payUrl, orderNumber } = await bought()
    // The order's frozen total and the page part ways: a fault on our side or a page made by somebody else.
    await Order.increment({ goodsCents: 100, totalCents: 100 }, { where: { number: orderNumber } })
    await payOn(payUrl)
    await until(async () => (await state(orderNumber)) === 'query')
    const { id, totalCents } = await till.orderOf(orderNumber)
    const queried = await OrderEvent.findOne({ where: { orderId: id, kind: 'queried' }, rejectOnEmpty: true })
    expect(queried.data).toMatchObject({ causes: ['amount-mismatch'], amountCents: totalCents - 100 })
    expect(await till.ledger(orderNumber)).toEqual([{ kind: 'taken', amountCents: totalCents - 100 }])
    expect(await OutboxMail.count({ where: { kind: 'question', ref: orderNumber } })).toBe(1)
  })
})
