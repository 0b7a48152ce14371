/** Rule tables in the hands of the product desk: two people, a time, a check cell by cell, and advice that follows. */
import { afterAll, beforeAll, beforeEach, expect, it } from 'vitest'
import type { Advice } from '#contract/advisor.ts'
import type { RuleTableRow, RuleTableView, RuleVersionView } from '#contract/product-desk-rules.ts'
import type { Problem } from '#contract/common.ts'
import { AuditRow } from '../../server/models/audit-row.ts'
import { RuleTable } from '../../server/models/rule-table.ts'
import { seedDemo } from '../../server/seeds/index.ts'
import { RULES_VERSION } from '../../server/seeds/rule-tables.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { answers, rider, type Agent } from '../support/till.ts'

const HOUR_MS = 3_600_000
const source = 'A source that the test made up'
let shop: TestApp
beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const post = (desk: Agent, body: object) =>
  desk.post('/api/product/rule-changes').send({ source, label: 'practice', reason: 'drafted by the test', ...body })
const draft = async (desk: Agent, body: object) => (await post(desk, body).expect(answers(201))).body as RuleVersionView
const decide = (desk: Agent, id: number, what: 'approve' | 'reject') =>
  desk.post(`/api/product/rule-changes/${id}/${what}`).send({ reason: 'decided by the test' })
const table = async (desk: Agent, name: string) =>
  (await desk.get(`/api/product/rules/${name}`).expect(answers(200))).body as RuleTableView
const rowOf = async (desk: Agent, name: string) => {
  const { items } = (await desk.get('/api/product/rules').expect(answers(200))).body as { items: RuleTableRow[] }
  const found = items.find((one) => one.name === name)
  if (!found) throw new Error(`no table ${name}`)
  return found
}
const advice = async () =>
  (await shop.agent().post('/api/advice').send(rider(75)).expect(answers(200))).body as Advice & {
    wheelsets: { verdict: string }[]
  }
const limits = { noMarginFrom: 0.5, caliperSlackMm: 4, assumedBikeExtraKg: 1 }
const desks = async () => [await shop.signedIn('product'), await shop.signedIn('product2')] as const

it('a version drafted by one and seconded by another counts from then on, and names itself in rulesVersion', async () => {
  const [author, second] = await desks()
  const before = await advice()
  const first = (await table(author, 'limits')).base
  const made = await draft(author, { table: 'limits', data: limits })
  expect(made).toMatchObject({
    standing: 'drafted',
    own: true,
    basedOn: first.version,
    stale: false,
    inForceFrom: null,
  })
  expect(made.version).toMatch(/^\d{4}-\d\d\.\d+$/)
  expect((await advice()).rulesVersion).toBe(before.rulesVersion)
  expect(await rowOf(second, 'limits')).toMatchObject({
    current: { id: first.id },
    waiting: [{ id: made.id, own: false }],
  })

  const seconded = (await decide(second, made.id, 'approve').expect(answers(200))).body as RuleVersionView
  expect(seconded).toMatchObject({ standing: 'in-force', data: limits })
  expect(seconded.secondedBy).not.toBe(seconded.draftedBy)
  const after = await advice()
  expect(after.rulesVersion).not.toBe(before.rulesVersion)
  expect(after.rulesVersion).toContain(`${made.version}+`)
  const near = (one: typeof after) => one.wheelsets.filter(({ verdict }) => verdict === 'no-margin').length
  expect(near(after)).toBeGreaterThan(near(before))
  expect((await table(author, 'limits')).versions.map(({ standing }) => standing)).toEqual(['in-force', 'replaced'])
  const rows = await AuditRow.findAll({ where: { subjectType: 'rule-table', subjectId: 'limits' }, order: ['id'] })
  expect(rows.map(({ action }) => action)).toEqual(['rule-change.drafted', 'rule-change.seconded'])
  expect(rows[1]).toMatchObject({ before: { version: first.version }, after: { version: made.version } })
})

