/** Depth, wind and heat as the whole advice shows them: words into numbers, notes, and the working under each value. */
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { riderAnswers, type RiderAnswers } from '#contract/advisor.ts'
import { stockedDepths } from '#core/aero-advice.ts'
import { advise } from '#core/advise.ts'
import { fillAnswers } from '#core/answers.ts'
import { depthInputs, usualRimOuterMm } from '#core/depth-inputs.ts'
import { rulesFrom } from '#core/rules.ts'
import words from '../../locales/en/advisor.json'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'

const rules = rulesFrom(ruleTables)
const ask = (change: Partial<RiderAnswers> = {}) =>
  advise(
    riderAnswers.parse({
      ride: 'road-long',
      bodyMassKg: 75,
      kitMassKg: 3,
      bikeMassKg: 8,
      luggageKg: 0,
      brakes: 'disc',
      tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
      surface: 'mixed',
      terrain: 'rolling',
      wind: 'typical',
      confidence: 'average',
      flatSpeedKmh: 30,
      ...change,
    }),
    wheelsetFacts,
    rules,
    'test',
  )
const codes = (change: Partial<RiderAnswers>) => ask(change).notes.map(({ code }) => code)
const given = (change: Partial<RiderAnswers>) =>
  depthInputs(
    fillAnswers(
      riderAnswers.parse({ ride: 'road-long', bodyMassKg: 75, brakes: 'disc', tyre: null, ...change }),
      rules,
    ),
    wheelsetFacts,
    rules,
  )

describe('words into numbers', () => {
  it('surface changes what rolling costs: smooth less, rough twice the usual road', () => {
    expect(
      ['smooth', 'mixed', 'rough'].map((surface) => given({ surface } as RiderAnswers).rollingCoefficient),
    ).toEqual([0.0032, 0.004, 0.008])
    const climb = (surface: 'smooth' | 'rough') => ask({ surface }).reasons.tradeOff?.inputs.riderWatts
    expect(Number(climb('rough'))).toBeGreaterThan(Number(climb('smooth')) + 10)
  })
  it('speeds are held within 20 and 50 km/h, and it is said', () => {
    expect([given({ flatSpeedKmh: 15 }).flatSpeedKmh, given({ flatSpeedKmh: 30 }).flatSpeedKmh]).toEqual([20, 30])
    expect(codes({ flatSpeedKmh: 15 })).toContain('speed-held')
    expect(codes({ flatSpeedKmh: 30 })).not.toContain('speed-held')
  })
  it('a tyre beyond the drag model counts as wide, and one wide for the usual rim lets the flow go sooner', () => {
    const tyre = (mm: number) => given({ tyre: { frontWidthMm: mm, rearWidthMm: mm, setup: 'tubeless' } })
    expect([tyre(25).wideTyre, tyre(32).wideTyre, tyre(40).wideTyre]).toEqual([false, false, true])
    expect(tyre(25).stallDeg).toBe(12)
    expect(tyre(38).stallDeg).toBe(8)
    expect(given({ tyre: null, ride: 'gravel' }).wideTyre).toBe(true)
    expect(usualRimOuterMm('road-long', [])).toBeNull()
  })
  it('aero bars: less drag, a little less correction, and a deeper clamp on the open road only', () => {
    const [hoods, aero] = [given({ position: 'drop' }), given({ position: 'aero' })]
    expect(aero.positionDrag).toBe(0.75)
    expect(aero.correctionDeg / hoods.correctionDeg).toBeCloseTo(0.95, 12)
    expect([aero.clampMm, given({ ride: 'commute', position: 'aero' }).clampMm]).toEqual([90, 45])
  })
})

describe('the curve', () => {
  it('has a point for each stocked depth of the brake that the model holds for, and no other', () => {
    for (const brakes of ['rim', 'disc'] as const) {
      const stocked = new Set(
        wheelsetFacts
          .filter(({ brake }) => brake === brakes)
          .flatMap(({ front, rear }) => [front.depthMm, rear.depthMm]),
      )
      const shown = ask({ brakes }).tradeOff.map(({ depthMm }) => depthMm)
      expect(shown).toEqual([...stocked].filter((mm) => mm >= 25 && mm <= 100).sort((a, b) => a - b))
    }
    expect(stockedDepths([], 'rim')).toEqual([])
  })
  it('a rim-brake answer never changes what the air does', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('road-fast', 'road-long', 'climbing', 'gravel', 'commute'),
        fc.double({ min: 45, max: 130, noNaN: true }),
        fc.constantFrom('flat', 'rolling', 'hilly', 'mountain'),
        fc.constantFrom('sheltered', 'typical', 'exposed'),
        (ride, bodyMassKg, terrain, wind) => {
          const change = { ride, bodyMassKg, terrain, wind } as Partial<RiderAnswers>
          const [rim, disc] = [ask({ ...change, brakes: 'rim' }), ask({ ...change, brakes: 'disc' })]
          expect(rim.rimDepthMm).toEqual(disc.rimDepthMm)
          const both = rim.tradeOff.filter(({ depthMm }) => disc.tradeOff.some((one) => one.depthMm === depthMm))
          for (const point of both) expect(disc.tradeOff).toContainEqual(point)
          expect(disc.brakeHeat).toBeNull()
          expect(rim.brakeHeat).not.toBeNull()
        },
      ),
      { numRuns: 60 },
    )
  })
  it('the same answers give the same bytes', () => {
    expect(JSON.stringify(ask({ brakes: 'rim' }))).toBe(JSON.stringify(ask({ brakes: 'rim' })))
  })
})

