/** The schema up, down and up again; models against schema; the demo seed against what it must be. */
import { createHash } from 'node:crypto'
import { QueryTypes, type Sequelize } from 'sequelize'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { advice as adviceShape, riderAnswers } from '#contract/advisor.ts'
import { inTransaction, openDatabase } from '../../server/db.ts'
import { readCatalogue } from '../../server/features/catalogue/read.ts'
import { migrator } from '../../server/migrations/index.ts'
import { initModels } from '../../server/models/index.ts'
import { Stock } from '../../server/models/stock.ts'
import { Wheelset } from '../../server/models/wheelset.ts'
import { WheelsetWheel } from '../../server/models/wheelset-wheel.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { DEMO_NOW, prepareDatabase } from '../../server/seeds/index.ts'
import { designOf, tableLimitKg } from '../support/rider-limits.ts'
import { emptyDatabase, ownDatabaseUrl } from '../support/test-db.ts'

/** Own database beside the worker's: here the tables themselves come and go. */
let db: Sequelize

const all = <T extends object>(sql: string) => db.query<T>(sql, { type: QueryTypes.SELECT })
const one = async (sql: string) => Number(Object.values((await all<Record<string, unknown>>(sql))[0] ?? {})[0])
const tableNames = async () =>
  (
    await all<{ name: string }>(
      "SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE() AND table_name NOT IN ('migrations', 'advice_inputs')",
    )
  )
    .map(({ name }) => name)
    .sort()

beforeAll(async () => {
  db = openDatabase(await ownDatabaseUrl('_schema'))
  initModels(db)
  await migrator(db).down({ to: 0 })
})

afterAll(async () => {
  await db.close()
})

describe('migrations', () => {
  it('run up to the whole schema, undo every step, and run up to the same schema again', async () => {
    const columns = () =>
      all<object>(
        `SELECT table_name, column_name, column_type, is_nullable, column_default, column_key FROM information_schema.columns
         WHERE table_schema = DATABASE() ORDER BY table_name, ordinal_position`,
      )
    await migrator(db).up()
    const first = await columns()
    expect(await tableNames()).toContain('order_lines')

    await migrator(db).down({ to: 0 })
    expect(await tableNames()).toEqual([])
    expect(await all('SHOW TRIGGERS')).toEqual([])

    await migrator(db).up()
    expect(await columns()).toEqual(first)
    expect(await migrator(db).pending()).toEqual([])
  })

  it('and models name the same tables and columns, with the same ones allowed to be empty', async () => {
    const columns = await all<{ t: string; c: string; nullable: string }>(
      "SELECT table_name AS t, column_name AS c, is_nullable AS nullable FROM information_schema.columns WHERE table_schema = DATABASE() AND table_name NOT IN ('migrations', 'advice_inputs')",
    )
    const inSchema = columns
      .map(({ t, c, nullable }) => `${t}.${c} ${nullable === 'YES' ? 'nullable' : 'required'}`)
      .sort()
    const timestamps = ['createdAt', 'updatedAt']
    const inModels = Object.values(db.models)
      .filter(({ tableName }) => tableName !== 'migrations')
      .flatMap((model) =>
        Object.entries(model.getAttributes()).map(
          ([name, { field, allowNull, primaryKey }]) =>
            `${model.tableName}.${field ?? name} ${allowNull === false || primaryKey || timestamps.includes(name) ? 'required' : 'nullable'}`,
        ),
      )
      .sort()
    expect(inModels).toEqual(inSchema)
  })
})

