/** Rider limits and spoke counts against the tables of the wheel reference, and the demo range against its own limits. */
import { describe, expect, it } from 'vitest'
import { checkLimit, lowestLimit } from '#core/limits.ts'
import { riderLimit, strengthOf, useOf, type WheelStrength, type WheelUse } from '#core/rider-limits.ts'
import { rulesFrom } from '#core/rules.ts'
import { leastCounts, spokeAdvice, structuralLimit, type CountLimit } from '#core/spokes.ts'
import { solveWheel } from '#core/wheel-structure.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { referenceCounts, referenceDesign } from '../../server/seeds/reference-builds.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import { solveSeeds } from '../../server/seeds/solve-seeds.ts'
import { solvedWheels } from '../../server/seeds/solved-wheels.ts'

const rules = rulesFrom(ruleTables)
const letters = { A: 'tension-reserve', B: 'side-stiffness', C: 'fatigue', E: 'torque' } as const

const solved = new Map<string, WheelStrength>()
function strength(
  use: WheelUse,
  material: 'alloy' | 'carbon',
  depthMm: number,
  position: 'front' | 'rear',
  count: number,
) {
  const key = [use, material, depthMm, position, count].join()
  const known = solved.get(key)
  if (known) return known
  const design = referenceDesign(use, { material, depthMm }, position, count)
  const fresh = strengthOf(solveWheel(design, { tightN: 1200 }).structure, position)
  solved.set(key, fresh)
  return fresh
}
const limitsOf = (
  use: WheelUse,
  material: 'alloy' | 'carbon',
  depthMm: number,
  position: 'front' | 'rear',
): CountLimit[] =>
  referenceCounts.map((count) => ({
    count,
    ...riderLimit(strength(use, material, depthMm, position, count), position, use, rules),
  }))

/** Wheel reference 4.12 (DERIVED, two elements per gap): kg, governing letter, x = not robust, f = below the trade floor. */
const table: [WheelUse, 'alloy' | 'carbon', number, string, string][] = [
  ['road-rim', 'alloy', 18, '82Bx 96Cx 111C 121C 133C 145C', '56Bx 61Ax 69Ax 84A 92A 100A'],
  ['road-rim', 'alloy', 24, '97Cx 116C 131C 143C 160C 176C', '67Ax 73Ax 84A 102A 112A 123A'],
  ['road-rim', 'carbon', 30, '98Bx 119B 137B 144B 152B 168B', '66Bx 78B 92B 92B 105B 117B'],
  ['road-rim', 'carbon', 45, '122B 146B 169B 177B 187B 207B', '80Bf 94B 112B 111B 127B 143B'],
  ['road-rim', 'carbon', 60, '143B 172B 199B 208B 219B 244B', '94Bf 110B 131B 128B 149B 168B'],
  ['road-disc', 'alloy', 24, '75Ex 99Ex 111E 130E 144E 156E', '71Cx 82Cx 95C 108C 121C 134C'],
  ['road-disc', 'carbon', 30, '84Bx 92B 112B 118B 135B 151B', '74Bx 82Bf 100B 105B 121B 136B'],
  ['road-disc', 'carbon', 45, '95Ef 111B 136B 143B 166B 186B', '91Bf 98Bf 121B 127B 148B 167B'],
  ['road-disc', 'carbon', 60, '102Ef 129B 159B 167B 194B 219B', '106Bf 114Bf 141B 148B 173B 196B'],
  ['gravel', 'alloy', 24, '75Cx 86Cx 99C 113C 126C 140C', '57Cx 67Cx 78C 90C 101C 112C'],
  ['gravel', 'carbon', 30, '86Ex 101Bf 123C 130B 149B 166B', '68Cx 82Cf 97C 113C 126C 139C'],
  ['gravel', 'carbon', 45, '96Ef 123Bf 150B 158B 182B 205B', '84Cf 104Cf 123C 140B 158C 175C'],
  ['gravel', 'carbon', 60, '103Ef 143Bf 170E 184B 213B 241B', '97Cf 122Cf 142C 163B 184C 204C'],
  ['mountain', 'carbon', 25, '64Cx 78Cf 92C 106C 120C 132C', '56Cx 69Cf 81C 95C 107C 118C'],
  ['mountain', 'carbon', 30, '66Cx 80Cf 95C 110C 124C 136C', '58Cx 71Cf 84C 98C 110C 121C'],
  ['mountain', 'carbon', 45, '83Cf 103Cf 123C 141C 157C 173C', '72Cx 91Cf 108C 124C 139C 153C'],
  ['mountain', 'carbon', 60, '98Cf 123Cf 143C 165C 184C 203C', '85Cx 107Cf 125C 144C 162C 179C'],
]

