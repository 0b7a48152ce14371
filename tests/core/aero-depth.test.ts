/** Gusts, caps, power, climbing and the trade-off against aero reference 3.4 to 3.8, 5.6 (its labels in the titles). */
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { DepthInputs } from '#core/depth-inputs.ts'
import { roundTo } from '#core/display.ts'
import { dragArea, effectiveMass, massWatts, ridingPower, speedAtPower, speedOfCubic } from '#core/power.ts'
import {
  depthRange,
  frontDepthCap,
  gustForce,
  gustMoment,
  pairWatts,
  ridingOf,
  steeringStiffness,
} from '#core/rim-depth.ts'
import { rulesFrom } from '#core/rules.ts'
import { wheelInertia } from '#core/wheel-geometry.ts'
import { breakEvenAtPower, breakEvenGradient, mixedPair, tradeOff } from '#core/trade-off.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'

const rules = rulesFrom(ruleTables)
const near = (found: number, expected: number, tolerance: number, what = '') => {
  expect(Math.abs(found - expected), `${what} ${found} for ${expected}`).toBeLessThanOrEqual(tolerance)
}
const kmh = (speed: number) => speed / 3.6

describe('gusts (DERIVED, ±15 mm)', () => {
  it.each([
    [5, 10, [7.4, 8.7, 10.6, 12.4, 14.1], [0.44, 0.52, 0.64, 0.74, 0.85]],
    [7, 10, [10.7, 12.6, 15.4, 18.0, 20.5], [0.64, 0.76, 0.92, 1.08, 1.23]],
    [7, 12.5, [13.2, 15.6, 19.0, 22.2, 25.3], [0.79, 0.94, 1.14, 1.33, 1.52]],
    [10, 10, [14.4, 17.0, 20.7, 24.2, 27.5], [0.86, 1.02, 1.24, 1.45, 1.65]],
    [10, 15, [23.3, 27.6, 33.6, 39.3, 44.7], [1.4, 1.65, 2.02, 2.36, 2.68]],
  ])('3.5: gust %d m/s at %f m/s', (gust, speed, forces, moments) => {
    for (const [index, depth] of [25, 35, 50, 65, 80].entries()) {
      near(gustForce(depth, speed, gust), forces[index] ?? 0, 0.06)
      near(gustMoment(depth, speed, gust), moments[index] ?? 0, 0.006)
    }
  })
  it('3.5: what the loaded front wheel holds against, and what that allows at 3.0°', () => {
    for (const [kg, stiffness, allowed] of [
      [50, 13.3, 0.7],
      [60, 15.6, 0.82],
      [75, 19.0, 1.0],
      [90, 22.5, 1.18],
      [110, 27.1, 1.42],
    ] as const) {
      near(steeringStiffness(kg, 8), stiffness, 0.06)
      near((steeringStiffness(kg, 8) * 3 * Math.PI) / 180, allowed, 0.006)
    }
  })
  it('2.4: a blunt inner edge turns the bars 0.8 times as hard, a narrow V 1.2 times (MEMORY, judgement)', () => {
    near(gustMoment(50, 10, 7, 1.2) / gustMoment(50, 10, 7, 0.8), 1.5, 1e-12)
  })
  const masses = [50, 55, 60, 65, 70, 75, 80, 85, 90, 100, 110]
  const low = '<25'
  it.each([
    ['sheltered', 'nervous', 10, [35, 40, 45, 50, 55, 65, 70, 75, 80, 80, 80]],
    ['sheltered', 'average', 10, [60, 65, 75, 80, 80, 80, 80, 80, 80, 80, 80]],
    ['sheltered', 'confident', 10, [80, 80, 80, 80, 80, 80, 80, 80, 80, 80, 80]],
    ['typical', 'nervous', 10, [low, low, low, 25, 30, 35, 35, 40, 45, 50, 60]],
    ['typical', 'average', 10, [30, 35, 40, 45, 50, 55, 65, 70, 75, 80, 80]],
    ['typical', 'confident', 10, [45, 55, 60, 70, 75, 80, 80, 80, 80, 80, 80]],
    ['typical', 'nervous', 12.5, [low, low, low, low, low, low, 25, 25, 30, 35, 40]],
    ['typical', 'average', 12.5, [low, 25, 25, 30, 35, 40, 45, 50, 55, 60, 70]],
    ['typical', 'confident', 12.5, [30, 35, 40, 50, 55, 60, 65, 70, 80, 80, 80]],
    ['exposed', 'nervous', 10, [low, low, low, low, low, low, low, low, 25, 30, 35]],
    ['exposed', 'average', 10, [low, low, low, 25, 30, 35, 40, 40, 45, 55, 60]],
    ['exposed', 'confident', 10, [25, 30, 35, 40, 45, 50, 55, 60, 70, 80, 80]],
  ] as const)('3.6: caps in %s wind, %s, at %f m/s', (wind, confidence, speedMs, caps) => {
    for (const [index, bodyMassKg] of masses.entries()) {
      const raw = frontDepthCap({
        bodyMassKg,
        bikeMassKg: 8,
        speedMs,
        gustMs: rules.wind.gustMs[wind] ?? 0,
        correctionDeg: rules.wind.correctionDeg[confidence] ?? 0,
      })
      const cap = caps[index]
      if (cap === low) expect(raw, `${bodyMassKg} kg`).toBeLessThan(25)
      else if (cap === 80)
        expect(roundTo(Math.min(raw, 200), 5, 'nearest'), `${bodyMassKg} kg`).toBeGreaterThanOrEqual(80)
      // 25 stands for a cap between 25 and 27.5; one just below rounds to 25 too and is called shallow by the range.
      else expect(roundTo(raw, 5, 'nearest'), `${bodyMassKg} kg, ${raw}`).toBe(cap)
    }
  })
})

