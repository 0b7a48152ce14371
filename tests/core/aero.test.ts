/** Check cases of the depth, wind, power and brake-heat method; the values are the reference's, with its labels. */
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { airDensity } from '#core/air-density.ts'
import {
  brakingPower,
  freeSpeed,
  rimHeat,
  rimTemperature,
  rotorRise,
  worstPowerSpeed,
  worstRim,
  worstRimSpeed,
} from '#core/brake-heat.ts'
import { dragArea, dragAreaFromHeight, ridingPower, windOnRider } from '#core/power.ts'
import { rulesFrom } from '#core/rules.ts'
import { breakEvenGradient } from '#core/trade-off.ts'
import { depthRange, frontDepthCap, gustMoment, steeringStiffness, type DepthInputs } from '#core/rim-depth.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import { dragChange, meanWattsSaved, sideForceArea, wheelDragArea } from '#core/wheel-drag.ts'

describe('power on the road (Martin et al. 1998, worked example READ via open transcriptions)', () => {
  const wind = windOnRider(8.36, 2.94, 310, 340)
  it('G2: 2.94 m/s from 310° at 8.36 m/s towards 340° is 10.91 m/s at 7.68°', () => {
    expect(Math.abs(wind.airSpeedMs - 10.91)).toBeLessThan(0.02)
    expect(Math.abs(wind.yawDeg - 7.68)).toBeLessThan(0.02)
  })
  it('G1: 213.3 W, of which 158.8 air, 23.6 rolling, 1.37 bearings, 22.1 climbing, 2.305 speeding up', () => {
    const power = ridingPower(
      {
        speedMs: 471.8 / 56.42,
        airSpeedMs: 10.91,
        massKg: 90,
        cdaM2: 0.2565,
        spokeAreaM2: 0.0044,
        rollingCoefficient: 0.0032,
        gradient: 0.003,
        airDensity: 1.2234,
        chainEfficiency: 0.976,
        gravity: 9.81,
      },
      { fromMs: 8.28, toMs: 8.45, seconds: 56.42, inertia: 0.14, radiusM: 0.311 },
    )
    const expected = { total: 213.3, air: 158.8, rolling: 23.6, bearings: 1.37, climbing: 22.1, accelerating: 2.305 }
    for (const [part, watts] of Object.entries(expected))
      expect(Math.abs(power[part as keyof typeof power] - watts), part).toBeLessThan(0.3)
  })
  const still = { spokeAreaM2: 0, gradient: 0 }
  it('G3: bearings take 1.369 W at 8.36 m/s and 0.551 W at 4.293 m/s', () => {
    const at = (speedMs: number) =>
      ridingPower({
        ...still,
        speedMs,
        airSpeedMs: speedMs,
        massKg: 80,
        cdaM2: 0.3,
        rollingCoefficient: 0.004,
        airDensity: 1.2,
        chainEfficiency: 1,
      }).bearings
    expect(Math.abs(at(8.36) - 1.369)).toBeLessThan(0.005)
    expect(Math.abs(at(4.293) - 0.551)).toBeLessThan(0.005)
  })
  it('G4: an hour record pace of 54.526 km/h takes 440.96 W', () => {
    const speedMs = 54.526 / 3.6
    const { total } = ridingPower({
      speedMs,
      airSpeedMs: speedMs,
      massKg: 82,
      cdaM2: 0.19,
      spokeAreaM2: 0.0044,
      rollingCoefficient: 0.0025,
      gradient: 0,
      airDensity: 1.1793,
      chainEfficiency: 0.98,
    })
    expect(Math.abs(total - 440.96)).toBeLessThan(0.2)
  })
  it('G5: 5.55 m/s up 8.125 % takes 389.9 W', () => {
    const { total } = ridingPower({
      speedMs: 5.55,
      airSpeedMs: 5.55,
      massKg: 75,
      cdaM2: 0.31,
      spokeAreaM2: 0.0044,
      rollingCoefficient: 0.004,
      gradient: 0.08125,
      airDensity: 1.225,
      chainEfficiency: 0.976,
    })
    expect(Math.abs(total - 389.9)).toBeLessThan(0.3)
  })
  it('G6: 4.293 m/s up 7.9 % with 2.327 m/s of air, speeding up over 3 240 s, takes 334.9 W', () => {
    const { total } = ridingPower(
      {
        speedMs: 4.293,
        airSpeedMs: 2.327,
        massKg: 85,
        cdaM2: 0.4,
        spokeAreaM2: 0.0044,
        rollingCoefficient: 0.008,
        gradient: 0.079,
        airDensity: 1.1921,
        chainEfficiency: 0.95,
      },
      { fromMs: 0, toMs: 11.111, seconds: 3240, inertia: 0.12, radiusM: 0.339 },
    )
    expect(Math.abs(total - 334.9)).toBeLessThan(0.3)
  })
  it('G10: 2.94 m/s of wind turns the air at 13.4 m/s by no more than 12.67°', () => {
    const yaws = Array.from({ length: 3601 }, (_, step) => windOnRider(13.4, 2.94, step / 20, 0).yawDeg)
    expect(Math.abs(Math.max(...yaws) - 12.67)).toBeLessThan(0.1)
  })
  it('G7: 80 kg from 10 to 15 m/s in 10 s takes 500 W; half a kilogram at the rim makes it 506.25', () => {
    const none = {
      speedMs: 0,
      airSpeedMs: 0,
      cdaM2: 0,
      spokeAreaM2: 0,
      rollingCoefficient: 0,
      gradient: 0,
      airDensity: 1.2,
      chainEfficiency: 1,
    }
    const change = { fromMs: 10, toMs: 15, seconds: 10, radiusM: 0.3 }
    expect(ridingPower({ ...none, massKg: 80 }, { ...change, inertia: 0 }).total).toBeCloseTo(500, 2)
    expect(ridingPower({ ...none, massKg: 80.5 }, { ...change, inertia: 0.5 * 0.3 ** 2 }).total).toBeCloseTo(506.25, 2)
  })
  it('G8: 1.75 m and 69 kg give 0.2284 m² on aero bars and 0.3653 m² in the drops', () => {
    expect(dragAreaFromHeight(1.75, 69, 'aero')).toBeCloseTo(0.2284, 3)
    expect(dragAreaFromHeight(1.75, 69, 'drops')).toBeCloseTo(0.3653, 3)
  })
  it.each([
    [50, 0.252],
    [60, 0.28],
    [75, 0.32],
    [90, 0.357],
    [110, 0.402],
  ])('3.1: a rider of %d kg has about %f m² on the hoods', (kg, area) => {
    expect(Math.abs(dragArea(kg) - area)).toBeLessThan(0.001)
  })
})

