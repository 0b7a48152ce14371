/** The basket: priced by the server, judged from the kept fitting, held to it by every sequence of calls. */
import fc from 'fast-check'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { BasketView } from '../../server/contract/basket.ts'
import { priceBasket, taxInside } from '../../server/features/basket/pricing.ts'
import { Order } from '../../server/models/order.ts'
import { OrderLine } from '../../server/models/order-line.ts'
import { Wheelset } from '../../server/models/wheelset.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import {
  answers,
  pathOf,
  rider,
  tillOf,
  until,
  type AdviceReply,
  type Agent,
  type PlacedReply,
} from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
const { fitting, firstChoice, put, fill, orderIt, bought, payOn, state } = till

beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const adviceFor = async (bodyMassKg: number, more: object = {}) =>
  (
    await shop
      .agent()
      .post('/api/advice')
      .send({ ...rider(bodyMassKg), ...more })
      .expect(answers(200))
  ).body as AdviceReply
const refuses = async (agent: Agent, request: object, path: string, code: string) => {
  const { status, body } = await agent.put('/api/basket').send({ market: 'PT', currency: 'EUR', lines: [], ...request })
  expect(status).toBe(400)
  expect((body as { errors: object[] }).errors).toContainEqual(expect.objectContaining({ path, code }))
}
const codes = (view: BasketView, line = 0) => view.lines[line]?.problems.map(({ code }) => code)

describe('prices', () => {
  it('tax inside a price, by hand: 23 % of 100.00 is 23.00, so 123.00 holds 23.00; 20 % in 0.03 is half a cent up', () => {
    expect(taxInside(12_300, 2300)).toBe(2300)
    expect(taxInside(3, 2000)).toBe(1)
    expect(taxInside(99_900, 0)).toBe(0)
  })

  it('the parts add up to the total and each tax is within half a cent of its share, for any basket', () => {
    const line = fc.record({
      unitCents: fc.integer({ min: 1, max: 900_000 }),
      quantity: fc.integer({ min: 1, max: 5 }),
    })
    const tariff = fc.record({
      currency: fc.constantFrom('EUR' as const, 'GBP' as const, 'USD' as const),
      vatPercentBp: fc.integer({ min: 0, max: 2700 }),
      taxIncluded: fc.boolean(),
      deliveryCents: fc.integer({ min: 0, max: 20_000 }),
    })
    fc.assert(
      fc.property(fc.array(line, { maxLength: 10 }), tariff, (lines, place) => {
        const priced = priceBasket(lines, place)
        const goods = priced.lines.reduce((sum, { lineCents }) => sum + lineCents, 0)
        expect(priced.goodsCents).toBe(goods)
        expect(priced.totalCents).toBe(goods + priced.deliveryCents)
        expect(priced.deliveryCents).toBe(lines.length === 0 ? 0 : place.deliveryCents)
        const share = place.taxIncluded ? place.vatPercentBp / (10_000 + place.vatPercentBp) : 0
        for (const { lineCents, taxCents } of priced.lines)
          expect(Math.abs(taxCents - lineCents * share)).toBeLessThanOrEqual(0.5 + 1e-6)
        expect(Math.abs(priced.taxCents - priced.totalCents * share)).toBeLessThanOrEqual(
          0.5 * (lines.length + 1) + 1e-6,
        )
      }),
      { numRuns: 2000 },
    )
  })

  it('come from the server: fields that name one are unknown, at any depth', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const line = { sku, quantity: 1, options: {} }
    await refuses(agent, { lines: [{ ...line, unitCents: 1 }] }, 'lines.0.unitCents', 'unknown')
    await refuses(agent, { lines: [{ ...line, options: { price: '1' } }] }, 'lines.0.options.price', 'unknown')
    await refuses(agent, { totalCents: 1 }, 'totalCents', 'unknown')
    await refuses(agent, { lines: [{ ...line, quantity: 6 }] }, 'lines.0.quantity', 'too-large')
    await refuses(agent, { lines: [{ ...line, quantity: 0 }] }, 'lines.0.quantity', 'too-small')
    await refuses(agent, { lines: [{ ...line, sku: 'NO-SUCH' }] }, 'lines.0.sku', 'no-such-wheelset')
    await refuses(agent, { lines: [line, line] }, 'lines.1.sku', 'twice')
    const adviceId = '00000000-0000-4000-8000-000000000000'
    await refuses(
      agent,
      { lines: [line, { ...line, sku: await another(sku), adviceId }] },
      'lines.1.adviceId',
      'no-such-fitting',
    )
    expect((await agent.get('/api/basket').expect(200)).body).toMatchObject({ basketId: null, lines: [] })
  })

  it.each([
    ['PT', 'USD'],
    ['GB', 'EUR'],
    ['US', 'GBP'],
  ])('%s does not pay in %s, and the field is named', (market, currency) =>
    refuses(shop.agent(), { market, currency }, 'currency', 'other-currency'),
  )

  it('follow the market: the same line in euro and in pounds with the tax inside, in dollars with none', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const lines = [{ sku, quantity: 2, options: {} }]
    for (const [market, currency] of [
      ['IE', 'EUR'],
      ['GB', 'GBP'],
      ['US', 'USD'],
    ] as const) {
      const view = await put(agent, lines, { market, currency })
      expect(view).toMatchObject({ market, currency, taxIncluded: market !== 'US' })
      expect(view.goodsCents).toBe(2 * (view.lines[0]?.unitCents ?? 0))
      expect(view.totalCents).toBe(view.goodsCents + view.deliveryCents)
      expect(view.taxCents > 0).toBe(market !== 'US')
    }
  })
})

