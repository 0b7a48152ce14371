/** What staff do: find an order, see its frozen advice, refund it; change a wheelset; draft and second a limit. Each write leaves its audit row. */
import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { AuditRow } from '../../server/models/audit-row.ts'
import { Order } from '../../server/models/order.ts'
import { testApp, type TestApp } from '../support/test-app.ts'

let shop: TestApp
beforeAll(async () => {
  shop = await testApp({ seed: true })
}, 60_000)
afterAll(() => shop.close())

const found = (body: unknown) =>
  (body as { items: { orderNumber: string }[] }).items.map(({ orderNumber }) => orderNumber)

describe('the support desk', () => {
  it('finds an order by number, name, e-mail and postcode', async () => {
    const desk = await shop.signedIn('support')
    const order = await Order.findOne({ where: { number: 'F26-000123' }, rejectOnEmpty: true })
    for (const q of [order.number, order.name, order.email, order.postcode]) {
      const { body } = await desk.get('/api/desk/orders').query({ q }).expect(200)
      expect(found(body), q).toContain(order.number)
    }
    expect(found((await desk.get('/api/desk/orders').query({ q: 'nobody of this name' }).expect(200)).body)).toEqual([])
  })

  it('pages through all orders, newest first, each once', async () => {
    const desk = await shop.signedIn('support')
    const seen: string[] = []
    let cursor: string | null = null
    do {
      const page: { body: unknown } = await desk
        .get('/api/desk/orders')
        .query({ limit: 90, ...(cursor === null ? {} : { cursor }) })
        .expect(200)
      seen.push(...found(page.body))
      cursor = (page.body as { nextCursor: string | null }).nextCursor
    } while (cursor !== null)
    expect(new Set(seen).size).toBe(400)
    expect(seen).toHaveLength(400)
  })

  it('shows the frozen advice without the body mass, which takes a reason that is kept', async () => {
    const desk = await shop.signedIn('support')
    const order = await Order.findOne({ where: { number: 'F26-000390' }, rejectOnEmpty: true })
    const hidden = await desk.get(`/api/desk/orders/${order.number}`).expect(200)
    expect(JSON.stringify(hidden.body)).not.toContain('"bodyMassKg":')
    await desk.post(`/api/desk/orders/${order.number}/reveal-mass`).send({ reason: 'no' }).expect(400)
    const before = await AuditRow.count()
    const shown = await desk
      .post(`/api/desk/orders/${order.number}/reveal-mass`)
      .send({ reason: 'asked by the rider on the telephone' })
      .expect(200)
    expect(JSON.stringify(shown.body)).toContain('bodyMassKg')
    const row = await AuditRow.findOne({ order: [['id', 'DESC']], rejectOnEmpty: true })
    expect(await AuditRow.count()).toBe(before + 1)
    expect(row).toMatchObject({ action: 'order.mass-revealed', subjectId: order.number, actorRole: 'support' })
    expect(JSON.stringify(row)).not.toContain('bodyMassKg')
  })
})