it('its author cannot second it, whatever else they may do; a rider may not even look', async () => {
  const author = await shop.signedIn('admin')
  const { id } = await draft(author, { table: 'limits', data: limits })
  expect((await decide(author, id, 'approve')).body).toMatchObject({ status: 403, code: 'own-change' })
  const visitor = await shop.signedIn('rider')
  expect((await post(visitor, { table: 'limits', data: limits })).status).toBe(403)
  expect((await decide(visitor, id, 'approve')).status).toBe(403)
  expect((await visitor.get('/api/product/rules/limits')).status).toBe(403)
  expect(await RuleTable.count({ where: { state: 'seconded' } })).toBe(0)
})

it('a wrong cell is named by row and column, in the words of the caller', async () => {
  const desk = await shop.signedIn('product')
  const { base } = await table(desk, 'hookless-ceilings')
  const data = structuredClone(base.data) as { rows: { row: string; maxBar: unknown }[] }
  const row = data.rows[2]
  if (!row) throw new Error('the table has three rows')
  row.maxBar = -1
  const reply = await post(desk, { table: 'hookless-ceilings', data }).expect(answers(400))
  const [fault] = (reply.body as Problem).errors ?? []
  expect(fault).toMatchObject({ path: 'data.rows.2.maxBar', code: 'more-than' })
  expect(fault?.message).toBe(`Row 3 (${row.row}), column maxBar: More than 0`)
  row.maxBar = 'four'
  const spoken = await post(desk, { table: 'hookless-ceilings', data }).set('Accept-Language', 'pt')
  expect((spoken.body as Problem).errors?.[0]?.message).toMatch(/^Linha 3 \(.+\), coluna maxBar: /)
  expect(await RuleTable.count({ where: { state: 'drafted' } })).toBe(0)
})

it.each([
  ['a pair of numbers', 'measuring-rims', { rows: [[20, 13], [25, 'x']], growthPerMm: 0.4, warnBeyondMm: 1.5 }, 'data.rows.1.1', 'Row 2 (25), column 2: '], // prettier-ignore
  ['a value of its own', 'limits', { ...limits, noMarginFrom: 'much' }, 'data.noMarginFrom', 'noMarginFrom: '],
  ['a field that no sum reads', 'limits', { ...limits, noMarginUntil: 1 }, 'data.noMarginUntil', 'noMarginUntil: '],
])('%s that is wrong is named', async (_what, name, data, path, words) => {
  const desk = await shop.signedIn('product')
  const { body } = await post(desk, { table: name, data }).expect(answers(400))
  const [fault] = (body as Problem).errors ?? []
  expect(fault?.path).toBe(path)
  expect(fault?.message.startsWith(words)).toBe(true)
})

it('a word that the sums look up cannot go missing', async () => {
  const desk = await shop.signedIn('product')
  const { base } = await table(desk, 'use-conditions')
  const { gravel: _, ...leastByRide } = (base.data as { leastByRide: Record<string, number> }).leastByRide
  const { body } = await post(desk, { table: 'use-conditions', data: { leastByRide } }).expect(answers(400))
  expect((body as Problem).errors?.[0]).toMatchObject({ path: 'data.leastByRide.gravel', code: 'required' })
})

it('values that the shape takes but a sum cannot be worked out with are refused', async () => {
  const desk = await shop.signedIn('product')
  const { base } = await table(desk, 'defaults')
  const data = { ...base.data, kitMassKg: -500 }
  const { body } = await post(desk, { table: 'defaults', data }).expect(answers(400))
  expect((body as Problem).errors?.[0]).toMatchObject({ path: 'data', code: 'sums-fail' })
})

it('seconded for later it does not count yet, then does by the clock alone', async () => {
  const [author, second] = await desks()
  const before = await advice()
  const inForceFrom = new Date(shop.deps.clock().getTime() + HOUR_MS).toISOString()
  const { id, version } = await draft(author, { table: 'limits', data: limits, inForceFrom })
  await decide(second, id, 'approve').expect(answers(200))
  expect((await advice()).rulesVersion).toBe(before.rulesVersion)
  expect((await rowOf(author, 'limits')).waiting).toMatchObject([{ id, standing: 'seconded' }])
  // one line of versions: nothing slips in before the one that comes
  const { body } = await post(author, { table: 'limits', data: { ...limits, caliperSlackMm: 5 } }).expect(answers(400))
  expect((body as Problem).errors?.[0]).toMatchObject({ path: 'inForceFrom', code: 'before-coming' })
  shop.passTime(HOUR_MS + 1000)
  expect((await advice()).rulesVersion).toContain(`${version}+`)
  expect((await decide(second, id, 'reject')).body).toMatchObject({ status: 409, code: 'rule-change-closed' })
})

