/** Advice is worked out from kept inputs, and yet no write is missed: by the shop, by hand, or by the clock alone. */
import { afterAll, beforeAll, expect, it, vi } from 'vitest'
import type { Advice, AdviceChanges } from '#contract/advisor.ts'
import { LimitVersion } from '../../server/models/limit-version.ts'
import { RuleTable } from '../../server/models/rule-table.ts'
import { Wheelset } from '../../server/models/wheelset.ts'
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
const ask = async () => (await shop.agent().post('/api/advice').send(road).expect(200)).body as Advice
/** A mark is believed for a quarter of a second. */
const soon = () => new Promise((resolve) => setTimeout(resolve, 300))
const limitOf = (advice: Advice, sku: string) => advice.wheelsets.find((one) => one.sku === sku)?.limitKg

it('asks the database one thing when nothing was written', async () => {
  await ask()
  await soon()
  const sent = vi.spyOn(shop.deps.db, 'query')
  await ask()
  await ask()
  expect(sent.mock.calls.map(([sql]) => sql)).toEqual(['SELECT mark FROM advice_inputs WHERE id = 1'])
  sent.mockRestore()
})

it('a limit lowered by hand, past this process, counts a quarter of a second later', async () => {
  const set = await Wheelset.findOne({ where: { sku: 'ROWAN-35-D' }, rejectOnEmpty: true })
  expect(limitOf(await ask(), set.sku)).toBe(110)
  await shop.deps.db.query('UPDATE limit_versions SET limit_kg = 95 WHERE wheelset_id = :id', {
    replacements: { id: set.id },
  })
  await soon()
  const lowered = await ask()
  expect(limitOf(lowered, set.sku)).toBe(95)
  await shop.deps.db.query('UPDATE limit_versions SET limit_kg = 110 WHERE wheelset_id = :id', {
    replacements: { id: set.id },
  })
  await soon()
  const back = await ask()
  expect(limitOf(back, set.sku)).toBe(110)
  expect(back.rulesVersion).not.toBe(lowered.rulesVersion)
})

it('a version that was seconded for later comes in force by the clock alone', async () => {
  const set = await Wheelset.findOne({ where: { sku: 'ROWAN-45-D' }, rejectOnEmpty: true })
  const now = shop.deps.clock()
  const present = await LimitVersion.findOne({ where: { wheelsetId: set.id }, rejectOnEmpty: true, raw: true })
  const { id: _, ...rest } = present
  await LimitVersion.create({
    ...rest,
    limitKg: 101,
    inForceFrom: new Date(now.getTime() + 3_600_000),
    state: 'seconded',
  })
  expect(limitOf(await ask(), set.sku)).toBe(120)
  shop.passTime(3_700_000)
  expect(limitOf(await ask(), set.sku)).toBe(101)
})

it('a limit lowered by the shop counts from the next call on', async () => {
  const set = await Wheelset.findOne({ where: { sku: 'ASH-25-D' }, rejectOnEmpty: true })
  const before = limitOf(await ask(), set.sku)
  const limit = await LimitVersion.findOne({ where: { wheelsetId: set.id }, rejectOnEmpty: true })
  await shop.deps.db.transaction((transaction) => limit.update({ limitKg: 90 }, { transaction }))
  expect(before).toBe(115)
  expect(limitOf(await ask(), set.sku)).toBe(90)
})

it('a rule table written to changes the advice and its version', async () => {
  const before = await ask()
  const table = await RuleTable.findOne({ where: { name: 'limits' }, rejectOnEmpty: true })
  await table.update({ data: { ...(table.data as object), noMarginFrom: 0.5 } })
  const after = await ask()
  expect(after.wheelsets.some(({ verdict }) => verdict === 'no-margin')).toBe(true)
  expect(after.rulesVersion).not.toBe(before.rulesVersion)
})

it('POST /api/advice/changes names where the advice turns, under the version of the advice', async () => {
  const changes = (await shop.agent().post('/api/advice/changes').send(road).expect(200)).body as AdviceChanges
  expect(changes.rulesVersion).toBe((await ask()).rulesVersion)
  expect(changes.tippingPoints.map(({ input }) => input)).toContain('bodyMassKg')
  expect(changes.influence.length).toBeGreaterThan(8)
})
