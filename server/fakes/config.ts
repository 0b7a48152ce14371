/** Settings of the stand-ins. They import nothing of the shop: what they know of it comes over the wire. */
import { z } from 'zod'

const port = z.coerce.number<string>().int().min(1).max(65535)
const settings = z
  .object({
    HOST: z.string().min(1).default('127.0.0.1'),
    DATA_DIR: z.string().min(1).default('.data'),
    PUBLIC_URL: z.url().default('http://127.0.0.1:4300'),
    PAYMENTS: z.enum(['stripe', 'stripe-fake']).default('stripe-fake'),
    STRIPE_FAKE_PORT: port.optional(),
    STRIPE_SECRET_KEY: z.string().default(''),
    STRIPE_WEBHOOK_SECRET: z.string().default(''),
    STRIPE_WEBHOOK_URL: z.url().optional(),
    MAIL_SINK_PORT: port.optional(),
    SMTP_PORT: port.optional(),
  })
  .superRefine((config, context) => {
    if (config.PAYMENTS === 'stripe' || config.STRIPE_FAKE_PORT === undefined) return
    // With an empty key anybody's key would be the right one, and an empty secret signs nothing.
    for (const name of ['STRIPE_SECRET_KEY', 'STRIPE_WEBHOOK_SECRET'] as const)
      if (config[name] === '')
        context.addIssue({ code: 'custom', path: [name], message: 'needed by the stand-in for payments' })
  })

/** @throws Error naming each setting that cannot be used, never its value */
export function readFakesConfig(env: Record<string, string | undefined>) {
  const read = settings.safeParse(env)
  if (read.success) return read.data
  const faults = read.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}`)
  throw new Error(`Settings that cannot be used:\n${faults.join('\n')}`)
}
