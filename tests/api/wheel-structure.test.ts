/** Structural results live with the wheel they were found for: read with it, found anew when its design changes, never when advice is asked for. */
import { afterAll, beforeAll, expect, it, vi } from 'vitest'
import type { Advice } from '#contract/advisor.ts'
import type { WheelsetDetail } from '#contract/catalogue.ts'
import * as model from '#core/wheel-structure.ts'
import { Rim } from '../../server/models/rim.ts'
import { WheelsetWheel } from '../../server/models/wheelset-wheel.ts'
import { keepSolved } from '../../server/wheel-designs/keep-solved.ts'
import { testApp, type TestApp } from '../support/test-app.ts'

let shop: TestApp
beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())

const road = {
  ride: 'road-long',
  bodyMassKg: 75,
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
}
const detail = async () => (await shop.agent().get('/api/wheelsets/rowan-45-disc').expect(200)).body as WheelsetDetail
const structureOf = async () =>
  ((await shop.agent().post('/api/advice').send(road).expect(200)).body as Advice).wheelsets.find(
    ({ sku }) => sku === 'ROWAN-45-D',
  )?.structure

it('a wheelset comes with both wheels solved: a profile for every spoke, the lowest spoke losing the most', async () => {
  const { structure, rear } = await detail()
  expect(structure.rear?.profile.underLeft).toHaveLength(rear.spokeCount)
  const { underLeft = [], underRight = [] } = structure.rear?.profile ?? {}
  // Of a dished wheel the tight right side takes more: so in S04 too, whichever spoke stands at the road.
  expect(underLeft.indexOf(Math.min(...underLeft))).toBe(1)
  expect(underRight.indexOf(Math.min(...underRight))).toBe(1)
  // Wheel reference 4.6, S04 (DERIVED): the same wheel at 930 N on average: bottom share 0.267, side stiffness 92 N/mm.
  expect(Math.abs((structure.rear?.share ?? 0) - 0.267)).toBeLessThan(0.01)
  expect(Math.abs((structure.rear?.lateralNPerMm.mean ?? 0) / 92 - 1)).toBeLessThan(0.05)
})

it('nothing is solved while nothing changed, nor when advice is asked for', async () => {
  const solve = vi.spyOn(model, 'solveWheel')
  expect(await keepSolved()).toBe(0)
  await structureOf()
  expect(solve).not.toHaveBeenCalled()
  solve.mockRestore()
})

it('a changed design is solved anew, and the advice follows', async () => {
  const before = await structureOf()
  const { structure } = await detail()
  const wheel = await WheelsetWheel.findOne({
    where: { position: 'rear' },
    include: { association: 'wheelset', where: { sku: 'ROWAN-45-D' } },
    rejectOnEmpty: true,
  })
  const plain = { spokeCount: wheel.spokeCount, crossesLeft: wheel.crossesLeft, crossesRight: wheel.crossesRight }
  await wheel.update({ spokeCount: 32, crossesLeft: 3, crossesRight: 3 })
  expect(await keepSolved()).toBe(1)
  const after = await structureOf()
  expect(after?.limitKg ?? 0).toBeGreaterThan(before?.limitKg ?? Infinity)
  expect((await detail()).structure.rear?.profile.underLeft).toHaveLength(32)

  await wheel.update(plain)
  expect(await keepSolved()).toBe(1)
  expect((await detail()).structure).toEqual(structure)
})

it('a design that the model refuses leaves what was kept as it was', async () => {
  const rim = await Rim.findOne({ where: { code: 'C45-21H-D-622' }, rejectOnEmpty: true })
  const { depthMm } = rim
  await rim.update({ depthMm: 5 })
  await expect(keepSolved()).rejects.toThrow(RangeError)
  await rim.update({ depthMm })
  expect(await keepSolved()).toBe(0)
})
