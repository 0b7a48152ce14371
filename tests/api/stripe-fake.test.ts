/**
 * The stand-in for payments, spoken to by the processor's own SDK: what the SDK makes of a reply (its error classes, its check of a signature)
 * is the outside value here. Limits and meanings: the public API reference on checkout sessions, refunds, idempotent requests and webhooks.
 */
import { randomUUID } from 'node:crypto'
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises'
import { createServer, type IncomingHttpHeaders, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import os from 'node:os'
import path from 'node:path'
import Stripe from 'stripe'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest'
import { reachableHost } from '../../server/fakes/listen.ts'
import type { Faults } from '../../server/fakes/stripe/control.ts'
import { createStripeFake } from '../../server/fakes/stripe/server.ts'

const KEY = 'sk_test_of_these_tests'
const SECRET = 'whsec_of_these_tests'
const HOUR_S = 3600

interface Delivery {
  headers: IncomingHttpHeaders
  raw: Buffer
  type: string
  id: string
}

let deliveries: Delivery[] = []
/** Statuses the listening shop gives, first one first; 200 once they are used up. */
let shopAnswers: number[] = []
let shop: Server
let shopUrl = ''
let shiftMs = 0
const clock = () => new Date(Date.now() + shiftMs)
const nowS = () => Math.floor(clock().getTime() / 1000)

let fake: ReturnType<typeof createStripeFake>
let port = 0
let stripe: Stripe

const client = (atPort: number, key = KEY, retries = 0) =>
  new Stripe(key, {
    host: '127.0.0.1',
    port: atPort,
    protocol: 'http',
    maxNetworkRetries: retries,
    timeout: 4_000,
    telemetry: false,
  })
const optionsOf = (file: string | null) => ({
  port: 0,
  host: '127.0.0.1',
  secretKey: KEY,
  webhookSecret: SECRET,
  webhookUrl: shopUrl,
  file,
  clock,
})
const fakeAt = (file: string | null = null) => createStripeFake(optionsOf(file))

beforeAll(async () => {
  shop = createServer((req, res) => {
    const parts: Buffer[] = []
    req.on('data', (part: Buffer) => parts.push(part))
    req.on('end', () => {
      const raw = Buffer.concat(parts)
      const { type, id } = JSON.parse(raw.toString()) as Delivery
      deliveries.push({ headers: req.headers, raw, type, id })
      res.writeHead(shopAnswers.shift() ?? 200).end()
    })
  })
  await new Promise<void>((resolve) => shop.listen(0, '127.0.0.1', resolve))
  shopUrl = `http://127.0.0.1:${(shop.address() as AddressInfo).port}/hook`
})
afterAll(() => {
  shop.closeAllConnections()
  shop.close()
})
beforeEach(async () => {
  deliveries = []
  shopAnswers = []
  shiftMs = 0
  fake = fakeAt()
  port = (await fake.start()).port
  stripe = client(port)
})
afterEach(() => fake.stop())

const order = (more: Partial<Stripe.Checkout.SessionCreateParams> = {}): Stripe.Checkout.SessionCreateParams => ({
  mode: 'payment',
  client_reference_id: 'F26-000123',
  customer_email: 'rider@felloe.example',
  locale: 'en',
  metadata: { orderNumber: 'F26-000123' },
  payment_intent_data: { metadata: { orderNumber: 'F26-000123' } },
  line_items: [
    { quantity: 2, price_data: { currency: 'eur', unit_amount: 129_900, product_data: { name: 'Rowan 45' } } },
    { quantity: 1, price_data: { currency: 'eur', unit_amount: 1_950, product_data: { name: 'Delivery' } } },
  ],
  success_url: 'http://127.0.0.1:4300/thanks?session={CHECKOUT_SESSION_ID}',
  cancel_url: 'http://127.0.0.1:4300/basket',
  ...more,
})
/** 2 × 1299.00 + 19.50, by hand */
const TOTAL = 261_750

const idOf = (reference: string | { id: string } | null | undefined) =>
  typeof reference === 'string' ? reference : (reference?.id ?? '')

const press = (session: { id: string }, button: 'pay' | 'decline' | 'leave', atPort = port) =>
  fetch(`http://127.0.0.1:${atPort}/pay/${session.id}/${button}`, { method: 'POST', redirect: 'manual' })
const see = async (session: { id: string }) => (await fetch(`http://127.0.0.1:${port}/pay/${session.id}`)).text()
const raw = (method: string, url: string, body?: string, headers: Record<string, string> = {}) =>
  fetch(`http://127.0.0.1:${port}${url}`, {
    method,
    headers: { Authorization: `Bearer ${KEY}`, 'Content-Type': 'application/x-www-form-urlencoded', ...headers },
    ...(body === undefined ? {} : { body }),
  })
const faults = (wanted: Partial<Faults> | object, atPort = port) =>
  fetch(`http://127.0.0.1:${atPort}/control/faults`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(wanted),
  })