describe('the connection', () => {
  it('counts the rows an UPDATE matched, not those it changed', async () => {
    await prepareDatabase(db, { seed: true })
    const stock = await Stock.findOne({ rejectOnEmpty: true })
    const [sameValue] = await Stock.update(
      { onHand: stock.onHand },
      { where: { wheelsetId: stock.wheelsetId }, silent: true },
    )
    expect(sameValue).toBe(1)
    const [noSuchRow] = await Stock.update({ onHand: 1 }, { where: { wheelsetId: 999_999 } })
    expect(noSuchRow).toBe(0)
  })

  it('keeps milliseconds and reads times as UTC, through models and raw statements alike', async () => {
    const moment = new Date('2026-06-30T23:59:59.987Z')
    const [{ t } = { t: null }] = await db.query<{ t: Date | null }>('SELECT CAST(:moment AS DATETIME(3)) AS t', {
      replacements: { moment },
      type: QueryTypes.SELECT,
    })
    expect(t).toEqual(moment)
  })

  it('does a transaction again that lost a deadlock, so that both writers get through', async () => {
    let waiting = 2
    let bothHoldOne = () => {}
    const barrier = new Promise<void>((resolve) => (bothHoldOne = resolve))
    let runs = 0
    const swap = (first: number, second: number) =>
      inTransaction(db, async (transaction) => {
        runs += 1
        await Stock.increment('onHand', { by: 1, where: { wheelsetId: first }, transaction })
        waiting -= 1
        if (waiting <= 0) bothHoldOne()
        await barrier
        await Stock.increment('onHand', { by: 1, where: { wheelsetId: second }, transaction })
      })
    const before = await one('SELECT SUM(on_hand) FROM stock')
    await Promise.all([swap(1, 2), swap(2, 1)])
    expect(runs).toBe(3)
    expect(await one('SELECT SUM(on_hand) FROM stock')).toBe(before + 4)
  })

  it('waits seconds, not a minute, for a lock', async () => {
    expect(await one('SELECT @@innodb_lock_wait_timeout')).toBe(5)
  })
})

describe('the schema itself refuses', () => {
  const refusals: [what: string, sql: string, errno: number][] = [
    ['more reserved than on hand', 'UPDATE stock SET reserved = on_hand + 1 LIMIT 1', 4025],
    ['a stock below nothing', 'UPDATE stock SET on_hand = -1 LIMIT 1', 4025],
    ['an empty line', 'UPDATE order_lines SET quantity = 0 LIMIT 1', 4025],
    ['sums that do not add up', 'UPDATE orders SET total_cents = total_cents + 1 LIMIT 1', 4025],
    [
      'a limit of nothing',
      "INSERT INTO limit_versions (wheelset_id, limit_kg, proof, reason, state) VALUES (1, 0, 'p', 'r', 'drafted')",
      4025,
    ],
    [
      'one person for both steps of a limit change',
      'UPDATE limit_versions SET drafted_by_id = 3, seconded_by_id = 3 LIMIT 1',
      4025,
    ],
    ['an unknown state', "UPDATE orders SET state = 'lost' LIMIT 1", 4025],
    ['a changed ledger', 'UPDATE ledger_entries SET amount_cents = 1 LIMIT 1', 1644],
    ['changed advice', "UPDATE advice_snapshots SET rules_version = 'x' LIMIT 1", 1644],
    ['an order of a wheelset that is not there', 'UPDATE order_lines SET wheelset_id = 999999 LIMIT 1', 1452],
    [
      'the same address twice, whatever its case',
      "UPDATE users SET email = 'SUPPORT@felloe.example' WHERE id = 1",
      1062,
    ],
  ]
  it.each(refusals)('%s', async (_what, sql, errno) => {
    await expect(db.query(sql)).rejects.toMatchObject({ parent: { errno } })
  })
})

