import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { advice as adviceSchema, riderAnswers, rides, type RiderAnswers } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { checkLimit } from '#core/limits.ts'
import { rulesFrom, tableNames } from '#core/rules.ts'
import { spokeAdvice, structuralLimitKg } from '#core/spokes.ts'
import { KG_PER_LB } from '#core/units.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import { checkPersona, type Persona } from '../support/persona-bounds.ts'
import reference from './reference/personas.json'

const rules = rulesFrom(ruleTables)
const facts = new Map(wheelsetFacts.map((set) => [set.sku, set]))
const ask = (answers: RiderAnswers) => advise(answers, wheelsetFacts, rules, 'test')

const road: RiderAnswers = {
  ride: 'road-long',
  bodyMassKg: 75,
  kitMassKg: 3,
  bikeMassKg: 8.2,
  luggageKg: 0,
  luggagePlace: 'none',
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
  rim: { seat: 'hooked', innerWidthMm: 21 },
  position: 'drop',
  surface: 'mixed',
  terrain: 'rolling',
  wind: 'typical',
  confidence: 'average',
  flatSpeedKmh: 28,
}

describe('the fifteen reference riders', () => {
  it.each((reference.personas as unknown as Persona[]).map((persona) => [persona.id, persona.title, persona] as const))(
    '%s, %s, meets every bound',
    (_id, _title, persona) => {
      const answers = riderAnswers.parse(persona.inputs)
      const reply = adviceSchema.parse(ask(answers))
      expect(checkPersona(persona, reply, facts).failures).toEqual([])
    },
  )
  it('P15 without a tyre: no single pressure, but total, depth, spokes and wheelsets, and a word on what would sharpen it', () => {
    const reply = ask({ ...road, bodyMassKg: 81, bikeMassKg: 9, tyre: null, rim: undefined })
    expect(reply.pressure).toBeNull()
    expect(reply.systemMassKg).toBeCloseTo(93, 9)
    expect(reply.spokes?.rear.min).toBeGreaterThanOrEqual(20)
    expect(reply.wheelsets.some(({ rank }) => rank === 1)).toBe(true)
    expect(reply.notes).toContainEqual({ code: 'sharpen', severity: 'info', data: { field: 'tyre.rearWidthMm' } })
  })
})

/** Riders over the whole width of what the contract takes. */
const anyRider = fc.record({
  ride: fc.constantFrom(...rides),
  bodyMassKg: fc.double({ min: 40, max: 140, noNaN: true }),
  kitMassKg: fc.double({ min: 0, max: 8, noNaN: true }),
  bikeMassKg: fc.double({ min: 6, max: 25, noNaN: true }),
  luggageKg: fc.double({ min: 0, max: 25, noNaN: true }),
  luggagePlace: fc.constantFrom('front', 'frame', 'rear', 'spread'),
  brakes: fc.constantFrom('rim', 'disc'),
  widthMm: fc.integer({ min: 23, max: 58 }),
  setup: fc.constantFrom('tubeless', 'tube'),
  seat: fc.constantFrom('hooked', 'hookless', 'any'),
  innerWidthMm: fc.constantFrom(19, 21, 23, 25, 30),
  position: fc.constantFrom('drop', 'aero', 'upright', 'mountain'),
  terrain: fc.constantFrom('flat', 'rolling', 'hilly', 'mountain'),
  wind: fc.constantFrom('sheltered', 'typical', 'exposed'),
  confidence: fc.constantFrom('nervous', 'average', 'confident'),
  flatSpeedKmh: fc.double({ min: 20, max: 45, noNaN: true }),
})
type AnyRider = typeof anyRider extends fc.Arbitrary<infer R> ? R : never
const answersOf = ({ widthMm, setup, seat, innerWidthMm, ...rest }: AnyRider): RiderAnswers =>
  riderAnswers.parse({
    ...rest,
    tyre: { frontWidthMm: widthMm, rearWidthMm: widthMm, setup },
    rim: { seat, innerWidthMm },
  })