const refusal = async (work: Promise<unknown>) => {
  const error = await work.then(
    () => null,
    (thrown: unknown) => thrown,
  )
  if (!(error instanceof Stripe.errors.StripeError)) throw new Error('the SDK threw no error of its own')
  return error
}
const delivered = async (type: string, count = 1) => {
  await expect.poll(() => deliveries.filter((one) => one.type === type).length, { timeout: 4_000 }).toBe(count)
  return deliveries.filter((one) => one.type === type)
}
const bought = async (more: Partial<Stripe.Checkout.SessionCreateParams> = {}) => {
  const session = await stripe.checkout.sessions.create(order(more))
  await press(session, 'pay')
  const paid = await stripe.checkout.sessions.retrieve(session.id)
  return { session: paid, intent: idOf(paid.payment_intent) }
}

describe('checkout sessions', () => {
  it('are created open and unpaid with what was asked for', async () => {
    const session = await stripe.checkout.sessions.create(order({ expires_at: nowS() + HOUR_S }))
    expect(session).toMatchObject({
      object: 'checkout.session',
      status: 'open',
      payment_status: 'unpaid',
      amount_total: TOTAL,
      currency: 'eur',
      client_reference_id: 'F26-000123',
      customer_email: 'rider@felloe.example',
      metadata: { orderNumber: 'F26-000123' },
      livemode: false,
    })
    expect(session.url).toBe(`http://127.0.0.1:${port}/pay/${session.id}`)
    expect(session.lastResponse.requestId).toMatch(/^req_/)
  })

  it('live 24 hours unless told otherwise', async () => {
    const session = await stripe.checkout.sessions.create(order())
    expect(session.expires_at - session.created).toBe(24 * HOUR_S)
  })

  it.each([
    ['29 minutes', 29 * 60],
    ['25 hours', 25 * HOUR_S],
  ])('refuse to expire in %s', async (_words, aheadS) => {
    const error = await refusal(stripe.checkout.sessions.create(order({ expires_at: nowS() + aheadS })))
    expect(error).toBeInstanceOf(Stripe.errors.StripeInvalidRequestError)
    expect(error).toMatchObject({ statusCode: 400, param: 'expires_at' })
  })

  it('are read back, with the intent expanded only on request', async () => {
    const { session, intent } = await bought()
    expect(intent).toMatch(/^pi_/)
    expect(session).toMatchObject({ status: 'complete', payment_status: 'paid', url: null })
    const { payment_intent: whole } = await stripe.checkout.sessions.retrieve(session.id, {
      expand: ['payment_intent'],
    })
    expect(whole).toMatchObject({
      id: intent,
      object: 'payment_intent',
      status: 'succeeded',
      amount_received: TOTAL,
      metadata: { orderNumber: 'F26-000123' },
    })
  })

  it('refuse to expand what they do not hold', async () => {
    const session = await stripe.checkout.sessions.create(order())
    expect(await refusal(stripe.checkout.sessions.retrieve(session.id, { expand: ['customer'] }))).toMatchObject({
      statusCode: 400,
    })
  })

  it('show references inside references, and their lines, whole', async () => {
    const { session, intent } = await bought()
    const whole = await stripe.checkout.sessions.retrieve(session.id, {
      expand: ['payment_intent.latest_charge', 'line_items'],
    })
    expect(whole.payment_intent).toMatchObject({
      id: intent,
      latest_charge: { object: 'charge', amount: TOTAL, payment_intent: intent },
    })
    expect(whole.line_items?.data.map(({ description }) => description)).toEqual(['Rowan 45', 'Delivery'])
    const { data } = await stripe.checkout.sessions.list({ expand: ['data.payment_intent'] })
    expect(data.map(({ payment_intent: one }) => one)).toMatchObject([{ id: intent, status: 'succeeded' }])
  })

  it('asked for with something whole that they do not hold are not made', async () => {
    expect(await refusal(stripe.checkout.sessions.create(order({ expand: ['customer'] })))).toMatchObject({
      statusCode: 400,
      param: 'expand',
    })
    expect((await stripe.checkout.sessions.list()).data).toEqual([])
  })

  it('count shipping in the total, apart from the goods, on the page and in what is paid', async () => {
    const { session, intent } = await bought({ shipping_options: [shipping(1_250)] })
    // 2 × 1299.00 + 19.50 + 12.50, by hand
    expect(session).toMatchObject({
      amount_subtotal: TOTAL,
      amount_total: 263_000,
      shipping_cost: { amount_total: 1_250 },
      total_details: { amount_shipping: 1_250 },
    })
    expect((await stripe.paymentIntents.retrieve(intent)).amount_received).toBe(263_000)
    const page = await see(session)
    expect(page).toContain('<th scope="row">By &lt;road&gt;</th><td>€12.50</td>')
    expect(page).toMatch(/class="total".*€2,630\.00/)
    expect((await stripe.refunds.create({ payment_intent: intent })).amount).toBe(263_000)
  })

  it('without shipping say so and show no row for it', async () => {
    const session = await stripe.checkout.sessions.create(order())
    expect(session).toMatchObject({
      amount_subtotal: TOTAL,
      shipping_cost: null,
      total_details: { amount_shipping: 0 },
    })
    // Two lines and the total.
    expect((await see(session)).match(/<th scope="row">/g)).toHaveLength(3)
  })

  it.each([
    ['two ways', [shipping(1_250), shipping(2_500)], 'shipping_options'],
    ['less than nothing', [shipping(-1)], 'shipping_options[0][shipping_rate_data][fixed_amount][amount]'],
    ['another currency', [shipping(1_250, 'gbp')], 'shipping_options[0][shipping_rate_data][fixed_amount][currency]'],
  ])('refuse shipping in %s', async (_words, options, param) => {
    const error = await refusal(stripe.checkout.sessions.create(order({ shipping_options: options })))
    expect(error).toMatchObject({ statusCode: 400, param })
  })

  it('list their lines, which add up to the total', async () => {
    const session = await stripe.checkout.sessions.create(order())
    const { data } = await stripe.checkout.sessions.listLineItems(session.id)
    expect(data.map(({ description, quantity, price }) => [description, quantity, price?.unit_amount])).toEqual([
      ['Rowan 45', 2, 129_900],
      ['Delivery', 1, 1_950],
    ])
    expect(data.reduce((sum, line) => sum + line.amount_total, 0)).toBe(TOTAL)
  })

  it('are listed newest first, page after page without a gap', async () => {
    const made: string[] = []
    for (let count = 0; count < 5; count += 1) made.unshift((await stripe.checkout.sessions.create(order())).id)
    const seen: string[] = []
    for await (const { id } of stripe.checkout.sessions.list({ limit: 2 })) seen.push(id)
    expect(seen).toEqual(made)
  })

  it('are found by state and by intent', async () => {
    const { session, intent } = await bought()
    const open = await stripe.checkout.sessions.create(order())
    expect((await stripe.checkout.sessions.list({ status: 'open' })).data.map(({ id }) => id)).toEqual([open.id])
    expect((await stripe.checkout.sessions.list({ payment_intent: intent })).data.map(({ id }) => id)).toEqual([
      session.id,
    ])
  })

  it('expire on request once, and only while open', async () => {
    const session = await stripe.checkout.sessions.create(order())
    expect((await stripe.checkout.sessions.expire(session.id)).status).toBe('expired')
    expect(await refusal(stripe.checkout.sessions.expire(session.id))).toBeInstanceOf(
      Stripe.errors.StripeInvalidRequestError,
    )
    await delivered('checkout.session.expired')
    const paid = await bought()
    expect((await refusal(stripe.checkout.sessions.expire(paid.session.id))).statusCode).toBe(400)
  })

  it('expire by themselves when their time is over, and can no longer be paid', async () => {
    const session = await stripe.checkout.sessions.create(order({ expires_at: nowS() + 31 * 60 }))
    shiftMs = 30 * 60_000
    expect((await stripe.checkout.sessions.retrieve(session.id)).status).toBe('open')
    shiftMs = 32 * 60_000
    expect((await press(session, 'pay')).headers.get('location')).toBe(`/pay/${session.id}`)
    expect(await stripe.checkout.sessions.retrieve(session.id)).toMatchObject({
      status: 'expired',
      payment_status: 'unpaid',
    })
    await delivered('checkout.session.expired')
  })

  it('expire without anybody asking', { timeout: 12_000 }, async () => {
    await stripe.checkout.sessions.create(order({ expires_at: nowS() + 31 * 60 }))
    shiftMs = 32 * 60_000
    await expect
      .poll(() => deliveries.map(({ type }) => type), { timeout: 8_000 })
      .toEqual(['checkout.session.expired'])
  })

  it('that nobody made are missing', async () => {
    for (const id of ['cs_test_none', 'constructor']) {
      const error = await refusal(stripe.checkout.sessions.retrieve(id))
      expect(error).toMatchObject({ statusCode: 404, code: 'resource_missing' })
    }
  })
})