describe('notes', () => {
  it('says the race rule for fast road rides only, with its date and source', () => {
    const race = ask({ ride: 'road-fast' }).notes.find(({ code }) => code === 'race-65')
    expect(race?.data).toMatchObject({ depthMm: 65, from: '2026-01-01', rowLabel: 'read' })
    expect(codes({ ride: 'road-long' })).not.toContain('race-65')
  })
  it('says that gusts can be harder, and that the rear may be deeper where it may', () => {
    expect(codes({})).toEqual(expect.arrayContaining(['gusts-beyond', 'deeper-behind']))
    expect(codes({ ride: 'gravel', bodyMassKg: 110, wind: 'sheltered' })).not.toContain('deeper-behind')
  })
  it('a step shallower for small riders and for panniers (2.10), never below the shallowest', () => {
    const step = (change: Partial<RiderAnswers>) => {
      const reply = ask(change)
      const found = reply.notes.find(({ code }) => code === 'one-step-shallower')
      return found ? (reply.rimDepthMm?.front.to ?? 0) - Number(found.data.depthMm) : null
    }
    expect(step({ bodyMassKg: 50 })).toBe(5)
    expect(step({ luggageKg: 8, luggagePlace: 'rear' })).toBe(5)
    expect(step({ luggageKg: 8, luggagePlace: 'frame' })).toBeNull()
    expect(step({ bodyMassKg: 50, wind: 'exposed', confidence: 'nervous' })).toBeNull()
  })
  it('these alone leave the outcome a plain recommendation', () => {
    const { notes } = ask({ ride: 'road-fast' })
    expect(notes.filter(({ code }) => ['race-65', 'gusts-beyond', 'deeper-behind'].includes(code))).toHaveLength(3)
    for (const { code, severity } of notes)
      if (['race-65', 'gusts-beyond', 'deeper-behind'].includes(code)) expect(severity).toBe('info')
  })
  it('a hot descent is named with its doubt and the limit', () => {
    const hot = ask({ brakes: 'rim', terrain: 'mountain', bodyMassKg: 90 }).notes.find(
      ({ code }) => code === 'brake-heat',
    )
    expect(hot?.data).toMatchObject({ limitC: 120, bandShare: 0.3, verdict: 'caution' })
  })
})

describe('the working', () => {
  const reply = ask({ brakes: 'rim', terrain: 'mountain', bodyMassKg: 78 })
  it.each(['rimDepthMm.front', 'rimDepthMm.rear', 'tradeOff', 'brakeHeat'])(
    '%s: every figure has a name in words, its source names a label’s reason, and what would change it is a known answer',
    (key) => {
      const reason = reply.reasons[key]
      expect(reason).toBeDefined()
      const value: Record<string, unknown> = words.working.value
      const field: Record<string, unknown> = words.field
      for (const name of [...Object.keys(reason?.inputs ?? {}), ...Object.keys(reason?.constants ?? {})])
        expect(value[name] ?? field[name], `${key} ${name}`).toBeDefined()
      for (const path of reason?.wouldChangeIf ?? []) expect(field[path.split('.')[0] ?? ''], path).toBeDefined()
      expect(reason?.source).toMatch(/read|memory|practice|derived/)
      expect(reason?.uncertainty).toMatch(/^±\d+ (mm|%)$/)
    },
  )
  it('brake heat shows where policy and model part: the limit is reached below the mass that policy takes', () => {
    const { limitMassKg, policyMassKg, rigAlloyC, rigCarbonC } = reply.reasons.brakeHeat?.inputs ?? {}
    expect(Number(limitMassKg)).toBeGreaterThan(80)
    expect(Number(limitMassKg)).toBeLessThan(Number(policyMassKg))
    expect(Math.round(Number(rigAlloyC))).toBe(83)
    expect(Math.round(Number(rigCarbonC))).toBe(125)
  })
  it('the depth’s working shows that the advised front asks for no more than is accepted, but for rounding', () => {
    const { askedDeg, correctionDeg } = reply.reasons['rimDepthMm.front']?.inputs ?? {}
    expect(Number(askedDeg)).toBeLessThan(Number(correctionDeg) * 1.1)
  })
})
