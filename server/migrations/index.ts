/** Every migration in order, and the runner. Static imports: the same list runs under tsx, esbuild and vitest. */
import type { QueryInterface, Sequelize } from 'sequelize'
import { SequelizeStorage, Umzug } from 'umzug'
import * as createParts from './20261201-1000-create-parts.ts'
import * as createUsers from './20261201-1001-create-users.ts'
import * as createWheelsets from './20261201-1002-create-wheelsets.ts'
import * as createLimitVersions from './20261201-1003-create-limit-versions.ts'
import * as createPrices from './20261201-1004-create-prices.ts'
import * as createStock from './20261201-1005-create-stock.ts'
import * as createAdviceSnapshots from './20261201-1006-create-advice-snapshots.ts'
import * as createBaskets from './20261201-1007-create-baskets.ts'
import * as createOrders from './20261201-1008-create-orders.ts'
import * as createOrderEvents from './20261201-1009-create-order-events.ts'
import * as createMoney from './20261201-1010-create-money.ts'
import * as createWebhookEvents from './20261201-1011-create-webhook-events.ts'
import * as createIdempotencyKeys from './20261201-1012-create-idempotency-keys.ts'
import * as createOutboxMails from './20261201-1013-create-outbox-mails.ts'
import * as createAuditRows from './20261201-1014-create-audit-rows.ts'
import * as createRuleTables from './20261201-1015-create-rule-tables.ts'
import * as createDemoMarker from './20261201-1016-create-demo-marker.ts'
import * as protectHistory from './20261201-1017-protect-history.ts'
import * as addRefundLines from './20261201-1018-add-refund-lines.ts'
import * as addWheelStructure from './20261201-1020-add-wheel-structure.ts'
import * as markAdviceInputs from './20261201-1021-mark-advice-inputs.ts'
import * as secondRuleTables from './20261201-1022-second-rule-tables.ts'

interface Migration {
  up: (q: QueryInterface) => Promise<unknown>
  down: (q: QueryInterface) => Promise<unknown>
}

const migrations: Record<string, Migration> = {
  '20261201-1000-create-parts': createParts,
  '20261201-1001-create-users': createUsers,
  '20261201-1002-create-wheelsets': createWheelsets,
  '20261201-1003-create-limit-versions': createLimitVersions,
  '20261201-1004-create-prices': createPrices,
  '20261201-1005-create-stock': createStock,
  '20261201-1006-create-advice-snapshots': createAdviceSnapshots,
  '20261201-1007-create-baskets': createBaskets,
  '20261201-1008-create-orders': createOrders,
  '20261201-1009-create-order-events': createOrderEvents,
  '20261201-1010-create-money': createMoney,
  '20261201-1011-create-webhook-events': createWebhookEvents,
  '20261201-1012-create-idempotency-keys': createIdempotencyKeys,
  '20261201-1013-create-outbox-mails': createOutboxMails,
  '20261201-1014-create-audit-rows': createAuditRows,
  '20261201-1015-create-rule-tables': createRuleTables,
  '20261201-1016-create-demo-marker': createDemoMarker,
  '20261201-1017-protect-history': protectHistory,
  '20261201-1018-add-refund-lines': addRefundLines,
  '20261201-1020-add-wheel-structure': addWheelStructure,
  '20261201-1021-mark-advice-inputs': markAdviceInputs,
  '20261201-1022-second-rule-tables': secondRuleTables,
}

/** In the order they run. The shop itself may only read and write rows, so its health check compares names and runs nothing. */
export const migrationNames = Object.keys(migrations)

/** The runner for one database: `up()`, `down({ to: 0 })`, `pending()`, `executed()`. What has run stands in the table `migrations`. */
export const migrator = (sequelize: Sequelize) =>
  new Umzug<QueryInterface>({
    migrations: Object.entries(migrations).map(([name, { up, down }]) => ({
      name,
      up: async ({ context }) => up(context),
      down: async ({ context }) => down(context),
    })),
    context: sequelize.getQueryInterface(),
    storage: new SequelizeStorage({ sequelize, modelName: 'Migration', tableName: 'migrations' }),
    logger: undefined,
  })