it('stopped before its time it never counts', async () => {
  const [author, second] = await desks()
  const inForceFrom = new Date(shop.deps.clock().getTime() + HOUR_MS).toISOString()
  const { id } = await draft(author, { table: 'limits', data: limits, inForceFrom })
  await decide(second, id, 'approve').expect(answers(200))
  const before = await advice()
  await decide(author, id, 'reject').expect(answers(200))
  shop.passTime(HOUR_MS + 1000)
  expect((await advice()).rulesVersion).toBe(before.rulesVersion)
})

it('of two drafts over one version the second to be seconded is stale', async () => {
  const [author, second] = await desks()
  const one = await draft(author, { table: 'limits', data: limits })
  const other = await draft(author, { table: 'limits', data: { ...limits, noMarginFrom: 0.9 } })
  expect(Number(other.version.slice(8))).toBe(Number(one.version.slice(8)) + 1)
  await decide(second, one.id, 'approve').expect(answers(200))
  expect((await rowOf(second, 'limits')).waiting).toMatchObject([{ id: other.id, stale: true }])
  expect((await decide(second, other.id, 'approve')).body).toMatchObject({ status: 409, code: 'rule-change-stale' })
  // and one that was begun on an older screen is refused before it is kept
  const late = await post(author, { table: 'limits', data: { ...limits, caliperSlackMm: 5 }, basedOn: one.basedOn })
  expect(late.body).toMatchObject({ status: 409, code: 'changed-meanwhile', data: { present: one.version } })
  await decide(author, other.id, 'reject').expect(answers(200))
})

it('is decided once, whoever is quicker', async () => {
  const [author, second] = await desks()
  const admin = await shop.signedIn('admin')
  const { id } = await draft(author, { table: 'limits', data: limits })
  const replies = await Promise.all([decide(second, id, 'approve'), decide(admin, id, 'approve')])
  expect(replies.map(({ status }) => status).sort()).toEqual([200, 409])
  expect(await AuditRow.count({ where: { action: 'rule-change.seconded' } })).toBe(1)
})

it('sent twice under one key it is drafted once; without a difference not at all', async () => {
  const desk = await shop.signedIn('product')
  const send = () => post(desk, { table: 'limits', data: limits }).set('Idempotency-Key', 'the-same-draft')
  const [first, again] = [await send().expect(answers(201)), await send().expect(answers(201))]
  expect((again.body as RuleVersionView).id).toBe((first.body as RuleVersionView).id)
  const { base } = await table(desk, 'wind')
  const same = await post(desk, { table: 'wind', data: base.data, source: base.source, label: base.label })
  expect((same.body as Problem).errors?.[0]).toMatchObject({ code: 'nothing-changed' })
  await post(desk, { table: 'no-such-table', data: {} }).expect(answers(400))
  await desk.get('/api/product/rules/no-such-table').expect(answers(404))
})

it('every seeded table may be drafted again as it stands with a source of its own', async () => {
  const desk = await shop.signedIn('product')
  const { items } = (await desk.get('/api/product/rules')).body as { items: RuleTableRow[] }
  for (const { name } of items) await draft(desk, { table: name, data: (await table(desk, name)).base.data })
  expect(await RuleTable.count({ where: { state: 'drafted' } })).toBe(items.length)
})

it('a draft that has the number of a later seed does not keep that seed out', async () => {
  const desk = await shop.signedIn('product')
  await RuleTable.update({ version: '2026-01.1' }, { where: { name: 'limits' } })
  const { id } = await draft(desk, { table: 'limits', data: limits })
  await RuleTable.update({ version: RULES_VERSION }, { where: { id } })
  await seedDemo(shop.deps.db)
  await seedDemo(shop.deps.db)
  const versions = (await table(desk, 'limits')).versions.map(({ version, standing }) => [version, standing])
  expect(versions).toEqual([
    [`${RULES_VERSION}-seed`, 'in-force'],
    [RULES_VERSION, 'drafted'],
    ['2026-01.1', 'replaced'],
  ])
})
