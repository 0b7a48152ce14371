/** Stock that cannot be sold twice, whoever asks at the same moment. */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { dropOrder } from '../../server/features/checkout/drop-order.ts'
import { putBack, release, reserve, takeOut } from '../../server/features/checkout/stock.ts'
import { inTransaction } from '../../server/db.ts'
import { Order } from '../../server/models/order.ts'
import { Stock } from '../../server/models/stock.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { answers, rider, tillOf, type AdviceReply, type PlacedReply } from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
const { fitting, firstChoice, fill, orderIt, stockOf, setStock } = till

beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const shopperFor = async (sku: string, quantity = 1) => {
  const agent = shop.agent()
  const { basketId } = await fill(agent, sku, await fitting(agent), quantity)
  return { agent, basketId }
}
const ranked = async (count: number) => {
  const { body } = await shop.agent().post('/api/advice').send(rider(75)).expect(answers(200))
  return (body as AdviceReply).wheelsets
    .filter(({ rank }) => rank !== null)
    .slice(0, count)
    .map(({ sku }) => sku)
}

describe('the last pair', () => {
  it('sixty shoppers at once: one order, fifty-nine polite refusals that name it, every basket kept', async () => {
    const sku = await firstChoice(shop.agent())
    await setStock(sku, 1)
    const shoppers = await Promise.all(Array.from({ length: 60 }, () => shopperFor(sku)))
    const replies = await Promise.all(shoppers.map(({ agent, basketId }) => orderIt(agent, basketId)))
    expect(replies.filter(({ status }) => status === 201)).toHaveLength(1)
    const refused = replies.filter(({ status }) => status === 409).map(({ body }) => body as { code: string })
    expect(refused).toHaveLength(59)
    expect(new Set(refused.map(({ code }) => code))).toEqual(new Set(['sold-out']))
    expect(await stockOf(sku)).toMatchObject({ onHand: 1, reserved: 1 })
    expect(await Order.count()).toBe(1)
    const loser = shoppers[replies.findIndex(({ status }) => status === 409)]
    const { body } = await (loser?.agent ?? shop.agent()).get('/api/basket').expect(200)
    expect(body).toMatchObject({ canOrder: false, lines: [{ sku, problems: [{ code: 'sold-out' }] }] })
  }, 60_000)

  it('one shopper in two tabs gets one order', async () => {
    const sku = await firstChoice(shop.agent())
    await setStock(sku, 5)
    const { agent, basketId } = await shopperFor(sku)
    const replies = await Promise.all([orderIt(agent, basketId), orderIt(agent, basketId)])
    const numbers = replies.filter(({ status }) => status === 201).map(({ body }) => (body as PlacedReply).orderNumber)
    expect(new Set(numbers).size).toBe(1)
    expect((await stockOf(sku)).reserved).toBe(1)
  })

  it('more than there are is refused before anything is held', async () => {
    const sku = await firstChoice(shop.agent())
    await setStock(sku, 2)
    const { agent, basketId } = await shopperFor(sku, 3)
    expect((await orderIt(agent, basketId)).body).toMatchObject({ code: 'sold-out', data: { available: 2 } })
    expect((await stockOf(sku)).reserved).toBe(0)
  })
})

it('twenty-four shoppers for eight wheelsets at once: every one is served, numbers are all different', async () => {
  const skus = await ranked(8)
  for (const sku of skus) await setStock(sku, 3)
  const shoppers = await Promise.all([...skus, ...skus, ...skus].map((sku) => shopperFor(sku)))
  const replies = await Promise.all(
    shoppers.map(({ agent, basketId }) => orderIt(agent, basketId).expect(answers(201))),
  )
  expect(new Set(replies.map(({ body }) => (body as PlacedReply).orderNumber)).size).toBe(24)
  const rows = await Stock.findAll()
  expect(rows.reduce((sum, { reserved }) => sum + reserved, 0)).toBe(24)
}, 60_000)

describe('the moves', () => {
  const rowsOf = async (skus: readonly string[]) =>
    Promise.all(skus.map(async (sku) => ({ wheelsetId: (await stockOf(sku)).id, quantity: 1 })))

  it('reserve is all or nothing, inside a transaction that goes on', async () => {
    const skus = await ranked(3)
    for (const sku of skus) await setStock(sku, 1)
    const wants = await rowsOf(skus)
    const last = [...wants].sort((a, b) => a.wheelsetId - b.wheelsetId).at(-1)
    await Stock.update({ onHand: 0 }, { where: { wheelsetId: last?.wheelsetId } })
    const missing = await inTransaction(shop.deps.db, (transaction) => reserve(shop.deps.db, wants, transaction))
    expect(missing).toEqual(last)
    expect((await Stock.findAll()).every(({ reserved }) => reserved === 0)).toBe(true)
  })

  it('reserve, release, sell and put back keep the count; what is not held cannot be let go or sold', async () => {
    const [sku = ''] = await ranked(1)
    await setStock(sku, 2)
    const wants = await rowsOf([sku])
    const { db } = shop.deps
    const now = () => stockOf(sku)
    await inTransaction(db, (transaction) => reserve(db, wants, transaction))
    expect(await now()).toMatchObject({ onHand: 2, reserved: 1 })
    await inTransaction(db, (transaction) => release(db, wants, transaction))
    expect(await now()).toMatchObject({ onHand: 2, reserved: 0 })
    await expect(inTransaction(db, (transaction) => release(db, wants, transaction))).rejects.toThrow()
    expect(await inTransaction(db, (transaction) => takeOut(db, wants, transaction))).toBe(false)
    await inTransaction(db, (transaction) => reserve(db, wants, transaction))
    expect(await inTransaction(db, (transaction) => takeOut(db, wants, transaction))).toBe(true)
    expect(await now()).toMatchObject({ onHand: 1, reserved: 0 })
    await inTransaction(db, (transaction) => putBack(db, wants, transaction))
    expect(await now()).toMatchObject({ onHand: 2, reserved: 0 })
  })

  it('the database itself refuses a count below nothing or below what is held', async () => {
    const [sku = ''] = await ranked(1)
    const { id } = await stockOf(sku)
    await expect(Stock.update({ onHand: -1 }, { where: { wheelsetId: id } })).rejects.toThrow()
    await setStock(sku, 1)
    await expect(Stock.update({ reserved: 2 }, { where: { wheelsetId: id } })).rejects.toThrow()
  })
})

it('a hold dropped by event, sweeper and buyer at once is let go once', async () => {
  const { orderNumber, sku } = await till.bought()
  const { id } = await till.orderOf(orderNumber)
  const { reserved } = await stockOf(sku)
  const dropped = await Promise.all(
    Array.from({ length: 8 }, (_, count) => dropOrder(shop.deps, id, count % 2 === 0 ? 'lapsed' : 'dropped')),
  )
  expect(dropped.filter(Boolean)).toHaveLength(1)
  expect((await stockOf(sku)).reserved).toBe(reserved - 1)
})