describe('rider limit by count and criterion, wheel reference 4.12 (DERIVED): to 1 kg', () => {
  it.each(table)('%s %s %i mm', (use, material, depthMm, front, rear) => {
    for (const [position, cells] of [
      ['front', front],
      ['rear', rear],
    ] as const) {
      const limits = limitsOf(use, material, depthMm, position)
      cells.split(' ').forEach((cell, i) => {
        const [, kg, letter, mark] = /^(\d+)([ABCE])([xf]?)$/.exec(cell) ?? []
        const limit = limits[i]
        const name = `${position} ${limit?.count}: ${cell}`
        expect(Math.abs((limit?.riderKg ?? 0) - Number(kg)), name).toBeLessThanOrEqual(1.01)
        expect(limit?.governedBy, name).toBe(letters[letter as keyof typeof letters])
        expect(limit?.robust, name).toBe(mark !== 'x')
      })
    }
  })
})

describe('spoke counts by rider mass, wheel reference 4.13 (DERIVED)', () => {
  const masses = [50, 60, 70, 80, 90, 100, 110, 120, 130, 140]
  it.each<[WheelUse, 'alloy' | 'carbon', number, string]>([
    ['road-rim', 'alloy', 18, '24/28 24/28 24/28 24/28 28/32 24/- 24/- 28/- 32/- 36/-'],
    ['road-rim', 'alloy', 24, '20/24 20/24 20/24 20/24 24/28 24/28 28/32 32/36 24/- 28/-'],
    ['road-rim', 'carbon', 30, '20/20 20/20 20/20 20/24 20/24 28/32 32/36 24/- 24/- 28/-'],
    ['road-rim', 'carbon', 45, '16/20 16/20 16/20 16/20 16/20 20/24 20/24 28/32 32/36 32/36'],
    ['road-rim', 'carbon', 60, '16/20 16/20 16/20 16/20 16/20 16/20 20/24 20/24 20/24 28/32'],
    ['road-disc', 'alloy', 24, '24/24 24/24 24/24 24/24 24/24 24/28 28/32 28/32 32/36 32/-'],
    ['road-disc', 'carbon', 30, '20/24 20/24 20/24 20/24 20/24 24/24 28/32 32/32 32/36 36/-'],
    ['road-disc', 'carbon', 45, '20/24 20/24 20/24 20/24 20/24 20/24 20/24 24/24 28/32 28/32'],
    ['road-disc', 'carbon', 60, '20/24 20/24 20/24 20/24 20/24 20/24 20/24 20/24 24/24 24/24'],
    ['gravel', 'alloy', 24, '24/24 24/24 24/24 24/28 28/32 28/32 32/36 32/- 36/- -/-'],
    ['gravel', 'carbon', 30, '24/24 24/24 24/24 24/24 24/24 24/28 24/28 28/32 32/36 32/-'],
    ['gravel', 'carbon', 45, '24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/28 24/28'],
    ['gravel', 'carbon', 60, '24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/24'],
    ['mountain', 'carbon', 30, '24/24 24/24 24/24 24/24 24/28 28/32 32/36 32/36 36/- -/-'],
    ['mountain', 'carbon', 45, '24/24 24/24 24/24 24/24 24/24 24/24 24/28 24/28 28/32 32/36'],
    ['mountain', 'carbon', 60, '24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/24 24/28 24/28'],
    ['mountain', 'carbon', 25, '24/24 24/24 24/24 24/24 24/28 28/32 32/36 36/- 36/- -/-'],
  ])('%s %s %i mm', (use, material, depthMm, expected) => {
    const limits = { front: limitsOf(use, material, depthMm, 'front'), rear: limitsOf(use, material, depthMm, 'rear') }
    const floors = rules['spoke-floors'].byUse[use] ?? { front: 0, rear: 0 }
    const got = masses.map((riderKg) => {
      const { front, rear } = leastCounts(limits, riderKg, { ...floors, frontMayBeFewerBy: 4 })
      return `${front?.count ?? '-'}/${rear?.count ?? '-'}`
    })
    expect(got.join(' ')).toBe(expected)
  })
})

