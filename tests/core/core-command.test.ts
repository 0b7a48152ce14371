/** `npm run -s core -- <name>` as a program beside us would call it: one object in, one out, and clear words for what cannot be answered. */
import { execFileSync, spawnSync } from 'node:child_process'
import { readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { answer, sums } from '../../server/bin/core/sums.ts'
import reference from './reference/personas.json'

const root = path.resolve(import.meta.dirname, '../..')
const call = (name: string, input: unknown) => {
  const { out, error, code } = answer(name, JSON.stringify(input))
  expect(error).toBe('')
  expect(code).toBe(0)
  return JSON.parse(out) as { total: number; depthMm: number; rimC: number; pressure: Record<string, number> }
}

describe('as a process', () => {
  const run = (args: string[], input: string) =>
    spawnSync('npm', ['run', '-s', 'core', '--', ...args], { cwd: root, input, encoding: 'utf8' })

  it('reads one object and prints one: first case of the wheel reference', () => {
    const { cases } = JSON.parse(
      readFileSync(path.join(import.meta.dirname, 'reference/wheel-cases.json'), 'utf8'),
    ) as { cases: { input: object; result: { P_first_slack_N: number } }[] }
    const [first] = cases
    const out = execFileSync('npm', ['run', '-s', 'core', '--', 'wheel-structure'], {
      cwd: root,
      input: JSON.stringify(first?.input),
      encoding: 'utf8',
    })
    const found = JSON.parse(out) as { P_first_slack_N: number }
    expect(Math.abs(found.P_first_slack_N / (first?.result.P_first_slack_N ?? 0) - 1)).toBeLessThan(0.015)
    expect(out.trim().split('\n')).toHaveLength(1)
  })
  it('a name that it does not know ends with 1 and lists the ones there are', () => {
    const { status, stdout, stderr } = run(['moon-phase'], '{}')
    expect(status).toBe(1)
    expect(stdout).toBe('')
    expect(stderr).toContain('wheel-structure')
  }, 30_000)
})

describe('sums', () => {
  it('holds the ones that others count on', () => {
    expect(Object.keys(sums)).toEqual(
      expect.arrayContaining([
        'wheel-structure',
        'tyre-pressure',
        'tyre-rim-pairing',
        'riding-power',
        'front-depth-cap',
        'brake-heat',
        'advise',
      ]),
    )
  })
  it('riding-power: the published example, 471.8 m in 56.42 s: 213 W (Martin et al. 1998, READ via open transcriptions)', () => {
    const found = call('riding-power', {
      speedMs: 471.8 / 56.42,
      wind: { speedMs: 2.94, fromDeg: 310, headingDeg: 340 },
      massKg: 90,
      cdaM2: 0.2565,
      spokeAreaM2: 0.0044,
      rollingCoefficient: 0.0032,
      gradient: 0.003,
      airDensity: 1.2234,
      chainEfficiency: 0.97698,
      gravity: 9.81,
      kinetic: { fromMs: 8.28, toMs: 8.45, seconds: 56.42, inertia: 0.14, radiusM: 0.311 },
    })
    expect(Math.abs(found.total - 213.1)).toBeLessThan(0.5)
  })
  it('front-depth-cap: 75 kg on 8 kg in a gust of 7 m/s at 10 m/s, 3° of correction: 57 mm (aero reference 3.6, DERIVED)', () => {
    const found = call('front-depth-cap', { bodyMassKg: 75, bikeMassKg: 8, gustMs: 7, speedMs: 10, correctionDeg: 3 })
    expect(Math.abs(found.depthMm - 57)).toBeLessThan(1)
  })
  it('brake-heat: a rig that drags with a 500 W motor stays sane: warm, not glowing (common practice, no source)', () => {
    const rig = { massKg: 80, gradient: 0.08, onThisRim: 1, speedMs: 30 / 3.6, watts: 500 }
    const alloy = call('brake-heat', { ...rig, material: 'alloy' })
    const carbon = call('brake-heat', { ...rig, material: 'carbon' })
    // Aero reference 5.5 (DERIVED): alloy about 83 °C in riding wind at 30 km/h; carbon hotter, below where resin burns.
    expect(Math.abs(alloy.rimC - 83)).toBeLessThan(2)
    expect(carbon.rimC).toBeGreaterThan(alloy.rimC)
    expect(carbon.rimC).toBeLessThan(200)
  })
  it('tyre-rim-pairing: 28 mm on a 25 mm straight bead wall is too narrow, and the row says so', () => {
    const found = call('tyre-rim-pairing', { seat: 'hookless', innerWidthMm: 25, widthMm: 28 })
    expect(found).toMatchObject({
      verdict: 'no',
      code: 'tyre-too-narrow-for-rim',
      row: { row: expect.any(String) as string },
    })
  })
  it('tyre-pressure: band in order, start under the ceiling', () => {
    const { pressure } = call('tyre-pressure', { loadKg: 45, widthMm: 28, ride: 'road-long', innerWidthMm: 21 })
    const { lowBar, startBar, highBar, ceilingBar } = pressure
    expect([lowBar, startBar, highBar]).toEqual([lowBar, startBar, highBar].sort((a, b) => (a ?? 0) - (b ?? 0)))
    expect(startBar).toBeLessThanOrEqual(ceilingBar ?? 0)
  })
  it('advise: a reference rider, the same bytes twice', () => {
    const input = JSON.stringify(reference.personas[0]?.inputs)
    const one = answer('advise', input)
    expect(one.code).toBe(0)
    expect(answer('advise', input).out).toBe(one.out)
  })
  it.each([
    ['not JSON', 'advise', '{', 'not one JSON object'],
    ['a wrong field', 'front-depth-cap', '{"bodyMassKg":75,"bikeMassKg":8,"gustMs":7,"speedMs":10,"angle":3}', 'angle'],
    ['a missing field', 'riding-power', '{"speedMs":5}', 'massKg'],
    ['a wheel that no model has', 'wheel-structure', JSON.stringify({ n: 18 }), 'EA'],
    [
      'a bike that does not roll',
      'brake-heat',
      '{"massKg":80,"gradient":0,"material":"alloy","onThisRim":0.6}',
      'does not roll',
    ],
  ])('says plainly what is wrong: %s', (_title, name, text, words) => {
    const { out, error, code } = answer(name, text)
    expect(code).toBe(1)
    expect(out).toBe('')
    expect(error).toContain(words)
  })
})