describe('power and mass', () => {
  const rider = {
    massKg: 83,
    cdaM2: 0.32,
    spokeAreaM2: 0,
    rollingCoefficient: 0.004,
    airDensity: 1.225,
    chainEfficiency: 0.977,
  }
  it('3.4: 75 + 8 kg needs 145, 219, 314, 436 and 587 W at 30 to 50 km/h on the flat (DERIVED)', () => {
    for (const [speed, watts] of [
      [30, 145],
      [35, 219],
      [40, 314],
      [45, 436],
      [50, 587],
    ] as const)
      near(ridingPower({ ...rider, gradient: 0, speedMs: kmh(speed), airSpeedMs: kmh(speed) }).total, watts, 1)
  })
  it('5.1: di Prampero’s 22.2 N at 10 m/s are 222 W (MEMORY): a crouched racer of 0.317 m² is within a few watts', () => {
    const still = {
      ...rider,
      cdaM2: 0.317,
      airDensity: 1.2,
      rollingCoefficient: 0.0041,
      massKg: 80,
      chainEfficiency: 1,
    }
    const { air, rolling } = ridingPower({ ...still, gradient: 0, speedMs: 10, airSpeedMs: 10 })
    near(air + rolling, 222, 3)
  })
  it('speedAtPower agrees with bisection to 10⁻⁹ and gives the power back', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 40, max: 600, noNaN: true }),
        fc.double({ min: 0, max: 0.2, noNaN: true }),
        fc.double({ min: 50, max: 180, noNaN: true }),
        fc.double({ min: 0.2, max: 0.6, noNaN: true }),
        (watts, gradient, massKg, cdaM2) => {
          const ride = { ...rider, massKg, cdaM2, gradient }
          let [low, high] = [0, 60]
          for (let step = 0; step < 80; step += 1) {
            const middle = (low + high) / 2
            if (ridingPower({ ...ride, speedMs: middle, airSpeedMs: middle }).total < watts) low = middle
            else high = middle
          }
          const speedMs = speedAtPower(watts, ride)
          expect(Math.abs(speedMs / low - 1)).toBeLessThan(1e-9)
          const given = speedOfCubic(watts, 0.2, 0.0087, 5, 30)
          for (const guess of [0.01, 3, 12, 90])
            expect(speedOfCubic(watts, 0.2, 0.0087, 5, guess) / given).toBeCloseTo(1, 12)
        },
      ),
    )
  })
  it('downhill the answer is the speed above the free one; without power on the flat it is nothing', () => {
    const down = { ...rider, gradient: -0.05 }
    const speedMs = speedAtPower(100, down)
    near(ridingPower({ ...down, speedMs, airSpeedMs: speedMs }).total, 100, 1e-9)
    expect(speedMs).toBeGreaterThan(speedAtPower(0, down))
    expect(speedAtPower(0, { ...rider, gradient: 0 })).toBe(0)
    expect(() => speedAtPower(-1, { ...rider, gradient: 0 })).toThrow(RangeError)
    expect(() => ridingPower({ ...rider, gradient: 0, speedMs: -1, airSpeedMs: 0 })).toThrow(RangeError)
    expect(() => dragArea(0)).toThrow(RangeError)
  })
  it.each([
    [10, [0.12, 0.18, 0.23, 0.29]],
    [15, [0.18, 0.27, 0.35, 0.43]],
    [20, [0.25, 0.36, 0.47, 0.58]],
  ])('3.8: 100 g cost at %d km/h on 4, 6, 8 and 10 % (DERIVED)', (speed, watts) => {
    for (const [index, gradient] of [0.04, 0.06, 0.08, 0.1].entries()) {
      const on = { gradient, rollingCoefficient: 0.004, speedMs: kmh(speed), chainEfficiency: 0.977 }
      near(massWatts(0.1, on), watts[index] ?? 0, 0.006)
    }
  })
  it('5.6: a wheel of 0.45 kg rim and 0.33 kg tyre: about 0.077 kg m² with its hub, a pair 1.6 % of 83 kg (DERIVED)', () => {
    const { inertiaKgM2 } = wheelInertia({
      spokeCount: 24,
      tyre: { massKg: 0.33, radiusM: 0.325 },
      rim: { massKg: 0.45, radiusM: 0.3 },
      nipple: { massKg: 0, radiusM: 0.27 },
      spoke: { massKg: 0, flangeRadiusM: 0.028 },
      hub: { massKg: 0.24, radiusM: 0.025 },
      rollingRadiusM: 0.336,
    })
    near(inertiaKgM2, 0.077, 0.002)
    near(effectiveMass(83, 0.14, 0.311) - 83, 1.45, 0.01)
    near((effectiveMass(83, 0.154, 0.336) - 83) / 83, 0.016, 0.001)
  })
  it('5.6: rotating mass counts at most double in speeding up and once uphill (PRACTICE)', () => {
    expect(effectiveMass(80.5, 0.5 * 0.3 ** 2, 0.336) - effectiveMass(80, 0, 0.336)).toBeLessThanOrEqual(1)
    expect(() => effectiveMass(80, -1, 0.3)).toThrow(RangeError)
    expect(() => massWatts(1, { gradient: 0, rollingCoefficient: 0, speedMs: 5, chainEfficiency: 2 })).toThrow(
      RangeError,
    )
  })

  const uphill = { ...rider, airDensity: 1.2 }
  it.each([
    [150, [3.6, 2.6, 1.9, 2.1], [14.8, 18.1, 20.7, 19.9]],
    [200, [4.4, 3.2, 2.4, 2.7], [16.3, 19.9, 22.8, 21.9]],
    [250, [5.2, 3.8, 2.9, 3.1], [17.5, 21.4, 24.5, 23.6]],
    [300, [5.9, 4.3, 3.3, 3.6], [18.6, 22.8, 26.1, 25.1]],
    [350, [6.6, 4.9, 3.7, 4.0], [19.6, 24.0, 27.4, 26.4]],
  ])('3.8: break-even at %d W (DERIVED)', (watts, gradients, speeds) => {
    const pairs = [
      [-0.0058, 0.15],
      [-0.0058, 0.3],
      [-0.0058, 0.5],
      [-0.0027, 0.2],
    ] as const
    for (const [index, [change, kg]] of pairs.entries()) {
      const found = breakEvenAtPower(watts, uphill, change, kg)
      near(100 * found.gradient, gradients[index] ?? 0, 0.06)
      near(3.6 * found.speedMs, speeds[index] ?? 0, 0.06)
      // There both pairs are equally fast at that power.
      const [light, heavy] = [
        speedAtPower(watts, { ...uphill, gradient: found.gradient }),
        speedAtPower(watts, { ...uphill, gradient: found.gradient, massKg: 83 + kg, cdaM2: 0.32 + change }),
      ]
      near(light / found.speedMs, 1, 1e-9)
      near(heavy / light, 1, 2e-5)
    }
    expect(() => breakEvenAtPower(watts, uphill, -0.005, 0)).toThrow(RangeError)
    expect(() => breakEvenGradient(-0.005, 0, 5, 1.2, 0.004)).toThrow(RangeError)
  })
  it('3.8: 10 km at 250 W with −0.0058 m² and 0.30 kg: −5.4, −3.3, +0.4, +4.4, +7.9 s at 0 to 8 % (DERIVED)', () => {
    for (const [gradient, seconds] of [
      [0, -5.4],
      [0.02, -3.3],
      [0.04, 0.4],
      [0.06, 4.4],
      [0.08, 7.9],
    ] as const) {
      const time = (change: number, kg: number) =>
        10_000 / speedAtPower(250, { ...uphill, gradient, massKg: 83 + kg, cdaM2: 0.32 + change })
      near(time(-0.0058, 0.3) - time(0, 0), seconds, 0.06)
    }
  })
})