describe('worked rider checks, wheel reference 4.11 (DERIVED; rear wheels)', () => {
  it.each<
    [
      string,
      WheelUse,
      'alloy' | 'carbon',
      number,
      number,
      number,
      Partial<Record<'A' | 'B' | 'C' | 'E', number>>,
      keyof typeof letters,
      number,
    ]
  >([
    [
      '80 kg, road disc carbon 45, 24 2x',
      'road-disc',
      'carbon',
      45,
      24,
      3252,
      { A: 200, B: 121, C: 151, E: 162 },
      'B',
      121,
    ],
    [
      '100 kg, rim-brake alloy 24, 32 3x',
      'road-rim',
      'alloy',
      24,
      32,
      1899,
      { A: 112, B: 121, C: 119, E: 123 },
      'A',
      112,
    ],
    ['100 kg, gravel carbon 30, 28 3x', 'gravel', 'carbon', 30, 28, 2655, {}, 'C', 113],
    ['80 kg, XC carbon 25 × 30, 28 3x', 'mountain', 'carbon', 25, 28, 2694, {}, 'C', 95],
  ])('%s', (_name, use, material, depthMm, count, slackN, byLetter, governing, limitKg) => {
    const wheel = strength(use, material, depthMm, 'rear', count)
    expect(Math.abs(wheel.firstSlackN / slackN - 1)).toBeLessThan(0.005)
    const limit = riderLimit(wheel, 'rear', use, rules)
    for (const [letter, kg] of Object.entries(byLetter))
      expect(Math.abs((limit.byCriterion[letters[letter as keyof typeof letters]] ?? 0) - kg), letter).toBeLessThan(1.1)
    expect(limit.governedBy).toBe(letters[governing])
    expect(Math.abs(limit.riderKg - limitKg)).toBeLessThan(1)
  })
  it('says its doubt: the band is a quarter each way', () => {
    const { systemKg, bandKg } = riderLimit(strength('road-disc', 'carbon', 45, 'rear', 24), 'rear', 'road-disc', rules)
    expect(bandKg.low / systemKg).toBeCloseTo(0.75, 9)
    expect(bandKg.high / systemKg).toBeCloseTo(1.25, 9)
  })
})

describe('the demo range', () => {
  it('stated limits stay at or under what the structure carries, for every ride a wheelset is offered for', () => {
    for (const set of wheelsetFacts)
      for (const ride of set.rides) {
        const structural = structuralLimit(set, useOf(ride, set.brake), rules)
        expect(structural?.limit.robust, `${set.sku} ${ride}`).toBe(true)
        expect(structural?.limit.systemKg ?? 0, `${set.sku} ${ride}`).toBeGreaterThanOrEqual(set.limitKg)
      }
  })
  it('is solved, and the kept solutions are what the model finds today', () => {
    expect(JSON.parse(JSON.stringify(solveSeeds()))).toEqual(solvedWheels)
  })
})

describe('the lowest limit wins and is named', () => {
  const base = wheelsetFacts.find(({ sku }) => sku === 'ROWAN-45-D')
  if (!base) throw new Error('demo wheelset gone')
  const of = (change: object) => ({ ...base, ...change })
  const loads = { front: 40, rear: 60 }

  it('the stated limit where nothing is lower', () => {
    expect(lowestLimit(base, 100, loads, null)).toEqual({ limitKg: base.limitKg, from: 'system' })
  })
  it('the structure where the stated limit promises more', () => {
    const set = of({ limitKg: 400 })
    const structural = structuralLimit(set, 'road-disc', rules)
    expect(lowestLimit(set, 80, { front: 32, rear: 48 }, structural)).toMatchObject({ from: 'structure' })
  })
  it('an axle, as the total at which it reaches its rating with this split', () => {
    const set = of({ rear: { ...base.rear, maxAxleLoadKg: 60 } })
    expect(lowestLimit(set, 110, { front: 40, rear: 70 }, null)).toEqual({
      limitKg: (60 * 110) / 70,
      from: 'axle-rear',
    })
    expect(checkLimit(110, (60 * 110) / 70).verdict).toBe('over-limit')
  })
  it('an axle that nobody rated is not checked', () => {
    const set = of({ front: { ...base.front, maxAxleLoadKg: null }, rear: { ...base.rear, maxAxleLoadKg: null } })
    expect(lowestLimit(set, 119, { front: 1, rear: 118 }, null).from).toBe('system')
  })
  it('an exact hit on a limit has no margin and is not over; a gram more is', () => {
    expect(checkLimit(120, 120)).toEqual({ verdict: 'no-margin', marginKg: 0 })
    expect(checkLimit(120.001, 120).verdict).toBe('over-limit')
  })
})

describe('advised counts', () => {
  const ask = (totalKg: number) =>
    spokeAdvice({ ride: 'road-long', brakes: 'disc', assist: 'none', luggageKg: 0, totalKg }, rules)
  it('never fall as the total grows, and the least never passes the advised', () => {
    let before = ask(45)
    for (let totalKg = 46; totalKg < 200; totalKg += 1) {
      const now = ask(totalKg)
      for (const position of ['front', 'rear'] as const) {
        expect(now[position].min).toBeGreaterThanOrEqual(before[position].min)
        expect(now[position].advised).toBeGreaterThanOrEqual(now[position].min)
        const { limitKg } = now[position]
        if (limitKg) expect(limitKg.estimate).toBeGreaterThanOrEqual(totalKg)
      }
      before = now
    }
  })
  it('beyond the table say so and promise no limit', () => {
    expect(ask(260).rear).toMatchObject({ beyondTable: true, limitKg: null, min: 36 })
  })
})