const another = async (sku: string) => (await Wheelset.findAll()).find((set) => set.sku !== sku)?.sku ?? ''

describe('whose it is', () => {
  it('a visitor’s own, and nobody else’s', async () => {
    const agent = shop.agent()
    const view = await put(agent, [{ sku: await firstChoice(agent), quantity: 1 }])
    expect((await agent.get('/api/basket').expect(200)).body).toMatchObject({ basketId: view.basketId })
    expect((await shop.agent().get('/api/basket').expect(200)).body).toMatchObject({ basketId: null })
  })

  it('goes with the account: filled on one device, found on another, gone from this one after signing out', async () => {
    const one = await shop.signedIn('rider')
    const view = await put(one, [{ sku: await firstChoice(one), quantity: 1 }])
    const two = await shop.signedIn('rider')
    expect((await two.get('/api/basket').expect(200)).body).toMatchObject({ basketId: view.basketId })
    await one.delete('/api/session').expect(200)
    expect((await one.get('/api/basket').expect(200)).body).toMatchObject({ basketId: null })
    expect((await (await shop.signedIn('support')).get('/api/basket').expect(200)).body).toMatchObject({
      basketId: null,
    })
  })

  it('filled before signing in, it comes along', async () => {
    const agent = shop.agent()
    const view = await put(agent, [{ sku: await firstChoice(agent), quantity: 1 }])
    await agent.post('/api/session').send({ email: 'rider@felloe.example', password: 'rider-demo-2026' }).expect(200)
    expect((await agent.get('/api/basket').expect(200)).body).toMatchObject({ basketId: view.basketId })
  })
})

