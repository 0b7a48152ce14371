import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { advice as adviceSchema, riderAnswers, rides, type RiderAnswers } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { checkLimit } from '#core/limits.ts'
import { rulesFrom, tableNames } from '#core/rules.ts'
import { spokeAdvice } from '#core/spokes.ts'
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
  property(
    'R5 and R6 on every wheelset offered: front no deeper than rear, starts within rim and 5 bar on straight walls',
    (rider) => {
      for (const { sku, rank, startBar } of ask(answersOf(rider)).wheelsets) {
        const set = facts.get(sku)
        if (rank === null || !set) continue
        expect(set.front.depthMm).toBeLessThanOrEqual(set.rear.depthMm)
        if (startBar)
          for (const wheel of [set.front, set.rear])
            expect(startBar[wheel.position]).toBeLessThanOrEqual(
              Math.min(wheel.maxPressureBar, wheel.seat === 'hookless' ? 5 : Infinity),
            )
      }
    },
  )
  property('a pressure worked for a hooked rim never stands beside straight-wall offers without their cap', (rider) => {
    const reply = ask(answersOf({ ...rider, seat: 'any' }))
    const straight = reply.wheelsets.some(({ sku, rank }) => rank !== null && facts.get(sku)?.front.seat === 'hookless')
    const cap = reply.notes.find(({ code }) => code === 'hookless-limit')
    if (straight && reply.pressure) expect(cap?.data.ceilingBar).toBeLessThanOrEqual(5)
    else expect(cap).toBeUndefined()
  })
  property('no refusal claims a limit while a stronger wheelset is ruled out by the tyre alone', (rider) => {
    const reply = ask(answersOf(rider))
    const over = reply.notes.find(({ code }) => code === 'over-every-limit')
    if (!over) return
    for (const { sku, limitKg } of reply.wheelsets) {
      const set = facts.get(sku)
      const forThisBike = set?.brake === rider.brakes && set.beadSeatMm === 622 && set.rides.includes(rider.ride)
      const seat = rider.seat === 'any' || (set?.front.seat === rider.seat && set.rear.seat === rider.seat)
      if (forThisBike && seat && !reply.wheelsets.some(({ codes }) => codes[0] === 'brake-heat'))
        expect(limitKg).toBeLessThanOrEqual(Number(over.data.limitKg))
    }
  })
  property(
    'what would bring a wheelset back, where the tyre stands in the way, does bring it back',
    (rider) => {
      const answers = answersOf(rider)
      for (const setup of ['tubeless', 'tube', 'tubular'] as const)
        for (const hooklessApproved of [true, false, null]) {
          const asked = { ...answers, tyre: answers.tyre && { ...answers.tyre, setup, hooklessApproved } }
          for (const { sku, rank, nearestChange } of ask(asked).wheelsets) {
            if (rank !== null || !nearestChange?.field.startsWith('tyre.')) continue
            const { field, to } = nearestChange
            const tyre = asked.tyre && {
              ...asked.tyre,
              ...(field === 'tyre.widthMm' ? { frontWidthMm: to, rearWidthMm: to } : { [field.slice(5)]: to }),
            }
            const again = ask(riderAnswers.parse({ ...asked, tyre })).wheelsets.find((one) => one.sku === sku)
            expect(again?.rank, `${sku} ${field} ${String(to)}`).not.toBeNull()
          }
        }
    },
    4,
  )
  property('rim brakes never change the depths advised, nor the pressures', (rider) => {
    const [rim, disc] = [ask(answersOf({ ...rider, brakes: 'rim' })), ask(answersOf({ ...rider, brakes: 'disc' }))]
    expect(rim.rimDepthMm).toEqual(disc.rimDepthMm)
    if (rim.pressure && disc.pressure) expect(rim.pressure).toEqual(disc.pressure)
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

describe('notes', () => {
  const codes = (answers: RiderAnswers) => ask(answers).notes.map(({ code }) => code)
  const alps: RiderAnswers = {
    ...road,
    ride: 'climbing',
    brakes: 'rim',
    terrain: 'mountain',
    tyre: { frontWidthMm: 25, rearWidthMm: 25, setup: 'tube' },
    rim: undefined,
  }
  // aero reference 3.9, worst-speed table, 12 %: carbon 111 °C at 79 kg and 142 °C at 99 kg in all, so 120 °C lies between.
  it.each([
    [79, 'fine'],
    [88, 'caution'],
    [99, 'caution'],
    [106, 'alloy-or-disc'],
  ])('rim brakes on long descents, %d kg in all: %s', (totalKg, verdict) => {
    const { brakeHeat } = ask({ ...alps, bodyMassKg: totalKg - 11, kitMassKg: 3, bikeMassKg: 8 })
    expect(brakeHeat?.verdict).toBe(verdict)
    expect((brakeHeat?.carbonC ?? 0) > 120).toBe(verdict !== 'fine')
  })
  it('carbon rims on long descents come with the words on pads, tubes and braking', () => {
    expect(codes({ ...alps, ride: 'road-long', bodyMassKg: 68 })).toContain('carbon-rim-brakes')
    expect(codes({ ...alps, ride: 'road-long', bodyMassKg: 68, terrain: 'flat' })).not.toContain('carbon-rim-brakes')
  })
  it('aero bars do not lift the clamp of bikepacking (45 mm) or gravel (50 mm), aero reference 2.4', () => {
    const calm = { ...road, position: 'aero', wind: 'sheltered', confidence: 'confident' } as const
    expect(ask({ ...calm, ride: 'bikepacking' }).rimDepthMm?.rear.to).toBe(45)
    expect(ask({ ...calm, ride: 'gravel' }).rimDepthMm?.rear.to).toBe(50)
    expect(ask({ ...calm, ride: 'time-trial' }).rimDepthMm?.rear.to).toBe(90)
  })
  it('bags: the ride without them starts as if there were none', () => {
    const bags = { ...road, luggageKg: 12, luggagePlace: 'rear' } as const
    const bare = ask(bags).notes.find(({ code }) => code === 'bare-ride-lower-pressure')
    const none = ask({ ...road, luggagePlace: 'rear' }).pressure
    expect(bare?.data.rear).toMatchObject({ startBar: none?.rear.startBar })
    expect(bare?.data.front).toMatchObject({ startBar: none?.front.startBar })
    expect(codes(road)).not.toContain('bare-ride-lower-pressure')
  })
  it('answers that seldom go together are named, not corrected', () => {
    const slip = ask({ ...road, bodyMassKg: 31, bikeMassKg: 33 })
    expect(slip.notes).toContainEqual({
      code: 'look-again',
      severity: 'caution',
      data: { fields: ['bodyMassKg', 'bikeMassKg'] },
    })
    expect(slip.parts).toMatchObject({ bodyMassKg: 31, bikeMassKg: 33 })
    expect(codes({ ...road, ride: 'trail' })).toContain('look-again')
    expect(codes(road)).not.toContain('look-again')
  })
  it('a total within some limits is not called over: the tyre is what stands in the way, and no pressure is shown', () => {
    // 112.5 kg in all on 23 mm tyres: the range holds stronger road rim-brake wheelsets, on rims that take no 23 mm tyre.
    const reply = ask({
      ...alps,
      ride: 'road-fast',
      terrain: 'rolling',
      bodyMassKg: 101.5,
      tyre: { frontWidthMm: 23, rearWidthMm: 23, setup: 'tube' },
    })
    expect(reply.outcome).toBe('refuse')
    expect(reply.notes[0]?.code).toBe('none-for-tyre')
    expect(reply.notes.map(({ code }) => code)).not.toContain('over-every-limit')
    expect(reply.pressure).toBeNull()
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

describe('spokes, from the reference wheels (wheel reference 4.13)', () => {
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
  // 4.13: road rim-brake carbon 30, gravel carbon 30 (14 kg of bike and kit) and XC carbon 25 × 30 (15 kg).
  it.each([
    ['road-long', 'rim', 50 + 11, '20/20'],
    ['road-long', 'rim', 80 + 11, '20/24'],
    ['road-long', 'rim', 100 + 11, '28/32'],
    ['road-long', 'rim', 110 + 11, '32/36'],
    ['gravel', 'disc', 90 + 14, '24/24'],
    ['gravel', 'disc', 100 + 14, '24/28'],
    ['gravel', 'disc', 130 + 14, '32/36'],
    ['cross-country', 'disc', 80 + 15, '24/24'],
    ['cross-country', 'disc', 90 + 15, '24/28'],
    ['cross-country', 'disc', 110 + 15, '32/36'],
  ] as const)('%s on %s brakes, %d kg ready to ride: %s', (ride, brakes, totalKg, counts) => {
    expect(of(totalKg, { ride, brakes })).toBe(counts)
  })
  it('bikepacking and assistance start at 28 behind, heavy bags at 32', () => {
    expect(of(90, { ride: 'bikepacking' })).toBe('24/28')
    expect(of(90, { assist: '25' })).toBe('24/28')
    expect(of(90, { luggageKg: 25 })).toBe('28/32')
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

describe('the smallest change', () => {
  it('where a tyre of the same width would do, names what is printed on this one, and that brings the wheelset back', () => {
    const rider: RiderAnswers = {
      ...road,
      brakes: 'rim',
      bodyMassKg: 106.6,
      tyre: { frontWidthMm: 29, rearWidthMm: 29, setup: 'tube', maxBar: 5.8 },
      frontLoadShare: 0.29,
      rim: { seat: 'any' },
    }
    const out = ask(rider).wheelsets.find(({ codes }) => codes[0] === 'pressure-not-suitable')
    expect(out?.nearestChange).toMatchObject({ code: 'other-fact', field: 'tyre.maxBar' })
    const maxBar = out?.nearestChange?.to as number
    expect(maxBar).toBeGreaterThan(5.8)
    const tyre = { frontWidthMm: 29, rearWidthMm: 29, setup: 'tube' as const, maxBar }
    expect(ask({ ...rider, tyre }).wheelsets.find(({ sku }) => sku === out?.sku)?.rank).not.toBeNull()
  })
})