const starts = (reply: ReturnType<typeof ask>) =>
  reply.pressure && [reply.pressure.front, reply.pressure.rear].flatMap((p) => [p.lowBar, p.startBar, p.highBar])
const LITTLE = 1e-9

describe('relations that hold for every rider (personas.json R1-R10, DERIVED or consensus there)', () => {
  const property = (title: string, check: (rider: AnyRider) => void, runs = 150) => {
    it(
      title,
      () => {
        fc.assert(fc.property(anyRider, check), { numRuns: runs })
      },
      60_000,
    )
  }

  for (const field of ['bodyMassKg', 'kitMassKg', 'bikeMassKg', 'luggageKg'] as const) {
    property(`R1: more ${field} never lowers a pressure, a spoke count or the total`, (rider) => {
      const before = ask(answersOf(rider))
      const after = ask(answersOf({ ...rider, [field]: rider[field] + 3 }))
      expect(after.systemMassKg).toBeGreaterThan(before.systemMassKg)
      expect(after.spokes?.front.min).toBeGreaterThanOrEqual(before.spokes?.front.min ?? 0)
      expect(after.spokes?.rear.min).toBeGreaterThanOrEqual(before.spokes?.rear.min ?? 0)
      const [low, high] = [starts(before), starts(after)]
      if (low && high)
        for (const [index, bar] of low.entries()) expect((high[index] ?? 0) - bar).toBeGreaterThanOrEqual(-LITTLE)
    })
  }
  property('R2: a wider tyre on the same rim never raises a pressure', (rider) => {
    const [narrow, wide] = [
      starts(ask(answersOf(rider))),
      starts(ask(answersOf({ ...rider, widthMm: rider.widthMm + 1 }))),
    ]
    if (narrow && wide)
      for (const [index, bar] of narrow.entries()) expect((wide[index] ?? 0) - bar).toBeLessThanOrEqual(LITTLE)
  })
  property('R3: on drop, upright and mountain positions the front is never harder than the rear', (rider) => {
    if (rider.position === 'aero' || rider.luggagePlace === 'front') return
    const { pressure } = ask(answersOf(rider))
    if (pressure) expect(pressure.front.startBar).toBeLessThanOrEqual(pressure.rear.startBar + LITTLE)
  })
  property('R4: more wind or less confidence never allows a deeper front', (rider) => {
    const front = (change: Partial<AnyRider>) => ask(answersOf({ ...rider, ...change })).rimDepthMm?.front.to ?? 0
    expect(front({ wind: 'exposed' })).toBeLessThanOrEqual(front({ wind: 'typical' }))
    expect(front({ wind: 'typical' })).toBeLessThanOrEqual(front({ wind: 'sheltered' }))
    expect(front({ confidence: 'nervous' })).toBeLessThanOrEqual(front({ confidence: 'average' }))
    expect(front({ confidence: 'average' })).toBeLessThanOrEqual(front({ confidence: 'confident' }))
  })
  property('R5: the rear range never ends below the front range', (rider) => {
    const depth = ask(answersOf(rider)).rimDepthMm
    if (depth) expect(depth.rear.to).toBeGreaterThanOrEqual(depth.front.to)
  })
  property('R6: hookless pressures stay at or below 5 bar and the lower of tyre and rim', (rider) => {
    const answers = answersOf({ ...rider, seat: 'hookless' })
    const { pressure } = ask({
      ...answers,
      tyre: answers.tyre && { ...answers.tyre, maxBar: 4.2 },
      rim: { ...answers.rim, maxBar: 4.6 },
    })
    if (pressure)
      for (const wheel of [pressure.front, pressure.rear])
        expect(Math.max(wheel.highBar, wheel.ceilingBar)).toBeLessThanOrEqual(4.2)
  })
  property(
    'R7: pounds typed and converted once give the same advice as the same kilograms',
    (rider) => {
      const kg = Math.round(rider.bodyMassKg / KG_PER_LB) * KG_PER_LB
      const typedLb = Math.round(kg / KG_PER_LB)
      expect(ask(answersOf({ ...rider, bodyMassKg: typedLb * KG_PER_LB }))).toEqual(
        ask(answersOf({ ...rider, bodyMassKg: kg })),
      )
    },
    40,
  )
  property('R8: refused stays refused when luggage is added', (rider) => {
    if (ask(answersOf(rider)).outcome !== 'refuse') return
    expect(ask(answersOf({ ...rider, luggageKg: rider.luggageKg + 5 })).outcome).toBe('refuse')
  })
  property(
    'R9: the same answers give the same bytes',
    (rider) => {
      expect(JSON.stringify(ask(answersOf(rider)))).toBe(JSON.stringify(ask(answersOf(rider))))
    },
    40,
  )
  property('R10: no brake, wheel-size, use or assist mismatch and nothing over its limit is ever offered', (rider) => {
    const answers = { ...answersOf(rider), assist: '25' as const }
    const reply = ask(answers)
    for (const { sku, rank, limitKg, marginKg } of reply.wheelsets) {
      const set = facts.get(sku)
      if (rank === null || !set) continue
      expect([set.brake, set.beadSeatMm, set.assistRated, set.rides.includes(answers.ride)]).toEqual([
        answers.brakes,
        622,
        true,
        true,
      ])
      expect(limitKg).toBeGreaterThanOrEqual(reply.systemMassKg)
      expect(marginKg).toBeGreaterThanOrEqual(0)
    }
  })
  property('every start lies inside its band, its floor and its ceiling', (rider) => {
    const { pressure } = ask(answersOf(rider))
    if (!pressure) return
    for (const p of [pressure.front, pressure.rear]) {
      expect(p.floorBar).toBeLessThanOrEqual(p.lowBar)
      expect(p.lowBar).toBeLessThanOrEqual(p.startBar)
      expect(p.startBar).toBeLessThanOrEqual(p.highBar)
      expect(p.highBar).toBeLessThanOrEqual(p.ceilingBar)
    }
  })
})