describe('the fit gate', () => {
  it('a choice that is open is asked for by its path; one that is not offered is named; a made one passes', async () => {
    const agent = shop.agent()
    const adviceId = await fitting(agent)
    const { wheelsets } = await adviceFor(75)
    const view = await put(
      agent,
      wheelsets
        .filter(({ rank }) => rank !== null)
        .slice(0, 10)
        .map(({ sku }) => ({ sku, quantity: 1, adviceId })),
    )
    const index = view.lines.findIndex(({ optionChoices }) => optionChoices.freehub.length > 1)
    const line = view.lines[index]
    expect(line?.problems).toContainEqual(
      expect.objectContaining({ code: 'option-missing', path: `lines.${index}.options.freehub` }),
    )
    const sku = line?.sku ?? ''
    const wrong = await put(agent, [{ sku, quantity: 1, adviceId, options: { freehub: 'no-such-body' } }])
    expect(codes(wrong)).toContain('option-not-offered')
    const right = await fill(agent, sku, adviceId)
    expect(codes(right)).not.toContain('option-missing')
  })

  it('an option that differs from the bike of the fitting is refused', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const first = await put(agent, [{ sku, quantity: 1 }])
    const [own, other] = first.lines[0]?.optionChoices.freehub ?? []
    expect(other).toBeDefined()
    const adviceId = await fitting(agent, 75, { bike: { freehub: own } })
    const view = await put(agent, [{ sku, quantity: 1, adviceId, options: { freehub: other } }])
    expect(codes(view)).toContain('option-differs-from-bike')
    const filled = await put(agent, [{ sku, quantity: 1, adviceId }])
    expect(filled.lines[0]?.options.freehub).toBe(own)
  })

  it('a wheelset for the other brake does not fit, and cannot be ordered', async () => {
    const agent = shop.agent()
    const rim = await Wheelset.findOne({ where: { brake: 'rim' }, rejectOnEmpty: true })
    const view = await fill(agent, rim.sku, await fitting(agent, 60))
    expect(codes(view)).toContain('does-not-fit')
    expect((await orderIt(agent, view.basketId)).body).toMatchObject({ code: 'basket-not-ready' })
  })

  it('a bike outside the sums’ scope gets no wheelset', async () => {
    const agent = shop.agent()
    const view = await fill(agent, await firstChoice(agent), await fitting(agent, 75, { ridersOnBike: 2 }))
    expect(codes(view)).toContain('out-of-scope')
    expect(view.canOrder).toBe(false)
  })

  it('at the limit it passes, a hair over it does not: nothing is rounded', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const adviceId = await fitting(agent)
    const { systemMassKg } = await adviceFor(75)
    await till.lowerLimit(sku, systemMassKg)
    expect((await fill(agent, sku, adviceId)).lines[0]).toMatchObject({
      limitCheck: 'no-margin',
      marginKg: 0,
      problems: [],
    })
    await till.lowerLimit(sku, systemMassKg - 0.001)
    const view = (await agent.get('/api/basket').expect(200)).body as BasketView
    expect(view.canOrder).toBe(false)
    expect(codes(view)).toEqual(['over-limit'])
  })

  it('what left the range altogether is said aloud, and nothing is ordered behind the shopper’s back', async () => {
    const agent = shop.agent()
    const sku = await firstChoice(agent)
    const { basketId } = await fill(agent, sku, await fitting(agent))
    const { id } = await till.stockOf(sku)
    await shop.deps.db.query(`DELETE FROM limit_versions WHERE wheelset_id = ${id}`)
    expect((await agent.get('/api/basket').expect(200)).body).toMatchObject({
      canOrder: false,
      problems: [{ code: 'left-range' }],
    })
    expect((await orderIt(agent, basketId)).body).toMatchObject({ code: 'basket-not-ready' })
  })
})