it('G9: standard atmosphere 1.2250, 1.1116 and 0.9046 kg/m³ at 0, 1 000 and 3 048 m', () => {
  for (const [height, density] of [
    [0, 1.225],
    [1000, 1.1116],
    [3048, 0.9046],
  ] as const) {
    expect(Math.abs(airDensity(height) - density)).toBeLessThan(0.0005)
  }
  expect(airDensity(0, 20)).toBeCloseTo(1.2041, 3)
})

describe('wheel drag', () => {
  it('G12: 60 mm at 10° has CdA 0.01061, change −0.00695, side-force area 0.0599 m²', () => {
    expect(wheelDragArea(60, 10) / 0.01061).toBeCloseTo(1, 2)
    expect(dragChange(60, 10) / -0.00695).toBeCloseTo(1, 2)
    expect(sideForceArea(60, 10) / 0.0599).toBeCloseTo(1, 2)
  })
  // Table 3.4, DERIVED there: watts of a matched pair against 25 mm.
  it.each([
    [1.2, 30, [0.8, 1.9, 2.5, 3.0, 3.5]],
    [2.2, 40, [2.0, 4.7, 6.5, 7.6, 9.2]],
    [3.5, 45, [3.0, 7.1, 9.8, 11.7, 14.1]],
  ])('3.4: mean wind %f m/s at %d km/h', (meanWindMs, kmh, watts) => {
    const pair = (depthMm: number) =>
      1.5 * meanWattsSaved({ depthMm, speedMs: kmh / 3.6, meanWindMs, airDensity: 1.225, chainEfficiency: 0.977 })
    for (const [index, depthMm] of [30, 40, 50, 60, 80].entries())
      expect(Math.abs(pair(depthMm) - (watts[index] ?? 0))).toBeLessThan(0.2)
  })
  it('G13: a 50 mm pair saves 5.0 W at 40 km/h in still air', () => {
    expect(
      Math.abs(
        1.5 *
          meanWattsSaved({
            depthMm: 50,
            speedMs: 40 / 3.6,
            meanWindMs: 1e-9,
            airDensity: 1.225,
            chainEfficiency: 0.977,
          }) -
          5,
      ),
    ).toBeLessThan(0.2)
  })
  it('a 25 mm rim saves nothing at any yaw, the sail is gone 8° past the stall, watts go with air density', () => {
    for (const yaw of [0, 5, 12, 20]) expect(dragChange(25, yaw)).toBeCloseTo(0, 12)
    expect(dragChange(80, 20)).toBeCloseTo(dragChange(80, 0), 12)
    const at = (density: number) =>
      meanWattsSaved({ depthMm: 50, speedMs: 10, meanWindMs: 2.2, airDensity: density, chainEfficiency: 1 })
    expect(at(2.4) / at(1.2)).toBeCloseTo(2, 9)
  })
})