describe('limits', () => {
  it('a gram over is over: no rounding makes it fit', () => {
    expect(checkLimit(110.001, 110).verdict).toBe('over-limit')
    expect(checkLimit(110, 110).verdict).toBe('no-margin')
    expect(checkLimit(104.4, 110).verdict).toBe('fits')
    expect(checkLimit(104.5, 110).verdict).toBe('no-margin')
  })
  it('a limit that is no limit is a fault of ours, not an answer', () => {
    expect(() => checkLimit(80, 0)).toThrow(RangeError)
  })
  it('a mass band counts its upper edge against limits and its middle for pressure', () => {
    const { bodyMassKg: _, ...others } = road
    const band = ask({ ...others, bodyMassBandKg: { from: 70, to: 80 } })
    expect(band.systemMassKg).toBeCloseTo(80 + 3 + 8.2, 9)
    expect(band.pressure?.rear.startBar).toBeCloseTo(ask(road).pressure?.rear.startBar ?? 0, 9)
  })
  it('an assumed bike counts one kilogram more, and is named as assumed', () => {
    const { bikeMassKg: _, ...others } = road
    const reply = ask(others)
    expect(reply.assumed).toContain('bikeMassKg')
    expect(reply.parts.bikeMassKg).toBe(9.5)
  })
})

