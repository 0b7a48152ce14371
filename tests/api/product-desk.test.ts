/** What keeps the product desk from landing a wrong cell: locks, counts, steps of price, limits in their time. */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { LimitRow, LimitVersionView, ProductWheelset } from '../../server/contract/product-desk.ts'
import { AuditRow } from '../../server/models/audit-row.ts'
import { Price } from '../../server/models/price.ts'
import { Stock } from '../../server/models/stock.ts'
import { Wheelset } from '../../server/models/wheelset.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { answers, tillOf, type Agent } from '../support/till.ts'

const sku = 'ROWAN-45-D'
const HOUR_MS = 3_600_000
let shop: TestApp
const till = tillOf(() => shop)
beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const read = async (desk: Agent) =>
  (await desk.get(`/api/product/wheelsets/${sku}`).expect(answers(200))).body as ProductWheelset
const change = (desk: Agent, body: object) =>
  desk.patch(`/api/product/wheelsets/${sku}`).send({ reason: 'the test changes it', ...body })

describe('a change of a wheelset', () => {
  it('by two people at once: one is saved, the other is told what stands there now', async () => {
    const [one, other] = [await shop.signedIn('product'), await shop.signedIn('product2')]
    const { version, prices } = await read(one)
    const eur = prices.EUR ?? 0
    const replies = await Promise.all([
      change(one, { version, prices: { EUR: eur + 100 } }),
      change(other, { version, prices: { EUR: eur + 200 } }),
    ])
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409])
    const lost = replies.find(({ status }) => status === 409)?.body as {
      code: string
      data: { present: ProductWheelset }
    }
    const saved = await read(one)
    expect(lost.code).toBe('changed-meanwhile')
    expect(lost.data.present).toEqual(saved)
    expect(saved.version).toBe(version + 1)
    expect(await AuditRow.count()).toBe(1)
  })

  it('that fails in one part leaves the other parts alone', async () => {
    const desk = await shop.signedIn('product')
    const before = await read(desk)
    const words = { tagline: 'A line of the test', description: 'Words of the test.' }
    const reply = await change(desk, {
      version: before.version,
      texts: { en: words },
      stock: { onHand: 9 },
      prices: { EUR: (before.prices.EUR ?? 0) * 2 },
    })
    expect(reply.body).toMatchObject({ status: 409, code: 'price-jump', data: { currency: 'EUR', percent: 100 } })
    expect(await read(desk)).toEqual(before)
    expect(await AuditRow.count()).toBe(0)
  })

  it('of a price adds a dated row, keeps the old one, and takes a jump that is meant', async () => {
    const desk = await shop.signedIn('product')
    const { version, prices } = await read(desk)
    const old = prices.EUR ?? 0
    const jump = { version, prices: { EUR: old * 2 }, confirmJump: true }
    await change(desk, jump).expect(answers(200))
    const { id } = await Wheelset.findOne({ where: { sku }, rejectOnEmpty: true })
    const rows = await Price.findAll({ where: { wheelsetId: id, currency: 'EUR' }, order: ['id'] })
    expect(rows.map(({ priceCents }) => priceCents)).toEqual([old, old * 2])
    const row = await AuditRow.findOne({ where: { subjectId: sku }, rejectOnEmpty: true })
    expect(row).toMatchObject({ before: { 'prices.EUR': old }, after: { 'prices.EUR': old * 2 }, actorRole: 'product' })
  })

  it('cannot count fewer pairs than are promised, nor overwrite a count that moved', async () => {
    const desk = await shop.signedIn('product')
    await till.setStock(sku, 5)
    const { id } = await Wheelset.findOne({ where: { sku }, rejectOnEmpty: true })
    await Stock.update({ reserved: 3 }, { where: { wheelsetId: id } })
    const { version } = await read(desk)
    const few = await change(desk, { version, stock: { onHand: 2 } })
    expect(few.body).toMatchObject({ status: 409, code: 'stock-below-reserved', data: { reserved: 3 } })
    const moved = await change(desk, { version, stock: { onHand: 8, onHandSeen: 6 } })
    expect(moved.body).toMatchObject({ status: 409, code: 'changed-meanwhile' })
    await change(desk, { version, stock: { onHand: 3, onHandSeen: 5 } }).expect(answers(200))
  })

  it('that changes nothing makes no version and no audit row', async () => {
    const desk = await shop.signedIn('product')
    const { version, prices, onSale, texts } = await read(desk)
    await change(desk, { version, prices, onSale, texts }).expect(answers(200))
    expect((await read(desk)).version).toBe(version)
    expect(await AuditRow.count()).toBe(0)
  })

  it('with a misspelt field is refused by name', async () => {
    const desk = await shop.signedIn('product')
    const { version } = await read(desk)
    const reply = await change(desk, { version, stock: { onhand: 3 } }).expect(answers(400))
    expect((reply.body as { errors: { path: string }[] }).errors.map(({ path }) => path)).toContain('stock.onhand')
  })

  it('off sale takes it out of the range at once', async () => {
    const desk = await shop.signedIn('product')
    const { version, slug } = await read(desk)
    await shop.agent().get(`/api/wheelsets/${slug}`).expect(answers(200))
    await change(desk, { version, onSale: false }).expect(answers(200))
    await shop.agent().get(`/api/wheelsets/${slug}`).expect(answers(404))
  })
})

