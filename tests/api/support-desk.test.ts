/** Refunds of whole lines from the desk, and what the desk is not shown unasked. */
import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { DeskOrder } from '../../server/contract/support-desk.ts'
import { AuditRow } from '../../server/models/audit-row.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { answers, tillOf, until, type Agent, type PlacedReply } from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())

/** A paid order of two lines: two pairs of the first choice's options, each line another wheelset. */
async function twoLines() {
  const agent = shop.agent()
  const adviceId = await till.fitting(agent)
  const skus = ['ROWAN-45-D', 'ROWAN-35-D']
  const lines = []
  for (const sku of skus) {
    await till.setStock(sku, 5)
    const { lines: filled } = await till.fill(agent, sku, adviceId)
    lines.push({ sku, quantity: 1, adviceId, options: filled[0]?.options })
  }
  const basket = await till.put(agent, lines)
  const placed = (await till.orderIt(agent, basket.basketId).expect(answers(201))).body as PlacedReply
  await till.payOn(placed.payUrl)
  await until(async () => (await till.state(placed.orderNumber)) !== 'holding')
  return placed.orderNumber
}

const read = async (desk: Agent, number: string) =>
  (await desk.get(`/api/desk/orders/${number}`).expect(answers(200))).body as DeskOrder
const refund = (desk: Agent, number: string, body: object) =>
  desk
    .post(`/api/desk/orders/${number}/refunds`)
    .set('Idempotency-Key', randomUUID())
    .send({ reason: 'the test asks for it', ...body })

describe('a refund of whole lines', () => {
  it('gives back each line once; the last one brings the delivery charge, and then nothing is left', async () => {
    const desk = await shop.signedIn('support')
    const number = await twoLines()
    const before = await read(desk, number)
    const [first, second] = before.lines
    if (!first || !second) throw new Error('two lines were ordered')
    expect(before.money.leftToRefundCents).toBe(before.money.totalCents)

    await refund(desk, number, { lines: [first.id] }).expect(answers(201))
    const between = await read(desk, number)
    expect(between.money.leftToRefundCents).toBe(before.money.totalCents - first.lineCents)
    expect(between.lines.map(({ refunded }) => refunded)).toEqual([true, false])

    const again = await refund(desk, number, { lines: [first.id] })
    expect(again.body).toMatchObject({ status: 409, code: 'line-refunded' })

    const last = await refund(desk, number, { lines: [second.id] }).expect(answers(201))
    expect(last.body).toMatchObject({
      amountCents: second.lineCents + before.money.deliveryCents,
      leftToRefundCents: 0,
    })
    expect(await till.state(number)).toBe('dropped')
    const rows = await AuditRow.findAll({ where: { action: 'order.refunded', subjectId: number }, order: ['id'] })
    expect(rows.map(({ after }) => after?.lines)).toEqual([[first.id], [second.id]])
  })

  it('asked for by two people at once is given once', async () => {
    const [one, other] = [await shop.signedIn('support'), await shop.signedIn('admin')]
    const number = await twoLines()
    const line = (await read(one, number)).lines[0]
    const replies = await Promise.all([one, other].map((desk) => refund(desk, number, { lines: [line?.id] })))
    expect(replies.map(({ status }) => status).sort()).toEqual([201, 409])
    const { money } = await read(one, number)
    expect(money.refundedCents).toBe(line?.lineCents)
  })

  it('refuses lines of another order, and lines together with an amount', async () => {
    const desk = await shop.signedIn('support')
    const [mine, theirs] = [await twoLines(), await twoLines()]
    const foreign = (await read(desk, theirs)).lines[0]?.id
    expect((await refund(desk, mine, { lines: [foreign] })).body).toMatchObject({ status: 409, code: 'no-such-line' })
    const both = await refund(desk, mine, { lines: [foreign], amountCents: 100 }).expect(answers(400))
    expect((both.body as { errors: { code: string }[] }).errors[0]?.code).toBe('lines-or-amount')
    await desk
      .post(`/api/desk/orders/${mine}/refunds`)
      .send({ amountCents: 100, reason: 'no key with this one' })
      .expect(answers(400))
    expect((await read(desk, mine)).money.refundedCents).toBe(0)
  })
})

it('frozen advice gives no figure from which the body mass could be worked out, and shows that it is unchanged', async () => {
  const desk = await shop.signedIn('support')
  const { orderNumber } = await till.paid(77)
  const { advice } = await read(desk, orderNumber)
  expect(advice).toHaveLength(1)
  const [frozen] = advice
  expect(frozen).toMatchObject({ intact: true, withheld: ['bodyMassKg'], systemMassKg: null })
  expect(frozen?.answers).not.toHaveProperty('bodyMassKg')
  expect(frozen?.wheelsets.map(({ marginKg }) => marginKg)).toEqual([null])
  expect(frozen?.reasons.length).toBeGreaterThan(0)
  expect(frozen?.reasons.every(({ inputs }) => inputs === null)).toBe(true)
  const shown = await desk
    .post(`/api/desk/orders/${orderNumber}/reveal-mass`)
    .send({ reason: 'the rider asked what we had written down' })
    .expect(answers(200))
  expect((shown.body as DeskOrder).advice[0]?.answers).toMatchObject({ bodyMassKg: 77 })
})

it('a note stands in the timeline and in the audit; one too short to say anything is refused', async () => {
  const desk = await shop.signedIn('support')
  const { orderNumber } = await till.paid()
  await desk.post(`/api/desk/orders/${orderNumber}/notes`).send({ text: 'ok' }).expect(answers(400))
  const text = 'Rider telephones on Friday about the axle.'
  await desk.post(`/api/desk/orders/${orderNumber}/notes`).send({ text }).expect(answers(201))
  const { timeline } = await read(desk, orderNumber)
  expect(timeline.at(-1)).toMatchObject({ kind: 'note', reason: text, actorRole: 'support' })
  expect(await AuditRow.count({ where: { action: 'order.noted', subjectId: orderNumber, reason: text } })).toBe(1)
})
