/** Tipping points and influence, held to the advice itself: they may say nothing that asking again would not. */
import { describe, expect, it } from 'vitest'
import { advise, type Advice } from '#core/advise.ts'
import type { Answers } from '#core/answers.ts'
import { rulesFrom } from '#core/rules.ts'
import { influence, tippingPoints } from '#core/what-changes.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'

const rules = rulesFrom(ruleTables)
const road: Answers = {
  ride: 'road-long',
  bodyMassKg: 75,
  kitMassKg: 3,
  bikeMassKg: 8.2,
  luggageKg: 0,
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
  flatSpeedKmh: 30,
}
const ask = (answers: Answers) => advise(answers, wheelsetFacts, rules, 'test')
const turns = (answers: Answers) => tippingPoints(answers, wheelsetFacts, rules, 'test')
const offers = ({ wheelsets }: Advice) => wheelsets.filter(({ rank }) => rank !== null)

describe('tippingPoints', () => {
  const points = turns(road)

  it('finds at most one point each way for each number, on the right side of the rider', () => {
    expect(points.length).toBeGreaterThan(3)
    expect(new Set(points.map(({ input, direction }) => `${input} ${direction}`)).size).toBe(points.length)
    for (const { at, from, direction } of points)
      if (direction === 'up') expect(at).toBeGreaterThan(from)
      else expect(at).toBeLessThan(from)
  })

  it('for the mass: the advice is the same a tenth of a kilogram before the point and another at it', () => {
    const up = points.find(({ input, direction }) => input === 'bodyMassKg' && direction === 'up')
    if (!up) throw new Error('no point above')
    const before = ask({ ...road, bodyMassKg: Number((up.at - 0.1).toFixed(1)) })
    const after = ask({ ...road, bodyMassKg: up.at })
    const seen = (advice: Advice) =>
      JSON.stringify([
        advice.outcome,
        offers(advice)[0]?.sku,
        offers(advice).length,
        advice.rimDepthMm,
        advice.spokes?.front.min,
        advice.spokes?.rear.min,
      ])
    expect(seen(before)).toBe(seen(ask(road)))
    expect(seen(after)).not.toBe(seen(before))
    expect(up.changes.length).toBeGreaterThan(0)
  })

  it('names the last wheelset’s limit where a mass makes the answer a refusal', () => {
    // Alone in the range, with a stated limit of 120 kg and nothing lower: 120 − 3 − 8.2 = 108.8 kg of rider; the next tenth is over.
    const only = wheelsetFacts.filter(({ sku }) => sku === 'ROWAN-45-D')
    const near: Answers = { ...road, bodyMassKg: 107 }
    const up = tippingPoints(near, only, rules, 'test').find(
      ({ input, direction, changes }) =>
        input === 'bodyMassKg' && direction === 'up' && changes.some(({ what }) => what === 'outcome'),
    )
    expect(up?.at).toBeCloseTo(108.9, 6)
    expect(up?.changes).toContainEqual({ what: 'outcome', before: expect.any(String) as string, after: 'refuse' })
  })

  it('says nothing of a width that nobody knows, nor out of scope', () => {
    expect(turns({ ...road, tyre: null }).map(({ input }) => input)).not.toContain('tyreWidthMm')
    expect(turns({ ...road, ridersOnBike: 2 })).toEqual([])
  })

  it('is the same for the same answers', () => {
    expect(JSON.stringify(turns(road))).toBe(JSON.stringify(points))
  })
})

describe('influence', () => {
  const order = influence(road, wheelsetFacts, rules, 'test')

  it('lists every answer that was stepped, the strongest first', () => {
    expect(order.map(({ score }) => score)).toEqual(order.map(({ score }) => score).sort((a, b) => b - a))
    expect(order.map(({ input }) => input)).toEqual(
      expect.arrayContaining(['bodyMassKg', 'tyre.widthMm', 'wind', 'terrain']),
    )
  })
  it('a tyre two millimetres wider moves the pressure, wind the depth and with it the first choice', () => {
    expect(order.find(({ input }) => input === 'tyre.widthMm')?.strongest).toBe('pressure')
    expect(['depth', 'first']).toContain(order.find(({ input }) => input === 'wind')?.strongest)
  })
  it('what moves nothing scores nothing and has no strongest part', () => {
    for (const one of order) if (one.score === 0) expect(one.strongest).toBeNull()
  })
  it('says which of them were assumed', () => {
    expect(order.find(({ input }) => input === 'wind')?.assumed).toBe(true)
    expect(order.find(({ input }) => input === 'bodyMassKg')?.assumed).toBe(false)
  })
})
