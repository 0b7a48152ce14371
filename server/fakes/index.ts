/** The stand-ins as one process beside the shop: payments on one port, mails on two others. */
import path from 'node:path'
import { readFakesConfig } from './config.ts'
import { reachableHost } from './listen.ts'
import { createMailSink } from './mail/sink.ts'
import { createStripeFake } from './stripe/server.ts'

function settings() {
  try {
    return readFakesConfig(process.env)
  } catch (error) {
    console.error(error instanceof Error ? error.message : String(error))
    process.exit(1)
  }
}

const config = settings()
const { HOST: host, DATA_DIR, PAYMENTS, STRIPE_FAKE_PORT, MAIL_SINK_PORT, SMTP_PORT } = config

const running = [
  ...(PAYMENTS === 'stripe' || STRIPE_FAKE_PORT === undefined
    ? []
    : [
        createStripeFake({
          port: STRIPE_FAKE_PORT,
          host,
          payHost: reachableHost(host, config.PUBLIC_URL),
          secretKey: config.STRIPE_SECRET_KEY,
          webhookSecret: config.STRIPE_WEBHOOK_SECRET,
          webhookUrl: config.STRIPE_WEBHOOK_URL ?? `${config.PUBLIC_URL}/api/webhooks/stripe`,
          file: path.join(DATA_DIR, 'stripe-fake.json'),
        }),
      ]),
  ...(SMTP_PORT === undefined || MAIL_SINK_PORT === undefined
    ? []
    : [
        createMailSink({
          smtpPort: SMTP_PORT,
          webPort: MAIL_SINK_PORT,
          host,
          file: path.join(DATA_DIR, 'mails.jsonl'),
        }),
      ]),
]

let stopping = false
const stop = async () => {
  if (stopping) return
  stopping = true
  await Promise.allSettled(running.map((one) => one.stop()))
  process.exit(0)
}
process.on('SIGTERM', () => void stop())
process.on('SIGINT', () => void stop())

try {
  await Promise.all(running.map((one) => one.start()))
} catch (error) {
  console.error(`A stand-in cannot listen: ${error instanceof Error ? error.message : String(error)}`)
  process.exit(1)
}
