/** Brings a database up to date and, once, fills it with the invented demo. Called by start, by `migrate seed` and by tests. */
import type { Sequelize, Transaction } from 'sequelize'
import { AdviceSnapshot } from '../models/advice-snapshot.ts'
import { Bike } from '../models/bike.ts'
import { DemoMarker } from '../models/demo-marker.ts'
import { Hub } from '../models/hub.ts'
import { initModels } from '../models/index.ts'
import { LedgerEntry } from '../models/ledger-entry.ts'
import { LimitVersion } from '../models/limit-version.ts'
import { Market } from '../models/market.ts'
import { Order } from '../models/order.ts'
import { OrderEvent } from '../models/order-event.ts'
import { OrderLine } from '../models/order-line.ts'
import { OutboxMail } from '../models/outbox-mail.ts'
import { Price } from '../models/price.ts'
import { Refund } from '../models/refund.ts'
import { Rim } from '../models/rim.ts'
import { RuleTable } from '../models/rule-table.ts'
import { Spoke } from '../models/spoke.ts'
import { Stock } from '../models/stock.ts'
import { User } from '../models/user.ts'
import { Wheelset } from '../models/wheelset.ts'
import { WheelsetText } from '../models/wheelset-text.ts'
import { WheelsetWheel } from '../models/wheelset-wheel.ts'
import { migrator } from '../migrations/index.ts'
import { keepSolved } from '../wheel-designs/keep-solved.ts'
import { designDigest, solveDesign, type WheelToSolve } from '../wheel-designs/solve.ts'
import { catalogue, hubs, rims, spokes } from './catalogue.ts'
import { limitProof } from './facts.ts'
import { markets } from './markets.ts'
import { demoOrders } from './orders.ts'
import { RULES_VERSION, ruleTables } from './rule-tables.ts'
import { solvedWheels } from './solved-wheels.ts'
import { texts } from './texts.ts'
import { demoUserRows } from './users.ts'

/** The demo's present: its orders lie in the year before. */
export const DEMO_NOW = new Date('2026-12-01T00:00:00.000Z')
/** Prices and limits hold from here on, earlier than the first order. */
const DEMO_START = new Date('2025-11-01T00:00:00.000Z')
const DEMO_NOTE = 'Invented demo data: no real person, product, order or proof.'

/** The database cannot be seeded or migrated; the message is one sentence for the person who started it. */
export class PrepareError extends Error {}

/**
 * Migrates, then seeds the demo unless it is there already.
 * @returns what was done
 * @throws PrepareError when a migration fails, or when the database holds orders that are not the demo's
 */
export async function prepareDatabase(sequelize: Sequelize, { seed }: { seed: boolean }) {
  const migrated = await migrate(sequelize)
  if (!sequelize.isDefined('DemoMarker')) initModels(sequelize)
  const seeded = seed && (await seedDemo(sequelize))
  return { migrated, seeded, solved: await keepSolved() }
}

/** Names of the migrations that were run. The runner's own error carries the connection with its password, so only its words go on. */
async function migrate(sequelize: Sequelize): Promise<string[]> {
  try {
    return (await migrator(sequelize).up()).map(({ name }) => name)
  } catch (error) {
    throw new PrepareError(error instanceof Error ? error.message.split('\n')[0] : String(error))
  }
}

/**
 * The whole demo in one transaction; false when its marker is there. Models must be initialised.
 * @param orders false leaves out the orders and the rider's bikes: range, markets and people only, as most tests want it
 * @throws PrepareError when there are orders but no marker: that is somebody's real shop
 */
export async function seedDemo(sequelize: Sequelize, { orders = true }: { orders?: boolean } = {}): Promise<boolean> {
  if ((await DemoMarker.count()) > 0) {
    await addNewRuleTables()
    return false
  }
  if ((await Order.count()) > 0)
    throw new PrepareError('The database holds orders and no demo marker, so the demo is not put into it.')
  const users = await demoUserRows()
  await sequelize.transaction(async (transaction) => {
    await seedRange(transaction)
    await User.bulkCreate(
      users.map((user) => ({ ...user, activeFrom: DEMO_START, ...dated(DEMO_START) })),
      { transaction },
    )
    if (orders) await seedOrders(transaction)
    await DemoMarker.create({ id: 1, note: DEMO_NOTE, seededAt: DEMO_NOW }, { transaction })
  })
  return true
}

/** From the file of solved wheels where it is up to date, else solved now. */
function keptSolution(wheel: WheelToSolve) {
  const { digest, strength, structure } = solvedWheels.designs[designDigest(wheel)] ?? solveDesign(wheel)
  return { designDigest: digest, strength, structure }
}

/**
 * A demo that was seeded by older code lacks the tables, or the shape of them, that today's sums read. The versions it has stay as they are, and
 * so does advice frozen under them; what is new comes in force beside them.
 */
