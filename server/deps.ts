/** What a use case may reach of the outside world; built once in index.ts, built afresh by tests. */
import type { Logger } from 'pino'
import type { Sequelize } from 'sequelize'
import type { Config } from './config.ts'
import type { Payments } from './payments/index.ts'

export interface Deps {
  config: Config
  db: Sequelize
  payments: Payments
  /** The one clock of the server; tests set it. */
  clock: () => Date
  log: Logger
}