describe('requests that cannot be', () => {
  it('with another key are turned away', async () => {
    const error = await refusal(client(port, 'sk_test_other').checkout.sessions.create(order()))
    expect(error).toBeInstanceOf(Stripe.errors.StripeAuthenticationError)
    expect(error.statusCode).toBe(401)
  })

  it.each([
    ['brackets that do not close', 'mode=payment&line_items[0=1', undefined],
    ['a name that means something to the language', '__proto__[mode]=payment', undefined],
    ['no lines', 'mode=payment&success_url=http://a.example', 'line_items'],
    ['another mode', 'mode=subscription', 'mode'],
    ['half a cent', lineForm('unit_amount', '10.5'), 'line_items[0][price_data][unit_amount]'],
    ['less than nothing', lineForm('unit_amount', '-1'), 'line_items[0][price_data][unit_amount]'],
    ['no name', lineForm('product_data][name', ''), 'line_items[0][price_data][product_data][name]'],
    ['no such currency', lineForm('currency', 'euros'), 'line_items[0][price_data][currency]'],
    ['a way back that is a script', `${lineForm()}&success_url=javascript:alert(1)`, 'success_url'],
    ['a name that is not spoken here', 'mode=payment&automatic_tax[enabled]=true', 'automatic_tax'],
    [
      'a field that is not spoken here',
      lineForm('tax_behavior', 'inclusive'),
      'line_items[0][price_data][tax_behavior]',
    ],
    ['no way back', lineForm(), 'success_url'],
  ])('are answered 400: %s', async (_words, body, param) => {
    const reply = await raw('POST', '/v1/checkout/sessions', body)
    const { error } = (await reply.json()) as { error: { type: string; message: string; param?: string } }
    expect(reply.status).toBe(400)
    expect(error.type).toBe('invalid_request_error')
    expect(error.param).toBe(param)
    expect(reply.headers.get('request-id')).toMatch(/^req_/)
    expect((await stripe.checkout.sessions.list()).data).toEqual([])
  })

  it('to addresses that are not spoken here are answered 404, bodies too large 413', async () => {
    expect((await raw('GET', '/v1/customers')).status).toBe(404)
    expect((await raw('POST', '/v1/refunds', `charge=${'x'.repeat(300_000)}`)).status).toBe(413)
  })

  it('with a cursor or a limit that leads nowhere are answered 400 or 404', async () => {
    expect((await refusal(stripe.events.list({ limit: 101 }))).statusCode).toBe(400)
    expect((await refusal(stripe.events.list({ starting_after: 'evt_none' }))).statusCode).toBe(404)
  })
})