describe('the limit', () => {
  const HEAVY = 125
  /** Over the heavy rider's limit but fine for a light one, so that only the fitting stands between. */
  const overLimit = async () => {
    const heavy = await adviceFor(HEAVY)
    const light = new Set((await adviceFor(60)).wheelsets.filter(({ rank }) => rank !== null).map(({ sku }) => sku))
    const found = heavy.wheelsets.filter(({ sku, limitKg }) => light.has(sku) && limitKg < heavy.systemMassKg)
    expect(found.length).toBeGreaterThan(0)
    return { skus: found.slice(0, 3).map(({ sku }) => sku), totalKg: heavy.systemMassKg }
  }

  it('a line that leaves its fitting out is judged by the one the basket remembers', async () => {
    const agent = shop.agent()
    const { skus, totalKg } = await overLimit()
    const [sku = ''] = skus
    expect(codes(await fill(agent, sku, await fitting(agent, HEAVY)))).toContain('over-limit')
    const view = await fill(agent, sku)
    expect(view.lines[0]).toMatchObject({ limitCheck: 'over-limit', readyToRideKg: totalKg })
    await put(agent, [])
    expect(codes(await fill(agent, sku))).toContain('over-limit')
  })

  it('of several fittings a line without one is held to the heaviest; lines with one to their own', async () => {
    const agent = shop.agent()
    const { skus } = await overLimit()
    const [first = '', second = '', third = ''] = skus
    const [heavy, light] = [await fitting(agent, HEAVY), await fitting(agent, 60)]
    const view = await put(agent, [
      { sku: first, quantity: 1, adviceId: heavy },
      { sku: second, quantity: 1, adviceId: light },
      { sku: third, quantity: 1 },
    ])
    expect(view.lines.map(({ limitCheck }) => limitCheck === 'over-limit')).toEqual([true, false, true])
  })

  it('is remembered by the next basket after one was paid for', async () => {
    const { skus } = await overLimit()
    const [sku = ''] = skus
    const { agent, payUrl, orderNumber } = await bought(HEAVY)
    await payOn(payUrl)
    await until(async () => (await state(orderNumber)) === 'cleared')
    expect((await agent.get('/api/basket').expect(200)).body).toMatchObject({ basketId: null })
    expect(codes(await fill(agent, sku))).toContain('over-limit')
  })

  it('lowered between order and payment page: nothing to pay, stock back, basket open and it says why', async () => {
    const { agent, sku, orderNumber, orderUrl, payUrl } = await bought()
    await till.lowerLimit(sku, 60)
    const reply = await agent.post(pathOf(orderUrl, '/pay'))
    expect(reply.status).toBe(409)
    expect(reply.body).toMatchObject({ code: 'no-longer-fits', data: { problems: [{ code: 'over-limit' }] } })
    expect(await state(orderNumber)).toBe('dropped')
    expect((await till.stockOf(sku)).reserved).toBe(0)
    expect(codes((await agent.get('/api/basket').expect(200)).body as BasketView)).toEqual(['over-limit'])
    // The page that was open is closed as well.
    expect((await payOn(payUrl)).headers.get('location')).toMatch(/^\/pay\//)
  })

  it('lowered while the page is open and paid there: the money is written down, nobody builds', async () => {
    const { sku, orderNumber, payUrl } = await bought()
    await till.lowerLimit(sku, 60)
    await payOn(payUrl)
    await until(async () => (await state(orderNumber)) === 'query')
  })

  it('no sequence of calls leads to a payment page for a wheelset over the rider’s limit', async () => {
    const { skus, totalKg } = await overLimit()
    const fine = await firstChoice(shop.agent(), HEAVY)
    const call = fc.oneof(
      {
        weight: 4,
        arbitrary: fc.record({
          do: fc.constant('put' as const),
          sku: fc.constantFrom(...skus, fine),
          withFitting: fc.boolean(),
          quantity: fc.integer({ min: 1, max: 2 }),
        }),
      },
      { weight: 4, arbitrary: fc.record({ do: fc.constant('order' as const), limitAcknowledged: fc.boolean() }) },
      { weight: 1, arbitrary: fc.record({ do: fc.constantFrom('empty', 'look', 'sign-in', 'both') }) },
      { weight: 2, arbitrary: fc.record({ do: fc.constantFrom('pay-again', 'leave', 'pay', 'refresh') }) },
    )
    await fc.assert(
      fc.asyncProperty(fc.array(call, { minLength: 3, maxLength: 9 }), async (calls) => {
        const agent = shop.agent()
        const adviceId = await fitting(agent, HEAVY)
        // The basket has seen the fitting: that is where every one of these stories starts.
        let { basketId } = await fill(agent, skus[0] ?? fine, adviceId)
        let last: PlacedReply | null = null
        for (const one of calls) {
          if ('sku' in one)
            ({ basketId } = await fill(agent, one.sku, one.withFitting ? adviceId : undefined, one.quantity))
          else if ('limitAcknowledged' in one) {
            const { status, body } = await orderIt(agent, basketId, { limitAcknowledged: one.limitAcknowledged })
            expect([201, 404, 409]).toContain(status)
            if (status === 201) last = body as PlacedReply
          } else if (one.do === 'empty') await put(agent, [])
          else if (one.do === 'look') await agent.get('/api/basket').expect(200)
          else if (one.do === 'both')
            ({ basketId } = await put(
              agent,
              [...skus, fine].map((sku) => ({ sku, quantity: 1 })),
            ))
          else if (one.do === 'sign-in')
            await agent.post('/api/session').send({ email: 'rider@felloe.example', password: 'rider-demo-2026' })
          else if (last && one.do === 'pay') await payOn(last.payUrl)
          else if (last && one.do === 'pay-again') await agent.post(pathOf(last.orderUrl, '/pay'))
          else if (last && one.do === 'leave') await agent.post(pathOf(last.orderUrl, '/cancel'))
          else if (last) await agent.post(pathOf(last.orderUrl, '/refresh'))
        }
      }),
      {
        numRuns: 20,
        // Told first every time: the plain purchase of the wheelset that carries the rider. The rest is chance.
        examples: [
          [
            [
              { do: 'put', sku: fine, withFitting: true, quantity: 1 },
              { do: 'order', limitAcknowledged: false },
            ],
          ],
        ],
      },
    )
    expect(await Order.count()).toBeGreaterThan(0)
    const lines = await OrderLine.findAll()
    for (const { sku, limitKg, adviceId } of lines) {
      expect(skus).not.toContain(sku)
      expect(limitKg).toBeGreaterThanOrEqual(totalKg)
      expect(adviceId).not.toBeNull()
    }
  }, 120_000)
})