describe('gusts and the front cap', () => {
  const typical = { bikeMassKg: 8, gustMs: 7, speedMs: 10, correctionDeg: 3 }
  it.each([
    [75, 57],
    [90, 75],
    [50, 30],
  ])('G14: %d kg in typical wind at average confidence: about %d mm', (bodyMassKg, mm) => {
    expect(Math.abs(frontDepthCap({ ...typical, bodyMassKg }) - mm)).toBeLessThan(1)
  })
  it('G14: exposed at 75 kg: 34 mm', () => {
    expect(Math.abs(frontDepthCap({ ...typical, gustMs: 10, bodyMassKg: 75 }) - 34)).toBeLessThan(1)
  })
  it('G15: a gust of 7 m/s at 10 m/s on 50 mm puts 0.92 N·m on the bars: 2.78° for 75 kg', () => {
    const moment = gustMoment(50, 10, 7)
    expect(moment / 0.92).toBeCloseTo(1, 2)
    expect(((moment / steeringStiffness(75, 8)) * 180) / Math.PI / 2.78).toBeCloseTo(1, 2)
  })
  it('G16: break-even at 2.56 %', () => {
    expect(Math.abs(breakEvenGradient(0.0058, 0.3, 5, 1.2, 0.004) * 100 - 2.56)).toBeLessThan(0.02)
  })
  // Table 3.7, DERIVED there: front and rear range of the whole method.
  const base: DepthInputs = {
    bodyMassKg: 75,
    bikeMassKg: 8,
    flatSpeedKmh: 32,
    carriedKg: 0,
    positionDrag: 1,
    rollingCoefficient: 0.004,
    stallDeg: 12,
    method: rulesFrom(ruleTables)['depth-method'],
    meanWindMs: 2.2,
    gustMs: 7,
    correctionDeg: 3,
    referenceSpeedMs: 10,
    clampMm: 80,
    terrain: { flatShare: 0.75, climbShare: 0.15, gradient: 0.04 },
    wideTyre: false,
  }
  it.each<[string, Partial<DepthInputs>, number[]]>([
    ['50 kg, 28 km/h', { bodyMassKg: 50, flatSpeedKmh: 28 }, [25, 30, 25, 50]],
    ['60 kg, 30 km/h', { bodyMassKg: 60, flatSpeedKmh: 30 }, [30, 40, 30, 60]],
    ['75 kg, 32 km/h', {}, [45, 55, 45, 75]],
    ['75 kg, exposed', { meanWindMs: 3.5, gustMs: 10 }, [25, 35, 25, 55]],
    ['110 kg, 30 km/h', { bodyMassKg: 110, flatSpeedKmh: 30 }, [60, 80, 60, 80]],
    [
      '75 kg mass start',
      {
        flatSpeedKmh: 40,
        correctionDeg: 3.8,
        clampMm: 65,
        terrain: { flatShare: 0.95, climbShare: 0.03, gradient: 0.03 },
      },
      [50, 65, 50, 65],
    ],
    [
      '65 kg in the mountains',
      {
        bodyMassKg: 65,
        flatSpeedKmh: 28,
        referenceSpeedMs: 12.5,
        terrain: { flatShare: 0.35, climbShare: 0.5, gradient: 0.08 },
      },
      [25, 30, 25, 50],
    ],
    [
      '85 kg gravel, hilly',
      {
        bodyMassKg: 85,
        flatSpeedKmh: 26,
        clampMm: 50,
        wideTyre: true,
        terrain: { flatShare: 0.55, climbShare: 0.3, gradient: 0.06 },
      },
      [40, 50, 40, 50],
    ],
    [
      '75 kg sheltered, hilly',
      { meanWindMs: 1.2, gustMs: 5, terrain: { flatShare: 0.55, climbShare: 0.3, gradient: 0.06 } },
      [55, 80, 55, 80],
    ],
  ])('3.7: %s', (_, change, [from, to, rearFrom, rearTo]) => {
    const { front, rear } = depthRange({ ...base, ...change })
    expect([front.from, front.to, rear.from, rear.to]).toEqual([from, to, rearFrom, rearTo])
  })
  it('3.7: a light nervous rider on the coast is told that the wind allows no more than the shallowest', () => {
    const range = depthRange({
      ...base,
      bodyMassKg: 60,
      flatSpeedKmh: 30,
      meanWindMs: 3.5,
      gustMs: 10,
      correctionDeg: 2.2,
    })
    expect(range.shallow).toBe(true)
    expect(range.front.to).toBe(25)
    expect(range.rear.to).toBe(45)
  })
})

