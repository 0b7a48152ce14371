/** What each child is told. The shop reads it in server/config.ts; everything else the owner has set is passed on. */
import { cleanEnv } from './install.mjs'
import { localUrl } from './settings.mjs'

/**
 * @param settings from readSettings
 * @param shopUrl the database as the shop may use it
 * @param secrets from secretSettings
 */
export function shopEnv({ host, port, dataDir, payments, standIns }, shopUrl, secrets, env) {
  const { MIGRATE_DATABASE_URL: _kept, ...passedOn } = cleanEnv(env)
  return {
    ...passedOn,
    ...(env.NODE_ENV && { NODE_ENV: env.NODE_ENV }),
    ...(standIns.SMTP_PORT && { SMTP_URL: env.SMTP_URL || `smtp://127.0.0.1:${standIns.SMTP_PORT.port}` }),
    ...portSettings(standIns),
    ...secrets,
    TZ: 'UTC',
    DATABASE_URL: shopUrl,
    HOST: host,
    PORT: String(port),
    DATA_DIR: dataDir,
    PUBLIC_URL: env.PUBLIC_URL || localUrl(host, port),
    PAYMENTS: payments,
  }
}

/** The stand-ins have no business with the database, with sessions, or with the keys of the hosted service. A stand-in without a port is not started. */
export function standInsEnv(shop) {
  const { DATABASE_URL: _database, SESSION_SECRET: _session, ...env } = shop
  if (shop.PAYMENTS === 'stripe') {
    delete env.STRIPE_SECRET_KEY
    delete env.STRIPE_WEBHOOK_SECRET
    delete env.STRIPE_FAKE_PORT
  }
  return env
}

const portSettings = (standIns) =>
  Object.fromEntries(Object.entries(standIns).map(([setting, { port }]) => [setting, String(port)]))