/** One way of delivery at a fixed price. */
function shipping(amount: number, currency = 'eur'): Stripe.Checkout.SessionCreateParams.ShippingOption {
  return {
    shipping_rate_data: { type: 'fixed_amount', display_name: 'By <road>', fixed_amount: { amount, currency } },
  }
}

/** A form with one line in which one field is another. */
function lineForm(field = '', value = '') {
  const fields = { currency: 'eur', unit_amount: '100', 'product_data][name': 'Rowan 45', [field]: value }
  const line = Object.entries(fields).filter(([name]) => name !== '')
  return ['mode=payment', ...line.map(([name, word]) => `line_items[0][price_data][${name}]=${word}`)].join('&')
}

describe('idempotency keys', () => {
  it('give the first reply again', async () => {
    const options = { idempotencyKey: randomUUID() }
    const first = await stripe.checkout.sessions.create(order(), options)
    const again = await stripe.checkout.sessions.create(order(), options)
    expect(again).toEqual(first)
    expect(again.lastResponse.headers['idempotent-replayed']).toBe('true')
    expect((await stripe.checkout.sessions.list()).data).toHaveLength(1)
  })

  it('give the first reply again even where the state has moved on', async () => {
    const options = { idempotencyKey: randomUUID() }
    const first = await stripe.checkout.sessions.create(order(), options)
    await press(first, 'pay')
    expect((await stripe.checkout.sessions.create(order(), options)).status).toBe('open')
  })

  it('refuse other parameters', async () => {
    const options = { idempotencyKey: randomUUID() }
    await stripe.checkout.sessions.create(order(), options)
    const error = await refusal(stripe.checkout.sessions.create(order({ customer_email: 'b@felloe.example' }), options))
    expect(error).toBeInstanceOf(Stripe.errors.StripeIdempotencyError)
    expect(error.statusCode).toBe(400)
  })

  it('are free again after a refusal of the parameters', async () => {
    const options = { idempotencyKey: randomUUID() }
    await refusal(stripe.checkout.sessions.create(order({ line_items: [] }), options))
    expect((await stripe.checkout.sessions.create(order(), options)).status).toBe('open')
  })

  it('keep a refusal met while the request was carried out', async () => {
    const { intent } = await bought()
    const ask = () =>
      refusal(stripe.refunds.create({ payment_intent: intent, amount: TOTAL }, { idempotencyKey: `late-${intent}` }))
    await stripe.refunds.create({ payment_intent: intent, amount: 100 })
    const [first, again] = [await ask(), await ask()]
    expect(first).toMatchObject({ statusCode: 400, param: 'amount' })
    expect(again.message).toBe(first.message)
    expect(again.headers?.['idempotent-replayed']).toBe('true')
  })

  it('are forgotten after a day', async () => {
    const options = { idempotencyKey: randomUUID() }
    const first = await stripe.checkout.sessions.create(order(), options)
    shiftMs = 25 * HOUR_S * 1000
    expect((await stripe.checkout.sessions.create(order(), options)).id).not.toBe(first.id)
  })

  it('have at most 255 characters', async () => {
    expect((await raw('POST', '/v1/refunds', 'charge=ch_none', { 'Idempotency-Key': 'k'.repeat(256) })).status).toBe(
      400,
    )
  })

  it('in use answer 409 to a second request, and the SDK comes back for the reply', async () => {
    await faults({ holdReplyMs: 300 })
    const options = { idempotencyKey: randomUUID() }
    const first = stripe.checkout.sessions.create(order(), options)
    await expect.poll(async () => (await stripe.checkout.sessions.list()).data.length).toBe(1)
    expect((await refusal(stripe.checkout.sessions.create(order(), options))).statusCode).toBe(409)
    const patient = await client(port, KEY, 2).checkout.sessions.create(order(), options)
    expect(patient.id).toBe((await first).id)
  })

  it('save a request whose reply was lost from being carried out twice', async () => {
    await faults({ loseReply: true })
    const session = await client(port, KEY, 1).checkout.sessions.create(order())
    expect((await stripe.checkout.sessions.list()).data.map(({ id }) => id)).toEqual([session.id])
  })
})