describe('relations of the depth method (aero reference 4.3)', () => {
  const depth = fc.double({ min: 25, max: 100, noNaN: true })
  const rider = fc.record({
    bodyMassKg: fc.double({ min: 40, max: 140, noNaN: true }),
    bikeMassKg: fc.double({ min: 6, max: 20, noNaN: true }),
    gustMs: fc.double({ min: 3, max: 12, noNaN: true }),
    speedMs: fc.double({ min: 8, max: 15, noNaN: true }),
    correctionDeg: fc.double({ min: 2, max: 4, noNaN: true }),
  })
  it('deeper has the larger side force at every yaw and the larger gust moment', () => {
    fc.assert(
      fc.property(depth, fc.double({ min: 0.5, max: 20, noNaN: true }), (mm, yaw) => {
        expect(sideForceArea(mm + 1, yaw)).toBeGreaterThan(sideForceArea(mm, yaw))
        expect(gustMoment(mm + 1, 10, 7)).toBeGreaterThan(gustMoment(mm, 10, 7))
      }),
    )
  })
  it('more mass never lowers the cap; a stronger gust or less confidence never raises it', () => {
    fc.assert(
      fc.property(rider, (given) => {
        const cap = frontDepthCap(given)
        expect(frontDepthCap({ ...given, bodyMassKg: given.bodyMassKg + 5 })).toBeGreaterThanOrEqual(cap)
        expect(frontDepthCap({ ...given, gustMs: given.gustMs + 1 })).toBeLessThanOrEqual(cap)
        expect(frontDepthCap({ ...given, correctionDeg: given.correctionDeg - 0.5 })).toBeLessThanOrEqual(cap)
      }),
    )
  })
  it('the cap is where the gust asks for just the correction that the rider accepts', () => {
    fc.assert(
      fc.property(rider, (given) => {
        const cap = frontDepthCap(given)
        if (cap > 250) return
        const asked =
          gustMoment(cap, given.speedMs, given.gustMs) / steeringStiffness(given.bodyMassKg, given.bikeMassKg)
        expect((asked * 180) / Math.PI / given.correctionDeg).toBeCloseTo(1, 9)
      }),
    )
  })
})