describe('a limit change', () => {
  const draft = async (desk: Agent, body: object) =>
    (
      await desk
        .post('/api/product/limit-changes')
        .send({ sku, proof: 'bench report of the test', reason: 'drafted by the test', ...body })
        .expect(answers(201))
    ).body as LimitVersionView
  const decide = (desk: Agent, id: number, what: 'approve' | 'reject') =>
    desk.post(`/api/product/limit-changes/${id}/${what}`).send({ reason: 'decided by the test' })
  const row = async (desk: Agent) => {
    const { items } = (await desk.get('/api/product/limits').expect(answers(200))).body as { items: LimitRow[] }
    const found = items.find((one) => one.sku === sku)
    if (!found) throw new Error('the range has this wheelset')
    return found
  }

  it('seconded for a later time counts from that time on', async () => {
    const [author, second] = [await shop.signedIn('product'), await shop.signedIn('product2')]
    const now = (await row(author)).current?.limitKg ?? 0
    const inForceFrom = new Date(shop.deps.clock().getTime() + HOUR_MS).toISOString()
    const { id } = await draft(author, { limitKg: now - 15, inForceFrom })
    expect((await row(author)).current?.limitKg).toBe(now)
    await decide(second, id, 'approve').expect(answers(200))
    const waiting = await row(author)
    expect(waiting.current?.limitKg).toBe(now)
    expect(waiting.versions.map(({ standing }) => standing)).toEqual(['seconded', 'in-force'])
    shop.passTime(HOUR_MS + 1000)
    const due = await row(author)
    expect(due.current?.limitKg).toBe(now - 15)
    expect(due.versions.map(({ standing }) => standing)).toEqual(['in-force', 'replaced'])
  })

  it('is decided once, whoever is quicker', async () => {
    const [author, second, admin] = [
      await shop.signedIn('product'),
      await shop.signedIn('product2'),
      await shop.signedIn('admin'),
    ]
    const { id } = await draft(author, { limitKg: 90 })
    const replies = await Promise.all([decide(second, id, 'approve'), decide(admin, id, 'approve')])
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409])
    expect((await decide(second, id, 'reject')).body).toMatchObject({ code: 'limit-change-closed' })
    expect(await AuditRow.count({ where: { action: 'limit-change.seconded' } })).toBe(1)
  })

  it('drafted as a lowering needs its proof once a lower limit has come between', async () => {
    const [author, second] = [await shop.signedIn('product'), await shop.signedIn('product2')]
    const bare = await draft(author, { limitKg: 110, proof: '' })
    const lower = await draft(author, { limitKg: 95 })
    await decide(second, lower.id, 'approve').expect(answers(200))
    const reply = await decide(second, bare.id, 'approve').expect(answers(400))
    expect((reply.body as { errors: { path: string; code: string }[] }).errors[0]).toMatchObject({
      path: 'proof',
      code: 'proof-needed',
    })
    expect((await row(author)).current?.limitKg).toBe(95)
  })

  it('taken back by its author is closed', async () => {
    const author = await shop.signedIn('product')
    const { id } = await draft(author, { limitKg: 90 })
    await decide(author, id, 'reject').expect(answers(200))
    expect((await row(author)).versions[0]?.standing).toBe('rejected')
  })

  it('shows whose frozen totals are above it: kilograms and order numbers, no names', async () => {
    const author = await shop.signedIn('product')
    const order = await till.paid(90)
    const set = await Wheelset.findOne({ where: { sku: order.sku }, rejectOnEmpty: true })
    const { id } = await draft(author, { sku: set.sku, limitKg: 80 })
    const { body } = await author.get(`/api/product/limit-changes/${id}/impact`).expect(answers(200))
    expect(body).toMatchObject({ newKg: 80, openBaskets: 0, unpaidOrders: 0, placedOrders: 1, deliveredOrders: 0 })
    const [over] = (body as { over: { orderNumber: string; overKg: number }[] }).over
    // 90 kg of rider and something for bike and kit, so more than 10 kg above 80
    expect(over?.orderNumber).toBe(order.orderNumber)
    expect(over?.overKg).toBeGreaterThan(10)
    expect(JSON.stringify(body)).not.toContain('Rider of the Test')
  })
})