describe('the payment page', () => {
  it('says what it is and what is paid, in the language of the session', async () => {
    const english = await see(await stripe.checkout.sessions.create(order()))
    expect(english).toContain('lang="en"')
    expect(english).toMatch(/no money moves/)
    expect(english).toContain('2 × Rowan 45')
    expect(english).toContain('€2,617.50')
    const portuguese = await see(await stripe.checkout.sessions.create(order({ locale: 'pt' })))
    expect(portuguese).toContain('lang="pt"')
    expect(portuguese).toMatch(/2617,50\s€/)
    for (const page of [english, portuguese]) expect(page).not.toContain('<script')
  })

  it('shows names as text, whatever they are', async () => {
    const name = `<img src=x onerror="alert('1')">&amp;`
    const lines = [{ quantity: 1, price_data: { currency: 'eur', unit_amount: 100, product_data: { name } } }]
    const page = await see(
      await stripe.checkout.sessions.create(order({ line_items: lines, client_reference_id: '<b>' })),
    )
    expect(page).toContain('&lt;img src=x onerror=&quot;alert(&#39;1&#39;)&quot;&gt;&amp;amp;')
    expect(page).not.toMatch(/<img|<b>/)
  })

  it('leads to the shop after paying, and twice pressed pays once', async () => {
    const session = await stripe.checkout.sessions.create(order())
    const [first, second] = await Promise.all([press(session, 'pay'), press(session, 'pay')])
    for (const reply of [first, second]) {
      expect(reply.status).toBe(303)
      expect(reply.headers.get('location')).toBe(`http://127.0.0.1:4300/thanks?session=${session.id}`)
    }
    await delivered('checkout.session.completed')
    const { data } = await stripe.events.list({ type: 'payment_intent.succeeded' })
    expect(data).toHaveLength(1)
    expect(await see(session)).toContain(`href="http://127.0.0.1:4300/thanks?session=${session.id}"`)
  })

  it('stays open after a declined card, which can then be paid', async () => {
    const session = await stripe.checkout.sessions.create(order())
    const page = await press(session, 'decline')
    expect(page.status).toBe(200)
    expect(await page.text()).toContain('role="alert"')
    expect(await stripe.checkout.sessions.retrieve(session.id)).toMatchObject({
      status: 'open',
      payment_status: 'unpaid',
    })
    const [failed] = await delivered('payment_intent.payment_failed')
    expect(JSON.parse(failed!.raw.toString()).data.object.last_payment_error.code).toBe('card_declined')
    await press(session, 'pay')
    const { payment_intent: intent } = await stripe.checkout.sessions.retrieve(session.id, {
      expand: ['payment_intent'],
    })
    expect(intent).toMatchObject({ status: 'succeeded', last_payment_error: null })
  })

  it('lets the visitor leave without changing anything', async () => {
    const session = await stripe.checkout.sessions.create(order())
    const reply = await press(session, 'leave')
    expect([reply.status, reply.headers.get('location')]).toEqual([303, 'http://127.0.0.1:4300/basket'])
    expect((await stripe.checkout.sessions.retrieve(session.id)).status).toBe('open')
  })

  it('that has expired offers the way back and no way to pay', async () => {
    const session = await stripe.checkout.sessions.create(order())
    await stripe.checkout.sessions.expire(session.id)
    const page = await see(session)
    expect(page).toContain('href="http://127.0.0.1:4300/basket"')
    expect(page).not.toContain('<form')
  })

  it('nobody asked for is not found', async () => {
    expect((await fetch(`http://127.0.0.1:${port}/pay/cs_test_none`)).status).toBe(404)
  })
})

