/** Steps at the till that several tests take: a fitting, a filled basket, an order, a payment on the stand-in's own page. */
import { randomUUID } from 'node:crypto'
import type { BasketView } from '../../server/contract/basket.ts'
import type { OrderView } from '../../server/contract/checkout.ts'
import type { Faults } from '../../server/fakes/stripe/control.ts'
import { LedgerEntry } from '../../server/models/ledger-entry.ts'
import { Order } from '../../server/models/order.ts'
import { Stock } from '../../server/models/stock.ts'
import { Wheelset } from '../../server/models/wheelset.ts'
import type { TestApp } from './test-app.ts'

export type Agent = ReturnType<TestApp['agent']>
export interface AdviceReply {
  wheelsets: { sku: string; verdict: string; limitKg: number; rank: number | null }[]
  systemMassKg: number
}
export interface PlacedReply {
  orderNumber: string
  payUrl: string
  orderUrl: string
}

/** Like supertest's own check of a status, but says what the server said. */
export const answers = (status: number) => (reply: { status: number; body: unknown }) => {
  if (reply.status !== status) throw new Error(`${reply.status} ${JSON.stringify(reply.body)}`)
}

export const rider = (bodyMassKg: number) => ({
  ride: 'road-long',
  bodyMassKg,
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
})

export const address = {
  name: 'Rider of the Test',
  line1: 'Rua Inventada 1',
  postcode: '3800-000',
  city: 'Aveiro',
  country: 'PT',
}

/** The API's path behind a link to an order: `/api/orders/F26-…/cancel?key=…`. */
export const pathOf = (orderUrl: string, what = '') => {
  const url = new URL(orderUrl)
  return `/api${url.pathname}${what}${url.search}`
}

export async function until(done: () => Promise<boolean>) {
  for (let tries = 0; tries < 200; tries += 1) {
    if (await done()) return
    await new Promise((resolve) => setTimeout(resolve, 25))
  }
  throw new Error('it did not come about')
}

export function tillOf(shop: () => TestApp) {
  const fitting = async (agent: Agent, bodyMassKg = 75, more: object = {}) => {
    const { body } = await agent
      .post('/api/advice-snapshots')
      .send({ ...rider(bodyMassKg), ...more })
      .expect(answers(201))
    return (body as { adviceId: string }).adviceId
  }

  /** The best-ranked wheelset for this rider that can be had. */
  const firstChoice = async (agent: Agent, bodyMassKg = 75) => {
    const { body } = await agent.post('/api/advice').send(rider(bodyMassKg)).expect(answers(200))
    const stocked = new Set((await Stock.findAll()).filter(({ onHand }) => onHand > 0).map((one) => one.wheelsetId))
    const sets = new Map((await Wheelset.findAll()).map(({ sku, id }) => [sku, id]))
    const offer = (body as AdviceReply).wheelsets.find(
      ({ rank, sku }) => rank !== null && stocked.has(sets.get(sku) ?? 0),
    )
    if (!offer) throw new Error('no wheelset on offer')
    return offer.sku
  }

  const put = async (agent: Agent, lines: object[], market = { market: 'PT', currency: 'EUR' }) => {
    const { body } = await agent
      .put('/api/basket')
      .send({ ...market, lines })
      .expect(answers(200))
    return body as BasketView
  }

  /** Puts the line in with every open choice made from what the hub offers. */
  const fill = async (agent: Agent, sku: string, adviceId?: string, quantity = 1) => {
    const line = { sku, quantity, ...(adviceId ? { adviceId } : {}) }
    const first = await put(agent, [{ ...line, options: {} }])
    const choices = Object.entries(first.lines[0]?.optionChoices ?? {})
    const options = Object.fromEntries(choices.flatMap(([name, [choice]]) => (choice ? [[name, choice]] : [])))
    return put(agent, [{ ...line, options }])
  }

  const orderIt = (agent: Agent, basketId: string | null, more: object = {}, key: string = randomUUID()) =>
    agent
      .post('/api/orders')
      .set('Idempotency-Key', key)
      .send({ basketId, email: 'rider@mail.example', delivery: address, ...more })

  /** A rider's own choice, fitted, filled and ordered; not paid. */
  const bought = async (bodyMassKg = 75) => {
    const agent = shop().agent()
    const sku = await firstChoice(agent, bodyMassKg)
    const basket = await fill(agent, sku, await fitting(agent, bodyMassKg))
    const { body } = await orderIt(agent, basket.basketId).expect(answers(201))
    return { agent, sku, basket, ...(body as PlacedReply) }
  }

  const payOn = (payUrl: string) => fetch(`${payUrl}/pay`, { method: 'POST', redirect: 'manual' })

  const orderOf = (number: string) => Order.findOne({ where: { number }, rejectOnEmpty: true })
  const state = async (number: string) => (await orderOf(number)).state

  return {
    ...{ fitting, firstChoice, put, fill, orderIt, bought, payOn, orderOf, state },

    /** Bought, paid, and placed by the event. */
    paid: async (bodyMassKg = 75) => {
      const order = await bought(bodyMassKg)
      await payOn(order.payUrl)
      await until(async () => (await state(order.orderNumber)) !== 'holding')
      return order
    },

    stockOf: async (sku: string) => {
      const set = await Wheelset.findOne({ where: { sku }, rejectOnEmpty: true })
      const { onHand, reserved } = await Stock.findByPk(set.id, { rejectOnEmpty: true })
      return { id: set.id, onHand, reserved }
    },

    setStock: async (sku: string, onHand: number) => {
      const set = await Wheelset.findOne({ where: { sku }, rejectOnEmpty: true })
      await Stock.update({ onHand, reserved: 0 }, { where: { wheelsetId: set.id } })
    },

    /** Sets the stand-in's faults while `work` runs. */
    faults: async <T>(wanted: Partial<Faults>, work: () => Promise<T>): Promise<T> => {
      const set = (faults: Partial<Faults>) =>
        fetch(`${shop().stripeUrl}/control/faults`, {
          method: 'POST',
          headers: { 'Content-Type': 'application/json' },
          body: JSON.stringify(faults),
        })
      await set(wanted)
      try {
        return await work()
      } finally {
        await set({ deliver: 'normal', delayMs: 0, wrongSignature: false, loseReply: false })
      }
    },

    /** A limit in force from now on, as the product desk would leave it. */
    lowerLimit: async (sku: string, limitKg: number) => {
      const set = await Wheelset.findOne({ where: { sku }, rejectOnEmpty: true })
      await shop().deps.db.query(
        `INSERT INTO limit_versions (wheelset_id, limit_kg, proof, reason, state, in_force_from)
         VALUES (:id, :limitKg, 'a proof of the test', 'lowered by the test', 'in-force', :now)`,
        { replacements: { id: set.id, limitKg, now: shop().deps.clock() } },
      )
    },

    see: async (agent: Agent, orderUrl: string) =>
      (await agent.get(pathOf(orderUrl)).expect(answers(200))).body as OrderView,

    /** Sum of an order's ledger, in cents. */
    ledger: async (number: string) => {
      const { id } = await orderOf(number)
      return (await LedgerEntry.findAll({ where: { orderId: id } })).map(({ kind, amountCents }) => ({
        kind,
        amountCents,
      }))
    },
  }
}
