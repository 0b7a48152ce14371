/** Reads the settings, opens the database, starts the shop and its jobs, stops them in reverse order. */
import path from 'node:path'
import { fileURLToPath } from 'node:url'
import { pino } from 'pino'
import { createApp } from './app.ts'
import { ConfigError, readConfig } from './config.ts'
import { openDatabase } from './db.ts'
import type { Deps } from './deps.ts'
import { initModels } from './models/index.ts'
import { startJobs } from './jobs/runner.ts'
import { createPayments } from './payments/create.ts'

function start() {
  const config = readConfig(process.env)
  const log = pino({ level: config.LOG_LEVEL })
  const db = openDatabase(config.DATABASE_URL)
  initModels(db)
  const deps: Deps = { config, db, payments: createPayments(config), clock: () => new Date(), log }
  const here = path.dirname(fileURLToPath(import.meta.url))
  const app = createApp(deps, path.resolve(here, '../client'))
  const jobs = startJobs(deps)

  const server = app.listen(config.PORT, config.HOST, (error) => {
    if (error) {
      log.fatal({ err: error }, `PORT ${config.PORT} cannot be used`)
      process.exit(1)
    }
    log.info(`listening on http://${config.HOST}:${config.PORT}`)
  })
  // Slow senders are let go well before Node's own 60 s and 300 s.
  server.headersTimeout = 15_000
  server.requestTimeout = 30_000

  let stopping = false
  const stop = async () => {
    if (stopping) return
    stopping = true
    await jobs.stop()
    await new Promise((resolve) => {
      server.close(resolve)
      server.closeIdleConnections()
      setTimeout(() => {
        server.closeAllConnections()
      }, 5_000).unref()
    })
    await db.close()
    process.exit(0)
  }
  process.on('SIGTERM', () => void stop())
  process.on('SIGINT', () => void stop())
}

try {
  start()
} catch (error) {
  if (!(error instanceof ConfigError)) throw error
  console.error(error.message)
  process.exit(1)
}