describe('refunds', () => {
  it('in full mark the charge as refunded, and are final', async () => {
    const { intent } = await bought()
    const refund = await stripe.refunds.create({ payment_intent: intent, reason: 'requested_by_customer' })
    expect(refund).toMatchObject({
      object: 'refund',
      amount: TOTAL,
      currency: 'eur',
      status: 'succeeded',
      payment_intent: intent,
      reason: 'requested_by_customer',
    })
    expect(await stripe.charges.retrieve(idOf(refund.charge))).toMatchObject({
      amount_refunded: TOTAL,
      refunded: true,
    })
    expect(await refusal(stripe.refunds.create({ payment_intent: intent }))).toMatchObject({
      statusCode: 400,
      code: 'charge_already_refunded',
    })
    expect((await stripe.refunds.retrieve(refund.id)).amount).toBe(TOTAL)
  })

  it('in parts never add up to more than was paid', async () => {
    const { intent } = await bought()
    const { latest_charge: charge } = await stripe.paymentIntents.retrieve(intent)
    await stripe.refunds.create({ charge: idOf(charge), amount: 100_000 })
    await stripe.refunds.create({ payment_intent: intent, amount: 100_000 })
    const error = await refusal(stripe.refunds.create({ payment_intent: intent, amount: TOTAL - 200_000 + 1 }))
    expect(error).toMatchObject({ statusCode: 400, param: 'amount' })
    await stripe.refunds.create({ payment_intent: intent })
    const { data } = await stripe.refunds.list({ payment_intent: intent })
    expect(data.map(({ amount }) => amount)).toEqual([TOTAL - 200_000, 100_000, 100_000])
    const told = await delivered('charge.refunded', 3)
    const sums = told.map((one) => Number(JSON.parse(one.raw.toString()).data.object.amount_refunded))
    expect(sums.toSorted((a, b) => a - b)).toEqual([100_000, 200_000, TOTAL])
  })

  it('of nothing, or of what was never paid, are refused', async () => {
    const { intent } = await bought()
    expect((await refusal(stripe.refunds.create({ payment_intent: intent, amount: 0 }))).param).toBe('amount')
    expect((await refusal(stripe.refunds.create({ payment_intent: 'pi_none' }))).statusCode).toBe(404)
    expect((await refusal(stripe.refunds.create({}))).statusCode).toBe(400)
  })

  it('asked twice with one key give money back once', async () => {
    const { intent } = await bought()
    const ask = () =>
      stripe.refunds.create({ payment_intent: intent, amount: 500 }, { idempotencyKey: `refund-${intent}` })
    expect((await ask()).id).toBe((await ask()).id)
    expect((await stripe.refunds.list({ payment_intent: intent })).data).toHaveLength(1)
  })
})