describe('the demo seed', () => {
  it('done twice changes nothing', async () => {
    const before = await contents()
    expect(await prepareDatabase(db, { seed: true })).toEqual({ migrated: [], seeded: false, solved: 0 })
    expect(await contents()).toBe(before)
  })

  it('gives a demo of older code the rule tables it lacks, and leaves those it has', async () => {
    await db.query("DELETE FROM rule_tables WHERE name = 'tyre-rim-pairing'")
    await db.query("UPDATE rule_tables SET version = '2026-12.0', data = '{}' WHERE name = 'measuring-rims'")
    const versions = () => all<object>('SELECT name, version FROM rule_tables ORDER BY name, version')
    const before = await versions()
    expect((await prepareDatabase(db, { seed: true })).seeded).toBe(false)
    const after = await versions()
    expect(after).toEqual(expect.arrayContaining(before))
    expect(after).toHaveLength(before.length + 2)
    const newest = await all<{ data: unknown }>(
      "SELECT data FROM rule_tables WHERE name = 'measuring-rims' ORDER BY in_force_from DESC, id DESC LIMIT 1",
    )
    expect(JSON.stringify(newest)).toContain('growthPerMm')
  })

  it('is the same, byte for byte, in an emptied database', async () => {
    await emptyDatabase(db)
    await prepareDatabase(db, { seed: true })
    const first = await contents()
    await emptyDatabase(db)
    await prepareDatabase(db, { seed: true })
    expect(await contents()).toBe(first)
  })

  it('holds at least 36 wheelsets with both wheels, words in both languages, a price in each currency, stock and one limit in force', async () => {
    const wheelsets = await Wheelset.findAll({ include: ['wheels', 'texts', 'prices', 'stock', 'limits'] })
    expect(wheelsets.length).toBeGreaterThanOrEqual(36)
    for (const w of wheelsets) {
      expect(w.wheels?.map(({ position }) => position).sort(), w.sku).toEqual(['front', 'rear'])
      expect(w.texts?.map(({ locale }) => locale).sort(), w.sku).toEqual(['en', 'pt'])
      expect(w.prices?.map(({ currency }) => currency).sort(), w.sku).toEqual(['EUR', 'GBP', 'USD'])
      expect(
        w.limits?.map(({ state }) => state),
        w.sku,
      ).toEqual(['in-force'])
      expect(w.stock, w.sku).toBeTruthy()
      expect(w.inventedNote, w.sku).toMatch(/invented/i)
      expect(w.limits?.[0]?.proof, w.sku).toMatch(/invented/i)
    }
    const free = wheelsets.map(({ stock }) => stock?.onHand)
    expect(free).toContain(0)
    expect(free).toContain(1)
  })

  it('reads back as the facts that the invented advice was worked out from', async () => {
    const stored = await readCatalogue({ db, clock: () => DEMO_NOW }, 'en')
    expect(stored.map(({ id: _id, version: _version, onSale: _onSale, ...facts }) => facts)).toEqual(wheelsetFacts)
  })

  it('spans alloy and carbon, rim and disc, 622 and 584, 25 to 80 mm, 16 to 36 spokes, hooked and hookless, every ride', async () => {
    const distinct = async (column: string, from: string) =>
      (await all<{ v: string | number }>(`SELECT DISTINCT ${column} AS v FROM ${from} ORDER BY v`)).map(({ v }) => v)
    expect(await distinct('material', 'rims')).toEqual(['alloy', 'carbon'])
    expect(await distinct('brake', 'wheelsets')).toEqual(['disc', 'rim'])
    expect(await distinct('bead_seat_mm', 'wheelsets')).toEqual([584, 622])
    expect(await distinct('seat', 'rims')).toEqual(['hooked', 'hookless'])
    expect(await distinct('spoke_count', 'wheelset_wheels')).toEqual([16, 20, 24, 28, 32, 36])
    expect(await distinct('depth_mm', 'rims')).toEqual(expect.arrayContaining([25, 30, 45, 60, 80]))
    const rides = new Set((await Wheelset.findAll()).flatMap((w) => w.rides))
    expect([...rides].sort()).toEqual(
      ['bikepacking', 'climbing', 'commute', 'cross-country', 'cyclocross', 'gravel', 'road-fast', 'road-long', 'time-trial', 'trail'], // prettier-ignore
    )
    expect(await one('SELECT COUNT(*) FROM wheelsets WHERE assist_rated')).toBeGreaterThanOrEqual(3)
  })

  it('has one brake and one bead seat in a wheelset, and never the deeper rim in front', async () => {
    for (const { w, front, rear } of await pairs()) {
      expect(front.rim?.depthMm, w.sku).toBeLessThanOrEqual(rear.rim?.depthMm ?? 0)
      for (const wheel of [front, rear]) {
        expect(wheel.rim?.brake, w.sku).toBe(w.brake)
        expect(wheel.hub?.brake, w.sku).toBe(w.brake)
        expect(wheel.hub?.position, w.sku).toBe(wheel.position)
        expect(wheel.rim?.beadSeatMm, w.sku).toBe(w.beadSeatMm)
        expect(wheel.massG, w.sku).toBeCloseTo(
          (wheel.rim?.massG ?? 0) + (wheel.hub?.massG ?? 0) + wheel.spokeCount * (wheel.spoke?.massG ?? 0),
          -1,
        )
        if (w.assistRated) expect(wheel.hub?.assistRated, w.sku).toBe(true)
        if (w.assistRated) expect(wheel.spokeCount, w.sku).toBeGreaterThanOrEqual(28)
      }
    }
  })

  it('states no limit above the rider limits of the wheel reference plus bike and kit, for any ride it is offered for', async () => {
    for (const { w, front, rear } of await pairs()) {
      const limitKg = w.limits?.[0]?.limitKg ?? Infinity
      for (const ride of w.rides) {
        for (const wheel of [front, rear]) {
          const { material, depthMm } = wheel.rim ?? { material: 'alloy' as const, depthMm: 0 }
          const table = tableLimitKg(designOf(ride, w.brake), {
            material,
            depthMm,
            position: wheel.position,
            spokeCount: wheel.spokeCount,
          })
          expect(limitKg, `${w.sku} ${ride} ${wheel.position}`).toBeLessThanOrEqual(table)
        }
      }
    }
    expect(await one('SELECT MAX(limit_kg) FROM limit_versions')).toBeLessThan(158)
    expect(await one('SELECT MIN(limit_kg) FROM limit_versions')).toBeGreaterThanOrEqual(85)
  })

  it('marks no rim above 150 psi / 1.10, nor a hookless one above the cap for its narrowest tyre; tyres fit their rims', async () => {
    const PSI_PER_BAR = 14.5037738
    // tyres reference 3.9 (MEMORY there): nominal width from, highest bar on straight-side rims
    const caps: [fromMm: number, bar: number][] = [[18, 5.5], [25, 5], [30, 4.5], [35, 4], [40, 3.5], [45, 3], [55, 2.5]] // prettier-ignore
    const rims = await all<{
      code: string
      seat: string
      inner: number
      tyreMin: number
      tyreMax: number
      bar: number
    }>(
      'SELECT code, seat, inner_width_mm AS `inner`, tyre_min_mm AS tyreMin, tyre_max_mm AS tyreMax, max_pressure_bar AS bar FROM rims',
    )
    for (const { code, seat, inner, tyreMin, tyreMax, bar } of rims) {
      expect(bar * 1.1 * PSI_PER_BAR, code).toBeLessThanOrEqual(150)
      expect(tyreMin, code).toBeGreaterThanOrEqual(inner + (seat === 'hookless' ? 4 : 3))
      expect(tyreMax / inner, code).toBeLessThanOrEqual(2.25)
      if (seat === 'hookless')
        expect(bar, code).toBeLessThanOrEqual(caps.filter(([fromMm]) => fromMm <= tyreMin).at(-1)?.[1] ?? 0)
    }
  })

  it('holds 400 orders over the year before, in many states, none of them waiting for payment', async () => {
    expect(await one('SELECT COUNT(*) FROM orders')).toBe(400)
    expect(await one("SELECT COUNT(*) FROM orders WHERE created_at < '2025-12-01' OR updated_at > '2026-12-01'")).toBe(
      0,
    )
    const states = (await all<{ state: string }>('SELECT DISTINCT state FROM orders')).map(({ state }) => state)
    expect(states).toEqual(expect.arrayContaining(['placed', 'query', 'cleared', 'queued', 'on-bench', 'handed-over', 'arrived', 'settled', 'dropped'])) // prettier-ignore
    expect(states).not.toContain('holding')
    expect(await one("SELECT COUNT(*) FROM orders WHERE email NOT LIKE '%.example'")).toBe(0)
  })

  it('has money that adds up: lines to goods, tax inside the total by the country’s rate, none in the US', async () => {
    expect(
      await one(
        'SELECT COUNT(*) FROM orders o WHERE goods_cents <> (SELECT SUM(line_cents) FROM order_lines l WHERE l.order_id = o.id)',
      ),
    ).toBe(0)
    expect(await one('SELECT COUNT(*) FROM orders WHERE total_cents <> goods_cents + delivery_cents')).toBe(0)
    const orders = await all<{ number: string; total: number; tax: number; bp: number }>(
      'SELECT number, total_cents AS total, tax_cents AS tax, vat_percent_bp AS bp FROM orders JOIN markets ON code = market',
    )
    for (const { number, total, tax, bp } of orders) {
      // net × (1 + rate) = total, to the half cent
      expect(Math.abs(total - tax - total / (1 + bp / 10_000)), number).toBeLessThanOrEqual(0.5)
    }
  })

  it('has a ledger that ends at the total for a kept order and at zero for a dropped one', async () => {
    const orders = await all<{
      number: string
      state: string
      total: number
      placed: Date | null
      left: string | null
    }>(
      `SELECT o.number, o.state, o.total_cents AS total, o.placed_at AS placed,
         (SELECT SUM(amount_cents) FROM ledger_entries e WHERE e.order_id = o.id AND e.currency = o.currency) AS \`left\` FROM orders o`,
    )
    for (const { number, state, total, placed, left } of orders) {
      expect(Number(left ?? 0), number).toBe(state === 'dropped' || !placed ? 0 : total)
    }
    expect(await one("SELECT COUNT(*) FROM refunds WHERE state <> 'done'")).toBe(0)
    expect(await one("SELECT -SUM(amount_cents) FROM ledger_entries WHERE kind = 'refunded'")).toBe(
      await one('SELECT SUM(amount_cents) FROM refunds'),
    )
  })

  it('has histories without a gap that end where the order and its lines stand, and a receipt for each payment', async () => {
    const events = await all<{ orderId: number; fromState: string | null; toState: string; at: Date }>(
      'SELECT order_id AS orderId, from_state AS fromState, to_state AS toState, created_at AS at FROM order_events ORDER BY order_id, created_at, id',
    )
    const reached = new Map<number, string>()
    for (const { orderId, fromState, toState } of events) {
      expect(fromState, `order ${orderId}`).toBe(reached.get(orderId) ?? null)
      reached.set(orderId, toState)
    }
    const lines = await all<{ orderId: number; state: string; lineState: string }>(
      'SELECT o.id AS orderId, o.state, l.state AS lineState FROM orders o JOIN order_lines l ON l.order_id = o.id',
    )
    for (const { orderId, state, lineState } of lines) {
      expect(state, `order ${orderId}`).toBe(reached.get(orderId))
      expect(lineState, `order ${orderId}`).toBe(state)
    }
    expect(await one("SELECT COUNT(*) FROM outbox_mails WHERE kind = 'receipt' AND state = 'sent'")).toBe(
      await one('SELECT COUNT(*) FROM orders WHERE placed_at IS NOT NULL'),
    )
  })

  it('sold nobody a wheelset over its limit: nine orders in ten carry advice, and its total is under the line’s limit', async () => {
    const lines = await all<{
      limitCheck: string
      limitKg: number
      adviceId: string | null
      advice: { systemMassKg: number } | null
      answers: { bodyMassKg: number } | null
    }>(
      `SELECT l.limit_check AS limitCheck, l.limit_kg AS limitKg, l.advice_id AS adviceId, a.advice, a.answers
       FROM order_lines l LEFT JOIN advice_snapshots a ON a.id = l.advice_id`,
    )
    for (const { limitCheck, limitKg, advice } of lines) {
      expect(advice === null).toBe(limitCheck === 'unconfirmed')
      if (advice) expect(advice.systemMassKg).toBeLessThanOrEqual(limitKg)
    }
    const withoutAdvice = lines.filter(({ adviceId }) => adviceId === null).length / lines.length
    expect(withoutAdvice).toBeGreaterThan(0.05)
    expect(withoutAdvice).toBeLessThan(0.15)
    const snapshots = await all<{ sha256: string; answers: object; advice: object }>(
      'SELECT sha256, answers, advice FROM advice_snapshots',
    )
    for (const { sha256, answers, advice } of snapshots) {
      expect(riderAnswers.safeParse(answers).error).toBeUndefined()
      expect(adviceShape.safeParse(advice).error).toBeUndefined()
      expect(createHash('sha256').update(JSON.stringify({ answers, advice })).digest('hex')).toBe(sha256)
    }
  })

  it('is not put into a database that holds somebody’s orders', async () => {
    await db.query('DELETE FROM demo_marker', { type: QueryTypes.BULKDELETE })
    await expect(prepareDatabase(db, { seed: true })).rejects.toThrow('holds orders and no demo marker')
    expect(await one('SELECT COUNT(*) FROM orders')).toBe(400)
  })
})

/** Every row of every table in one digest. */
async function contents(): Promise<string> {
  const digest = createHash('sha256')
  // The mark of the advice's inputs is a fresh one after every write.
  for (const table of (await tableNames()).filter((name) => name !== 'advice_inputs')) {
    digest.update(table).update(JSON.stringify(await all(`SELECT * FROM \`${table}\` ORDER BY 1, 2`)))
  }
  return digest.digest('hex')
}

async function pairs() {
  const include = ['limits', { model: WheelsetWheel, as: 'wheels', include: ['rim', 'hub', 'spoke'] }]
  return (await Wheelset.findAll({ include })).map((w) => {
    const front = w.wheels?.find(({ position }) => position === 'front')
    const rear = w.wheels?.find(({ position }) => position === 'rear')
    if (!front || !rear) throw new Error(`${w.sku} lacks a wheel`)
    return { w, front, rear }
  })
}