describe('the product desk', () => {
  const sku = 'ROWAN-45-D'
  const one = async (desk: Awaited<ReturnType<TestApp['signedIn']>>) =>
    (await desk.get(`/api/product/wheelsets/${sku}`).expect(200)).body as {
      version: number
      prices: { EUR: number }
      onHand: number
      reserved: number
    }

  it('changes words, price and stock in one step with one audit row, and refuses an edit made on an older version', async () => {
    const desk = await shop.signedIn('product')
    const { version, prices, onHand } = await one(desk)
    const rows = await AuditRow.count()
    const change = {
      version,
      reason: 'spring round of prices',
      prices: { EUR: prices.EUR + 1000 },
      stock: { onHand: onHand + 2 },
      texts: { pt: { tagline: 'Uma frase do teste', description: 'Descrição do teste.' } },
    }
    await desk.patch(`/api/product/wheelsets/${sku}`).send(change).expect(200)
    expect(await AuditRow.count()).toBe(rows + 1)
    const after = await one(desk)
    expect(after).toMatchObject({ prices: { EUR: prices.EUR + 1000 }, onHand: onHand + 2 })
    const shown = await shop.agent().get('/api/wheelsets/rowan-45-disc?lng=pt').expect(200)
    expect(shown.body).toMatchObject({ tagline: 'Uma frase do teste', prices: { EUR: prices.EUR + 1000 } })
    const stale = await desk.patch(`/api/product/wheelsets/${sku}`).send(change).expect(409)
    expect(stale.body).toMatchObject({ code: 'changed-meanwhile' })
  })

  it('asks about a price that jumps by more than a fifth, and wants a reason', async () => {
    const desk = await shop.signedIn('product')
    const { version, prices } = await one(desk)
    const jump = { version, reason: 'a slip of the hand', prices: { EUR: Math.round(prices.EUR * 1.5) } }
    expect((await desk.patch(`/api/product/wheelsets/${sku}`).send(jump)).body).toMatchObject({ code: 'price-jump' })
    await desk.patch(`/api/product/wheelsets/${sku}`).send({ version, reason: '', onSale: true }).expect(400)
    expect((await one(desk)).version).toBe(version)
  })

  it('a limit change is drafted by one person and seconded by another; then it counts from the next call on', async () => {
    const [author, second] = [await shop.signedIn('product'), await shop.signedIn('product2')]
    const draft = await author.post('/api/product/limit-changes').send({
      sku,
      limitKg: 100,
      proof: 'bench report of the test, side load',
      reason: 'crack found at the test bench',
    })
    expect(draft.status).toBe(201)
    const { id } = draft.body as { id: number }
    const limit = async () =>
      ((await shop.agent().get('/api/wheelsets/rowan-45-disc')).body as { limitKg: number }).limitKg
    expect(await limit()).toBe(120)
    const own = await author.post(`/api/product/limit-changes/${id}/approve`).send({ reason: 'my own change' })
    expect(own.body).toMatchObject({ status: 403, code: 'own-change' })
    await second.get(`/api/product/limit-changes/${id}/impact`).expect(200)
    await second.post(`/api/product/limit-changes/${id}/approve`).send({ reason: 'report read, agreed' }).expect(200)
    expect(await limit()).toBe(100)
    const actions = (await AuditRow.findAll({ where: { subjectType: 'limit-change' }, order: ['id'] })).map(
      ({ action }) => action,
    )
    expect(actions).toEqual(['limit-change.drafted', 'limit-change.seconded'])
  })

  it('an administrator cannot second a change of their own either', async () => {
    const admin = await shop.signedIn('admin')
    const draft = await admin
      .post('/api/product/limit-changes')
      .send({ sku: 'ROWAN-60-D', limitKg: 90, proof: 'bench report of the test', reason: 'lowered for the test' })
      .expect(201)
    const reply = await admin
      .post(`/api/product/limit-changes/${(draft.body as { id: number }).id}/approve`)
      .send({ reason: 'my own change' })
    expect(reply.body).toMatchObject({ code: 'own-change' })
  })

  it('a limit out of bounds, or a raise without proof, names its field', async () => {
    const desk = await shop.signedIn('product')
    const far = await desk
      .post('/api/product/limit-changes')
      .send({ sku, limitKg: 900, proof: 'bench report of the test', reason: 'out of bounds' })
      .expect(400)
    expect((far.body as { errors: { path: string }[] }).errors[0]?.path).toBe('limitKg')
    const bare = await desk
      .post('/api/product/limit-changes')
      .send({ sku, limitKg: 140, proof: '-', reason: 'raised without proof' })
    expect(bare.status).toBe(400)
  })
})

it('two clicks on refund at once never give back more than was taken', async () => {
  const desk = await shop.signedIn('support')
  const rider = shop.agent()
  const answers = {
    ride: 'road-long',
    bodyMassKg: 75,
    brakes: 'disc',
    tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
  }
  const { adviceId } = (await rider.post('/api/advice-snapshots').send(answers).expect(201)).body as {
    adviceId: string
  }
  const line = { sku: 'ROWAN-35-D', quantity: 1, adviceId }
  const put = (options: object) =>
    rider
      .put('/api/basket')
      .send({ market: 'PT', currency: 'EUR', lines: [{ ...line, options }] })
      .expect(200)
  const { optionChoices } = ((await put({})).body as { lines: { optionChoices: Record<string, string[]> }[] })
    .lines[0] ?? { optionChoices: {} }
  const basket = (
    await put(
      Object.fromEntries(Object.entries(optionChoices).flatMap(([name, [choice]]) => (choice ? [[name, choice]] : []))),
    )
  ).body as { basketId: string; totalCents: number }
  const delivery = {
    name: 'Rider of the Test',
    line1: 'Rua Inventada 1',
    postcode: '3800-000',
    city: 'Aveiro',
    country: 'PT',
  }
  const placed = await rider
    .post('/api/orders')
    .set('Idempotency-Key', randomUUID())
    .send({ basketId: basket.basketId, email: 'rider@mail.example', delivery })
  expect(placed.status, JSON.stringify(placed.body)).toBe(201)
  const { orderNumber, payUrl, orderUrl } = placed.body as { orderNumber: string; payUrl: string; orderUrl: string }
  await fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })
  const { pathname, search } = new URL(orderUrl)
  await rider.post(`/api${pathname}/refresh${search}`).expect(200)

  const refund = () =>
    desk
      .post(`/api/desk/orders/${orderNumber}/refunds`)
      .set('Idempotency-Key', randomUUID())
      .send({ amountCents: basket.totalCents, reason: 'changed their mind' })
  const replies = await Promise.all([refund(), refund()])
  expect(replies.map(({ status }) => status).sort()).toEqual([201, 409])
  const { body } = await desk.get(`/api/orders/${orderNumber}`).expect(200)
  expect(body).toMatchObject({
    state: 'dropped',
    money: { takenCents: basket.totalCents, refundedCents: basket.totalCents },
  })
  expect(await AuditRow.count({ where: { action: 'order.refunded' } })).toBe(1)
})
