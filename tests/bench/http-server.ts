/** One of the two servers that http.ts compares, in a process of its own: it says its port, then its CPU time whenever asked. */
import type { AddressInfo } from 'node:net'
import express from 'express'
import { pino } from 'pino'
import { riderAnswers } from '#contract/advisor.ts'
import { advise } from '#core/advise.ts'
import { rulesFrom } from '#core/rules.ts'
import { createApp } from '../../server/app.ts'
import { readConfig } from '../../server/config.ts'
import { openDatabase } from '../../server/db.ts'
import { initModels } from '../../server/models/index.ts'
import { createPayments } from '../../server/payments/create.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'

function echo() {
  const app = express()
  app.post('/api/advice', express.json(), (req, res) => {
    res.json(req.body)
  })
  return app
}

/** Bare Express with the same check and the same sums: what the answer costs before anything that a shop needs around it. */
function lean() {
  const rules = rulesFrom(ruleTables)
  const app = express()
  app.disable('etag')
  app.post('/api/advice', express.json(), (req, res) => {
    res.json(advise(riderAnswers.parse(req.body), wheelsetFacts, rules, 'bench'))
  })
  return app
}

function shop() {
  const config = readConfig({
    ...process.env,
    NODE_ENV: 'development',
    PAYMENTS: 'stripe-fake',
    SESSION_SECRET: 'a secret that only the benchmark knows',
    STRIPE_SECRET_KEY: 'sk_test_bench',
    STRIPE_WEBHOOK_SECRET: 'whsec_bench',
    PUBLIC_URL: 'http://127.0.0.1:1',
    SMTP_URL: 'smtp://127.0.0.1:1',
  })
  const db = openDatabase(config.DATABASE_URL)
  initModels(db)
  const clock = () => new Date()
  // Lines are written as in the shop, and thrown away.
  const log = pino({ level: 'info' }, { write: () => undefined })
  return createApp({ config, db, payments: createPayments(config, clock), clock, log }, null)
}

const kinds: Record<string, () => express.Express> = { echo, lean, shop }
const server = (kinds[process.argv[2] ?? ''] ?? shop)().listen(0, '127.0.0.1', () => {
  process.send?.({ port: (server.address() as AddressInfo).port })
})
process.on('message', () => {
  const { user, system } = process.cpuUsage()
  process.send?.({ cpuMicros: user + system })
})
process.on('disconnect', () => process.exit(0))
