/** The data folder: that it can be used, that only one start uses it, and the secrets that are kept in it. */
import { randomBytes } from 'node:crypto'
import {
  accessSync,
  constants,
  mkdirSync,
  openSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs'
import path from 'node:path'
import { takeLock } from './lock.mjs'
import { Trouble } from './trouble.mjs'

/**
 * Makes the folder if it is not there, and takes its lock.
 * @throws Trouble when the folder cannot be used or another start is using it
 */
export function openDataDir(dataDir) {
  const way = 'make it writable, or set DATA_DIR to another folder.'
  const stat = statSync(dataDir, { throwIfNoEntry: false })
  if (stat && !stat.isDirectory()) {
    throw new Trouble(`DATA_DIR ${dataDir} is a file, not a folder: move it away, or set DATA_DIR to another folder.`)
  }
  try {
    mkdirSync(dataDir, { recursive: true })
    accessSync(dataDir, constants.R_OK | constants.W_OK | constants.X_OK)
    mkdirSync(path.join(dataDir, 'logs'), { recursive: true })
    lock(path.join(dataDir, 'start.lock'), dataDir)
  } catch (error) {
    if (error instanceof Trouble) throw error
    throw new Trouble(`DATA_DIR ${dataDir} cannot be written to (${error.code ?? error.message}): ${way}`)
  }
}

function lock(file, dataDir) {
  if (takeLock(openSync(file, 'a', 0o600))) {
    writeFileSync(file, `${process.pid}\n`)
    return
  }
  const holder = readFileSync(file, 'utf8').trim()
  throw new Trouble(
    `Another start${holder && ` (process ${holder})`} is using ${dataDir}: stop it, or set DATA_DIR to another folder.`,
  )
}

/**
 * Reads a small JSON file of ours; `{}` when it is not there.
 * @throws Trouble when it is there and cannot be read
 */
export function readJson(file) {
  if (!statSync(file, { throwIfNoEntry: false })) return {}
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch (error) {
    const why = error.code ?? 'it is not JSON'
    throw new Trouble(`${file} cannot be read (${why}): restore it, or move the whole data folder away to begin anew.`)
  }
}

/** Written beside and moved into place, readable by the owner alone: a power cut leaves the old one or the new one. */
export function writeJson(file, value) {
  const draft = `${file}.new`
  rmSync(draft, { force: true })
  writeFileSync(draft, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 })
  renameSync(draft, file)
}

/**
 * Secrets that nobody has set are made once and kept. None is made up for the hosted payment service.
 * @returns the settings to add to the children's environment
 */
export function secretSettings(dataDir, payments, env) {
  const file = path.join(dataDir, 'secrets.json')
  const kept = readJson(file)
  const make = {
    SESSION_SECRET: () => randomBytes(32).toString('hex'),
    ...(payments === 'stripe-fake' && {
      STRIPE_SECRET_KEY: () => `sk_test_${randomBytes(16).toString('hex')}`,
      STRIPE_WEBHOOK_SECRET: () => `whsec_${randomBytes(24).toString('hex')}`,
    }),
  }
  const missing = Object.keys(make).filter((name) => !kept[name])
  if (missing.length > 0) {
    for (const name of missing) kept[name] = make[name]()
    writeJson(file, kept)
  }
  return Object.fromEntries(Object.keys(make).map((name) => [name, env[name] || kept[name]]))
}
