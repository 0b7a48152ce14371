/** The whole application in one process: real MariaDB, the real SDK over the wire to the stand-in, a clock that tests set. */
import type { AddressInfo } from 'node:net'
import { createServer, type Server } from 'node:http'
import { pino } from 'pino'
import request from 'supertest'
import { createApp } from '../../server/app.ts'
import type { Config } from '../../server/config.ts'
import type { Deps } from '../../server/deps.ts'
import { createStripeFake } from '../../server/fakes/stripe/server.ts'
import { createPayments } from '../../server/payments/create.ts'
import { DEMO_NOW } from '../../server/seeds/index.ts'
import { testDatabase, type Filling } from './test-db.ts'

export const passwords = {
  rider: 'rider-demo-2026',
  support: 'support-demo-2026',
  product: 'product-demo-2026',
  product2: 'product2-demo-2026',
  admin: 'admin-demo-2026',
} as const
export type Who = keyof typeof passwords

const SECRETS = {
  STRIPE_SECRET_KEY: 'sk_test_stand_in_of_the_tests',
  STRIPE_WEBHOOK_SECRET: 'whsec_stand_in_of_the_tests',
}

/** @param seed 'range' unless the test needs the seeded orders */
export async function testApp({ seed = 'range' }: Filling = {}) {
  const database = await testDatabase({ seed })
  // The demo's present is the real one when it is later: the stand-in and the SDK's signatures go by real time.
  let shiftMs = 0
  const clock = () => new Date(Math.max(Date.now(), DEMO_NOW.getTime()) + shiftMs)

  const server: Server = createServer()
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const shopPort = (server.address() as AddressInfo).port
  const stripe = createStripeFake({
    port: 0,
    host: '127.0.0.1',
    secretKey: SECRETS.STRIPE_SECRET_KEY,
    webhookSecret: SECRETS.STRIPE_WEBHOOK_SECRET,
    webhookUrl: `http://127.0.0.1:${shopPort}/api/webhooks/stripe`,
    clock,
  })
  const { port: stripePort } = await stripe.start()
  const config: Config = {
    NODE_ENV: 'test',
    HOST: '127.0.0.1',
    PORT: shopPort,
    PUBLIC_URL: `http://127.0.0.1:${shopPort}`,
    DATA_DIR: '.data',
    DATABASE_URL: database.url,
    SESSION_SECRET: 'a secret that only the tests know',
    PAYMENTS: 'stripe-fake',
    ...SECRETS,
    STRIPE_FAKE_PORT: stripePort,
    SMTP_URL: 'smtp://127.0.0.1:1',
    MAIL_FROM: 'Felloe <workshop@felloe.example>',
    LOG_LEVEL: 'silent',
  }
  const deps: Deps = {
    config,
    db: database.sequelize,
    payments: createPayments(config, clock),
    clock,
    log: pino({ level: process.env.TEST_LOG ?? 'silent' }),
  }
  const app = createApp(deps, null)
  server.on('request', app)

  const agent = () => request.agent(server)
  return {
    deps,
    database,
    stripeUrl: `http://127.0.0.1:${stripePort}`,
    /** One visitor with a cookie jar of its own. */
    agent,
    signedIn: async (who: Who) => {
      const visitor = agent()
      await visitor
        .post('/api/session')
        .send({ email: `${who}@felloe.example`, password: passwords[who] })
        .expect(200)
      return visitor
    },
    /** Moves the shop's clock; the stand-in's goes along. */
    passTime: (ms: number) => {
      shiftMs += ms
    },
    close: async () => {
      await stripe.stop()
      await new Promise((resolve) => {
        server.close(resolve)
        server.closeAllConnections()
      })
      await database.close()
    },
  }
}
export type TestApp = Awaited<ReturnType<typeof testApp>>