describe('events', () => {
  it('are signed so that the SDK accepts them, and nothing changed on the way', async () => {
    const { session } = await bought()
    const [one] = await delivered('checkout.session.completed')
    const signature = String(one!.headers['stripe-signature'])
    const event = stripe.webhooks.constructEvent(one!.raw, signature, SECRET)
    expect(event.data.object).toMatchObject({ id: session.id, payment_status: 'paid', status: 'complete' })
    const changed = Buffer.from(one!.raw.toString().replace(String(TOTAL), '1'))
    for (const [body, secret] of [[changed, SECRET] as const, [one!.raw, 'whsec_other'] as const])
      expect(() => stripe.webhooks.constructEvent(body, signature, secret)).toThrow(
        Stripe.errors.StripeSignatureVerificationError,
      )
  })

  it('can be told to come with a signature that does not hold', async () => {
    await faults({ wrongSignature: true })
    await bought()
    const [one] = await delivered('checkout.session.completed')
    expect(() => stripe.webhooks.constructEvent(one!.raw, String(one!.headers['stripe-signature']), SECRET)).toThrow(
      Stripe.errors.StripeSignatureVerificationError,
    )
  })

  it('can be told to come twice, as the same event', async () => {
    await faults({ deliver: 'duplicate' })
    await bought()
    const copies = await delivered('checkout.session.completed', 2)
    expect(new Set(copies.map(({ id }) => id)).size).toBe(1)
  })

  it('can be told to come more often still', async () => {
    await faults({ deliver: 'duplicate', copies: 5 })
    await bought()
    await delivered('checkout.session.completed', 5)
  })

  it('can be told to come in another order, and still all come', async () => {
    await faults({ shuffleMs: 500, deliver: 'duplicate', copies: 2 })
    for (let count = 0; count < 4; count += 1) {
      const { id } = await stripe.checkout.sessions.create(order())
      await stripe.checkout.sessions.expire(id)
    }
    const made = (await stripe.events.list()).data.map(({ id }) => id).reverse()
    expect(made).toHaveLength(4)
    await delivered('checkout.session.expired', 8)
    const came = deliveries.map(({ id }) => id)
    const inOrder = made.flatMap((id) => [id, id])
    expect(came.toSorted()).toEqual(inOrder.toSorted())
    expect(came).not.toEqual(inOrder)
  })

  it('that were dropped can still be fetched, by kind and from a time on', async () => {
    await faults({ deliver: 'drop' })
    const { session } = await bought()
    const from = nowS() - 60
    const types = ['checkout.session.completed', 'checkout.session.expired']
    const { data } = await stripe.events.list({ types, created: { gte: from } })
    expect(data.map(({ type, data: { object } }) => [type, (object as { id: string }).id])).toEqual([
      ['checkout.session.completed', session.id],
    ])
    expect((await stripe.events.list({ created: { gte: nowS() + 60 } })).data).toEqual([])
    expect(deliveries).toEqual([])
  })

  it('are sent again when the shop does not take them, freshly signed', async () => {
    shopAnswers = [500]
    const session = await stripe.checkout.sessions.create(order())
    await stripe.checkout.sessions.expire(session.id)
    const [first, second] = await delivered('checkout.session.expired', 2)
    expect(second!.id).toBe(first!.id)
    expect(second!.headers['stripe-signature']).not.toBe(first!.headers['stripe-signature'])
  })

  it('keep the state of their moment', async () => {
    const { intent } = await bought()
    await stripe.refunds.create({ payment_intent: intent, amount: 1 })
    await stripe.refunds.create({ payment_intent: intent, amount: 1 })
    const { data } = await stripe.events.list({ type: 'charge.refunded' })
    expect(data.map(({ data: { object } }) => (object as Stripe.Charge).amount_refunded)).toEqual([2, 1])
  })

  it('wait in the list until the shop has taken them', async () => {
    await faults({ delayMs: 200 })
    const { id } = await stripe.checkout.sessions.create(order())
    await stripe.checkout.sessions.expire(id)
    const waiting = async () => (await stripe.events.list()).data.map((one) => one.pending_webhooks)
    expect(await waiting()).toEqual([1])
    await delivered('checkout.session.expired')
    await expect.poll(waiting).toEqual([0])
  })

  it('take no fault that is not one', async () => {
    expect((await faults({ deliver: 'sometimes' })).status).toBe(400)
    expect((await faults({ anything: 1 })).status).toBe(400)
  })
})