async function addNewRuleTables() {
  const rows = await RuleTable.findAll({ attributes: ['name', 'version', 'draftedById'], raw: true })
  const has = (name: string, version: string) => rows.find((row) => row.name === name && row.version === version)
  // Staff count in the same series, so the number may be a draft of theirs by now.
  const versionFor = (name: string) => (has(name, RULES_VERSION)?.draftedById ? `${RULES_VERSION}-seed` : RULES_VERSION)
  const fresh = ruleTables.filter(({ name }) => !has(name, versionFor(name)))
  await RuleTable.bulkCreate(
    fresh.map(({ name, source, label, data }) => ({
      ...{ name, source, label, data, version: versionFor(name) },
      ...{ inForceFrom: DEMO_NOW, state: 'in-force' as const, ...dated(DEMO_NOW) },
    })),
  )
}

/** Ids are given, not counted by the database, so that two seeds are equal even where rows were deleted before. */
const numbered = <T extends object>(rows: T[]) => rows.map((row, i) => ({ id: i + 1, ...row }))

const dated = (at: Date) => ({ createdAt: at, updatedAt: at })

async function seedRange(transaction: Transaction) {
  const start = dated(DEMO_START)
  await Market.bulkCreate(
    markets.map((one) => ({ ...one, ...start })),
    { transaction },
  )
  await Rim.bulkCreate(
    rims.map((one) => ({ ...one, ...start })),
    { transaction },
  )
  await Hub.bulkCreate(
    hubs.map((one) => ({ ...one, ...start })),
    { transaction },
  )
  await Spoke.bulkCreate(
    spokes.map((one) => ({ ...one, ...start })),
    { transaction },
  )
  await Wheelset.bulkCreate(
    catalogue.map(
      ({ id, sku, slug, name, timber, brake, beadSeatMm, rides, useCondition, assistRated, buildKind }) => ({
        ...{ id, sku, slug, name, timber, brake, beadSeatMm, rides, useCondition, assistRated, buildKind, ...start },
        inventedNote: DEMO_NOTE,
      }),
    ),
    { transaction },
  )
  await WheelsetWheel.bulkCreate(
    catalogue.flatMap((w) =>
      w.wheels.map(({ rim, hub, spoke, ...wheel }) => ({
        ...wheel,
        ...keptSolution({ rim, hub, spoke, ...wheel }),
        wheelsetId: w.id,
        rimId: rim.id,
        hubId: hub.id,
        spokeId: spoke.id,
        ...start,
      })),
    ),
    { transaction },
  )
  await WheelsetText.bulkCreate(
    numbered(
      catalogue.flatMap(({ id, sku }) =>
        (['en', 'pt'] as const).map((locale) => {
          const words = texts[sku]?.[locale]
          if (!words) throw new PrepareError(`No ${locale} text for ${sku}.`)
          return { wheelsetId: id, locale, tagline: words[0], description: words[1], ...start }
        }),
      ),
    ),
    { transaction },
  )
  await LimitVersion.bulkCreate(
    numbered(
      catalogue.map((w) => ({
        wheelsetId: w.id,
        limitKg: w.limitKg,
        proof: limitProof(w),
        reason: 'First limit of the demo range.',
        state: 'in-force' as const,
        inForceFrom: DEMO_START,
        createdAt: DEMO_START,
      })),
    ),
    { transaction },
  )
  await Price.bulkCreate(
    numbered(
      catalogue.flatMap(({ id, priceCents }) =>
        (['EUR', 'GBP', 'USD'] as const).map((currency) => ({
          wheelsetId: id,
          currency,
          priceCents: priceCents[currency],
          validFrom: DEMO_START,
          createdAt: DEMO_START,
        })),
      ),
    ),
    { transaction },
  )
  await Stock.bulkCreate(
    catalogue.map(({ id, onHand }) => ({ wheelsetId: id, onHand, ...dated(DEMO_NOW) })),
    { transaction },
  )
  await RuleTable.bulkCreate(
    numbered(
      ruleTables.map(({ name, source, label, data }) => ({ name, source, label, data, version: RULES_VERSION })),
    ).map((table) => ({
      ...table,
      inForceFrom: DEMO_START,
      state: 'in-force' as const,
      ...start,
    })),
    { transaction },
  )
}

async function seedOrders(transaction: Transaction) {
  const demo = demoOrders(DEMO_NOW)
  await Bike.bulkCreate(demo.bikes, { transaction })
  // in parts: a whole year of advice in one statement comes near the server's largest packet
  for (let from = 0; from < demo.snapshots.length; from += 100) {
    await AdviceSnapshot.bulkCreate(demo.snapshots.slice(from, from + 100), { transaction })
  }
  await Order.bulkCreate(demo.orders, { transaction })
  await OrderLine.bulkCreate(demo.lines, { transaction })
  await OrderEvent.bulkCreate(demo.events, { transaction })
  await Refund.bulkCreate(demo.refunds, { transaction })
  await LedgerEntry.bulkCreate(demo.ledger, { transaction })
  await OutboxMail.bulkCreate(demo.mails, { transaction })
}