describe('brake heat', () => {
  const descent = { massKg: 99, gradient: 0.08, cdaM2: 0.35, rollingCoefficient: 0.005, airDensity: 1.2 }
  it('G17: 99 kg down 8 % at 25 km/h: 434 W, alloy 56 °C, carbon 79 °C; worst speeds 38.6 and 29.9 km/h', () => {
    const watts = brakingPower(descent, 25 / 3.6)
    expect(Math.abs(watts - 434)).toBeLessThan(1)
    expect(Math.abs(rimTemperature(rimHeat.alloy, watts, 0.6, 25 / 3.6) - 56)).toBeLessThan(1)
    expect(Math.abs(rimTemperature(rimHeat.carbon, watts, 0.6, 25 / 3.6) - 79)).toBeLessThan(1)
    const free = freeSpeed(descent)
    expect(Math.abs(free * 3.6 - 66.9)).toBeLessThan(0.2)
    expect(Math.abs(worstPowerSpeed(free) * 3.6 - 38.6)).toBeLessThan(0.2)
    expect(Math.abs(worstRimSpeed(free) * 3.6 - 29.9)).toBeLessThan(0.2)
  })
  it('G18: 190 kg down 10 % on 20-inch rims passes 120 °C (tape melted in reality, PRACTICE)', () => {
    const tandem = { massKg: 190, gradient: 0.1, cdaM2: 0.5, rollingCoefficient: 0.005, airDensity: 1.2 }
    const watts = brakingPower(tandem, 25 / 3.6)
    expect(Math.abs(watts - 1123)).toBeLessThan(3)
    const small = { ...rimHeat.alloy, areaM2: rimHeat.alloy.areaM2 * 0.666, capacity: rimHeat.alloy.capacity * 0.666 }
    const celsius = rimTemperature(small, watts, 0.6, 25 / 3.6, 25, 317)
    expect(Math.abs(celsius - 163)).toBeLessThan(3)
    expect(celsius).toBeGreaterThan(120)
  })
  // Worst-speed table of 3.9, DERIVED there: alloy 60 % and carbon 70 % on one rim.
  it.each([
    [0.08, 79, 47, 73],
    [0.1, 99, 69, 116],
    [0.12, 119, 98, 175],
  ])('3.9: at a gradient of %f, %d kg: alloy %d °C, carbon %d °C', (gradient, massKg, alloy, carbon) => {
    const steep = { ...descent, gradient, massKg }
    expect(Math.abs(worstRim(steep, 'alloy', 0.6) - alloy)).toBeLessThan(1.5)
    expect(Math.abs(worstRim(steep, 'carbon', 0.7) - carbon)).toBeLessThan(1.5)
  })
  it('500 W on one rim at 30 km/h gives 83 °C alloy and 125 °C carbon (common practice drag, model figure of 5.5)', () => {
    expect(Math.abs(rimTemperature(rimHeat.alloy, 500, 1, 30 / 3.6) - 83)).toBeLessThan(1.5)
    expect(Math.abs(rimTemperature(rimHeat.carbon, 500, 1, 30 / 3.6) - 125)).toBeLessThan(1.5)
  })
  it('G19: a 150 g rotor rises 66.7 K stopping 100 kg from 10 m/s, 130 K over 10 m of height', () => {
    expect(Math.abs(rotorRise(0.5 * 100 * 10 ** 2, 0.15, 500) - 66.7)).toBeLessThan(1)
    // 100 m of road down 1 in 10, less nothing: 9 751 J by the reference's own arithmetic.
    expect(Math.abs(rotorRise(9751, 0.15, 500) - 130)).toBeLessThan(1)
  })
})