const base: DepthInputs = {
  bodyMassKg: 75,
  bikeMassKg: 8,
  carriedKg: 0,
  flatSpeedKmh: 32,
  positionDrag: 1,
  rollingCoefficient: 0.004,
  meanWindMs: 2.2,
  gustMs: 7,
  correctionDeg: 3,
  referenceSpeedMs: 10,
  clampMm: 80,
  terrain: { flatShare: 0.75, climbShare: 0.15, gradient: 0.04 },
  wideTyre: false,
  stallDeg: 12,
  method: rules['depth-method'],
}

describe('3.7: the whole method, with the watts of the deepest pair (DERIVED)', () => {
  const flat = { flatShare: 0.95, climbShare: 0.03, gradient: 0.03 }
  const hilly = { flatShare: 0.55, climbShare: 0.3, gradient: 0.06 }
  it.each<[string, Partial<DepthInputs>, number[], number, number?]>([
    ['50 kg', { bodyMassKg: 50, flatSpeedKmh: 28 }, [25, 30, 25, 50], 1.4],
    ['60 kg', { bodyMassKg: 60, flatSpeedKmh: 30 }, [30, 40, 30, 60], 2.6],
    ['75 kg', {}, [45, 55, 45, 75], 4.2],
    // The table's row begins at 55, where the method as written has 84 % of the best gain: one step is left open for it.
    ['90 kg', { bodyMassKg: 90 }, [55, 75, 55, 80], 4.8, 5],
    ['110 kg', { bodyMassKg: 110, flatSpeedKmh: 30 }, [60, 80, 60, 80], 4.1],
    ['75 kg exposed', { meanWindMs: 3.5, gustMs: 10 }, [25, 35, 25, 55], 2.9],
    [
      '60 kg exposed nervous',
      { bodyMassKg: 60, flatSpeedKmh: 30, meanWindMs: 3.5, gustMs: 10, correctionDeg: 2.2 },
      [25, 25, 25, 45],
      1.1,
    ],
    ['75 kg race', { flatSpeedKmh: 40, correctionDeg: 3.8, clampMm: 65, terrain: flat }, [50, 65, 50, 65], 8.1],
    [
      '70 kg time trial',
      { bodyMassKg: 70, flatSpeedKmh: 43, positionDrag: 0.75, correctionDeg: 3.8 * 0.95, clampMm: 90, terrain: flat },
      [55, 70, 55, 90],
      10.9,
    ],
    [
      '65 kg mountain',
      {
        bodyMassKg: 65,
        flatSpeedKmh: 28,
        referenceSpeedMs: 12.5,
        terrain: { flatShare: 0.35, climbShare: 0.5, gradient: 0.08 },
      },
      [25, 30, 25, 50],
      1.4,
    ],
    [
      '85 kg gravel, watts with the whole push as the row has them',
      { bodyMassKg: 85, flatSpeedKmh: 26, clampMm: 50, terrain: hilly },
      [40, 50, 40, 50],
      1.9,
    ],
    ['75 kg sheltered', { meanWindMs: 1.2, gustMs: 5, terrain: hilly }, [55, 80, 55, 80], 4.1],
  ])('%s', (_, change, range, watts, slackMm = 0) => {
    const given = { ...base, ...change }
    const found = depthRange(given)
    const ends = [found.front.from, found.front.to, found.rear.from, found.rear.to]
    for (const [index, end] of ends.entries()) near(end, range[index] ?? 0, index % 2 === 0 ? slackMm : 0)
    near(mixedPair(given, found).wattsSaved, watts, 0.11)
  })
})