describe('spokes, from the stand-in table (wheel reference 4.12 and 4.13)', () => {
  const of = (totalKg: number, more: Partial<Parameters<typeof spokeAdvice>[0]> = {}) => {
    const { front, rear } = spokeAdvice(
      { ride: 'road-long', brakes: 'disc', assist: 'none', luggageKg: 0, totalKg, ...more },
      rules,
    )
    return `${front.min}/${rear.min}`
  }
  // 4.13, road disc carbon 30: rider 50-90 kg 20/24, 100 kg 24/24, 110 kg 28/32, 120 kg 32/32; the table adds 11 kg of bike and kit.
  it.each([
    [61, '20/24'],
    [101, '20/24'],
    [111, '24/24'],
    [121, '28/32'],
    [131, '32/32'],
  ])('road disc, %d kg ready to ride: %s', (totalKg, counts) => {
    expect(of(totalKg)).toBe(counts)
  })
  it('bikepacking and assistance start at 28 behind, heavy bags at 32', () => {
    expect(of(90, { ride: 'bikepacking' })).toBe('24/28')
    expect(of(90, { assist: '25' })).toBe('24/28')
    expect(of(90, { luggageKg: 25 })).toBe('28/32')
  })
  it('reads the table at the next shallower rim, never in the rider’s favour', () => {
    const rear = { position: 'rear', material: 'carbon', spokeCount: 24 } as const
    expect(structuralLimitKg('road-long', 'disc', { ...rear, depthMm: 44 }, rules)).toBe(100 + 11)
    expect(structuralLimitKg('road-long', 'disc', { ...rear, depthMm: 45 }, rules)).toBe(121 + 11)
    expect(structuralLimitKg('road-long', 'disc', { ...rear, depthMm: 25 }, rules)).toBeNull()
  })
})

describe('what is ruled out', () => {
  it('names the first rule and the smallest change', () => {
    const rim = ask({ ...road, brakes: 'rim' }).wheelsets.find(({ sku }) => facts.get(sku)?.brake === 'disc')
    expect(rim).toMatchObject({
      rank: null,
      verdict: 'mismatch',
      codes: ['brake'],
      nearestChange: { field: 'brakes', to: 'disc' },
    })
    const heavy = ask({ ...road, bodyMassKg: 118 })
    const over = heavy.wheelsets.find(({ verdict }) => verdict === 'over-limit')
    expect(over?.nearestChange).toEqual({ code: 'lower-total', field: 'systemMassKg', to: over?.limitKg })
  })
  it('axles, gear body and rotor mount that are known have to match; what is unknown is said to be unchecked', () => {
    const known = ask({ ...road, bike: { rearAxle: '12x148' } })
    expect(known.wheelsets.filter(({ codes }) => codes.includes('rear-axle')).length).toBeGreaterThan(0)
    const unchecked = known.notes.find(({ code }) => code === 'bike-unknown')
    expect(unchecked?.data.fields).not.toContain('bike.rearAxle')
    expect(unchecked?.data.fields).toContain('bike.freehub')
  })
  it('a rim brake asks for its opening: rim width and 4 mm', () => {
    const tight = ask({
      ...road,
      brakes: 'rim',
      tyre: { frontWidthMm: 25, rearWidthMm: 25, setup: 'tube' },
      rim: undefined,
      bike: { caliperOpeningMm: 24 },
    })
    expect(tight.wheelsets.some(({ codes }) => codes.includes('caliper'))).toBe(true)
  })
  it('45 km/h assistance is out of scope and hints at no value', () => {
    const reply = ask({ ...road, assist: '45' })
    expect(reply).toMatchObject({
      outcome: 'out-of-scope',
      pressure: null,
      rimDepthMm: null,
      spokes: null,
      wheelsets: [],
    })
  })
})

describe('rule tables', () => {
  it('advice without all of its rules is refused, naming the table', () => {
    for (const name of tableNames)
      expect(() => rulesFrom(ruleTables.filter((table) => table.name !== name))).toThrow(name)
  })
  it('each has a source and a label', () => {
    for (const { source, label } of ruleTables) {
      expect(source.length).toBeGreaterThan(20)
      expect(['read', 'memory', 'derived', 'practice']).toContain(label)
    }
  })
})