describe('memory', () => {
  let folder = ''
  beforeAll(async () => {
    folder = await mkdtemp(path.join(os.tmpdir(), 'felloe-pay-'))
  })
  afterAll(() => rm(folder, { recursive: true, force: true }))

  it('outlasts a restart: sessions, payments, replies and events', async () => {
    const file = path.join(folder, 'kept.json')
    const before = fakeAt(file)
    const first = client((await before.start()).port)
    const options = { idempotencyKey: randomUUID() }
    const session = await first.checkout.sessions.create(order(), options)
    await press(session, 'pay', Number(new URL(session.url!).port))
    await before.stop()

    const after = fakeAt(file)
    const second = client((await after.start()).port)
    try {
      expect((await second.checkout.sessions.retrieve(session.id)).payment_status).toBe('paid')
      expect((await second.checkout.sessions.create(order(), options)).id).toBe(session.id)
      expect((await second.events.list()).data.map(({ type }) => type)).toEqual([
        'checkout.session.completed',
        'payment_intent.succeeded',
      ])
    } finally {
      await after.stop()
    }
    expect(JSON.parse(await readFile(file, 'utf8')).sessions[session.id].paid).toBe(true)
  })

  /** A stand-in over `file` while `work` runs. */
  const during = async (file: string, work: (sdk: Stripe, atPort: number) => Promise<void>) => {
    const one = fakeAt(file)
    const { port: atPort } = await one.start()
    try {
      await work(client(atPort), atPort)
    } finally {
      await one.stop()
    }
  }
  const expired = async (sdk: Stripe) => {
    const { id } = await sdk.checkout.sessions.create(order())
    await sdk.checkout.sessions.expire(id)
  }

  it('sends an event that was under way again after a restart, and no more once it was taken', async () => {
    const file = path.join(folder, 'under-way.json')
    shopAnswers = [500]
    await during(file, async (sdk) => {
      await expired(sdk)
      await delivered('checkout.session.expired')
    })
    await during(file, async (sdk) => {
      const [first, second] = await delivered('checkout.session.expired', 2)
      expect(second!.id).toBe(first!.id)
      await expect.poll(async () => (await sdk.events.list()).data[0]?.pending_webhooks).toBe(0)
    })
    await during(file, async (sdk) => {
      // An event made now comes after whatever the start had sent.
      await expired(sdk)
      await delivered('checkout.session.expired', 3)
    })
    expect(new Set(deliveries.map(({ id }) => id)).size).toBe(2)
  })

  it('sends what was gathered for another order after a restart', async () => {
    const file = path.join(folder, 'gathered.json')
    await during(file, async (sdk, atPort) => {
      await faults({ shuffleMs: 60_000 }, atPort)
      await expired(sdk)
      await expired(sdk)
    })
    expect(deliveries).toEqual([])
    await during(file, async () => {
      const came = await delivered('checkout.session.expired', 2)
      expect(new Set(came.map(({ id }) => id)).size).toBe(2)
    })
  })

  it('does not send an event that was dropped after a restart', async () => {
    const file = path.join(folder, 'dropped.json')
    await during(file, async (sdk, atPort) => {
      await faults({ deliver: 'drop' }, atPort)
      await expired(sdk)
    })
    await during(file, async (sdk) => {
      expect((await sdk.events.list()).data).toHaveLength(1)
      await expired(sdk)
      const [one] = await delivered('checkout.session.expired')
      expect((await sdk.events.list()).data[0]?.id).toBe(one!.id)
    })
  })

  it.each([
    ['cut off in the middle', '{"sessions":{"cs_test_1":{"id":"cs_te'],
    ['of another kind', '{"sessions":{},"events":{}}'],
    ['a list', '[]'],
  ])('that cannot be read is put aside and told of, and the stand-in starts: %s', async (_words, text) => {
    const file = path.join(folder, 'damaged.json')
    await writeFile(file, text)
    const told = vi.spyOn(console, 'warn').mockReturnValue()
    try {
      await during(file, async (sdk) => {
        expect((await sdk.checkout.sessions.create(order())).status).toBe('open')
      })
      expect(told.mock.calls).toEqual([[expect.stringContaining(`the old file is now ${file}.unreadable.`)]])
    } finally {
      told.mockRestore()
    }
    expect(await readFile(`${file}.unreadable`, 'utf8')).toBe(text)
    expect(Object.keys(JSON.parse(await readFile(file, 'utf8')).sessions)).toHaveLength(1)
  })
})

describe('where it listens', () => {
  it.each([
    ['127.0.0.1', 'http://shop.example:4300', '127.0.0.1'],
    ['0.0.0.0', 'http://shop.example:4300', 'shop.example'],
    ['::', 'http://[::1]:4300', '[::1]'],
    ['::1', 'http://shop.example:4300', '[::1]'],
  ])('a browser names %s under %s as %s', (host, publicUrl, name) => {
    expect(reachableHost(host, publicUrl)).toBe(name)
  })

  it.each(['127.0.0.2', '0.0.0.0', 'localhost'])('the shop finds it on loopback beside %s', async (host) => {
    const one = createStripeFake({ ...optionsOf(null), host, payHost: 'shop.example' })
    const { port: atPort } = await one.start()
    try {
      const { url } = await client(atPort).checkout.sessions.create(order())
      expect(url).toContain(`http://shop.example:${atPort}/pay/`)
      expect((await fetch(`http://${host}:${atPort}/pay/cs_test_none`)).status).toBe(404)
    } finally {
      await one.stop()
    }
  })
})