it('3.7 and 2.10: on gravel the push counts half, which leaves the range and takes some of the 1.9 W', () => {
  const hilly = { flatShare: 0.55, climbShare: 0.3, gradient: 0.06 }
  const gravel = { ...base, bodyMassKg: 85, flatSpeedKmh: 26, clampMm: 50, wideTyre: true, stallDeg: 8, terrain: hilly }
  const range = depthRange(gravel)
  expect(range.front).toEqual({ from: 40, to: 50 })
  const { wattsSaved } = mixedPair(gravel, range)
  expect(wattsSaved).toBeLessThan(1.9)
  expect(wattsSaved).toBeGreaterThan(1.9 * 0.8)
})

describe('trade-off', () => {
  const depths = [25, 30, 35, 40, 45, 50, 60, 80]
  it('25 mm changes nothing; the band is ±35 %, ±60 % with wide tyres', () => {
    const [first, , , , , fifty] = tradeOff(base, depths)
    expect(first).toMatchObject({ wattsSaved: 0, secondsPerHour: 0, climbSecondsPer10Km: 0 })
    near((fifty?.wattsLow ?? 0) / (fifty?.wattsSaved ?? 1), 0.65, 1e-12)
    near((fifty?.wattsHigh ?? 0) / (fifty?.wattsSaved ?? 1), 1.35, 1e-12)
    const gravel = tradeOff({ ...base, wideTyre: true, stallDeg: 8 }, [50])[0]
    near((gravel?.wattsHigh ?? 0) / (gravel?.wattsSaved ?? 1), 1.6, 1e-12)
  })
  it('seconds are what the watts are worth at the rider’s own power, by the power model alone', () => {
    const riding = ridingOf(base)
    for (const point of tradeOff(base, depths, riding)) {
      // Riding as fast on 25 mm rims takes the watts saved on top.
      const still = { massKg: 83, cdaM2: dragArea(75), spokeAreaM2: 0, rollingCoefficient: 0.004, gradient: 0 }
      const faster = speedAtPower(riding.watts + point.wattsSaved, {
        ...still,
        airDensity: 1.225,
        chainEfficiency: 0.977,
      })
      near(point.secondsPerHour, 3600 * (1 - riding.flatSpeedMs / faster), 0.03 * point.secondsPerHour + 1e-9)
    }
  })
  const rider = fc.record({
    bodyMassKg: fc.double({ min: 40, max: 140, noNaN: true }),
    flatSpeedKmh: fc.double({ min: 20, max: 49, noNaN: true }),
    rollingCoefficient: fc.constantFrom(0.0032, 0.004, 0.008),
    meanWindMs: fc.constantFrom(1.2, 2.2, 3.5),
    gustMs: fc.constantFrom<number[]>(5, 7, 10),
    correctionDeg: fc.double({ min: 2, max: 4, noNaN: true }),
    clampMm: fc.constantFrom(35, 45, 50, 65, 80, 90),
    stallDeg: fc.double({ min: 8, max: 12, noNaN: true }),
    wideTyre: fc.boolean(),
    gradient: fc.constantFrom(0.03, 0.04, 0.06, 0.08),
    carriedKg: fc.double({ min: 0, max: 30, noNaN: true }),
  })
  const inputs = ({ gradient, ...rest }: Record<string, unknown> & { gradient: number }): DepthInputs => ({
    ...base,
    ...rest,
    terrain: { ...base.terrain, gradient },
  })
  it('deeper never saves fewer watts or seconds per hour and never pushes less; steeper climbs never flatter it', () => {
    fc.assert(
      fc.property(rider, (one) => {
        const points = tradeOff(inputs(one), depths)
        const steeper = tradeOff(inputs({ ...one, gradient: one.gradient + 0.02 }), depths)
        for (const [index, point] of points.entries()) {
          const before = points[index - 1]
          if (before) {
            expect(point.wattsSaved).toBeGreaterThanOrEqual(before.wattsSaved)
            expect(point.secondsPerHour).toBeGreaterThanOrEqual(before.secondsPerHour)
            expect(point.gustMomentNm).toBeGreaterThan(before.gustMomentNm)
          }
          expect(point.wattsLow).toBeLessThanOrEqual(point.wattsSaved)
          expect(point.wattsHigh).toBeGreaterThanOrEqual(point.wattsSaved)
          expect(steeper[index]?.climbSecondsPer10Km ?? 0).toBeGreaterThanOrEqual(point.climbSecondsPer10Km - 1e-9)
        }
      }),
    )
  })
  it('faster saves more watts; a rear swap alone saves 0.6/0.9 of a front swap; table and integral give one range', () => {
    fc.assert(
      fc.property(rider, fc.integer({ min: 26, max: 90 }), (one, mm) => {
        const given = inputs(one)
        const riding = ridingOf(given)
        const front = pairWatts(given, riding, mm, 25, 'flat')
        near(pairWatts(given, riding, 25, mm, 'flat') / front, 0.6 / 0.9, 1e-9)
        const faster = { ...given, flatSpeedKmh: given.flatSpeedKmh + 1 }
        expect(pairWatts(faster, ridingOf(faster), mm, mm, 'flat')).toBeGreaterThan(
          pairWatts(given, riding, mm, mm, 'flat'),
        )
        expect(depthRange(given, ridingOf(given, true)).front.to).toBe(depthRange(given).front.to)
      }),
    )
  })
  it('lighter, windier or more nervous is never advised deeper; nobody past the clamp; the front never deeper than the rear', () => {
    fc.assert(
      fc.property(rider, (one) => {
        const range = depthRange(inputs(one))
        const to = (change: Partial<typeof one>) => {
          const { front, rear } = depthRange(inputs({ ...one, ...change }))
          expect(front.to).toBeLessThanOrEqual(range.front.to)
          expect(rear.to).toBeLessThanOrEqual(range.rear.to)
        }
        to({ bodyMassKg: one.bodyMassKg * 0.9 })
        to({ gustMs: one.gustMs + 1 })
        to({ correctionDeg: one.correctionDeg - 0.3 })
        expect(range.front.to).toBeLessThanOrEqual(one.clampMm)
        expect(range.rear.to).toBeLessThanOrEqual(one.clampMm)
        expect(range.front.to).toBeLessThanOrEqual(range.rear.to)
        expect(range.front.from).toBeGreaterThanOrEqual(25)
        expect(range.front.from).toBeLessThanOrEqual(range.front.to)
      }),
    )
  })
  it('what is carried never allows a deeper rim, and rougher ground costs climbing time', () => {
    fc.assert(
      fc.property(rider, (one) => {
        const given = inputs(one)
        expect(depthRange({ ...given, carriedKg: given.carriedKg + 20 }).front.to).toBe(depthRange(given).front.to)
        expect(ridingOf({ ...given, rollingCoefficient: 0.009 }).watts).toBeGreaterThan(ridingOf(given).watts)
      }),
    )
  })
})
