/** A whole shop as `npm start` gives it, in a data folder of its own and on free ports: the one on 4300 is never touched. */
import { spawn } from 'node:child_process'
import type { ChildProcess } from 'node:child_process'
import { chmodSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import os from 'node:os'
import path from 'node:path'
import { freePort } from './mariadb-server.ts'

const ROOT = path.resolve(import.meta.dirname, '../..')
const LAUNCHER = path.join(ROOT, 'server/bin/start.mjs')

/** Settings that the person who runs the tests may have for a shop of their own. */
const SETTINGS = [
  'HOST PORT PUBLIC_URL DATA_DIR BUILD_DIR DATABASE_URL MIGRATE_DATABASE_URL SESSION_SECRET PAYMENTS STRIPE_SECRET_KEY',
  'STRIPE_WEBHOOK_SECRET STRIPE_FAKE_PORT MAIL_SINK_PORT SMTP_PORT SMTP_URL MAIL_FROM LOG_LEVEL NODE_ENV VITEST NODE_OPTIONS',
]
  .join(' ')
  .split(' ')

export interface Ports {
  PORT: string
  STRIPE_FAKE_PORT: string
  MAIL_SINK_PORT: string
  SMTP_PORT: string
}

export async function freePorts(): Promise<Ports> {
  const ports = new Set<number>()
  while (ports.size < 4) ports.add(await freePort())
  const [shop, pay, mail, smtp] = [...ports].map(String)
  return { PORT: shop!, STRIPE_FAKE_PORT: pay!, MAIL_SINK_PORT: mail!, SMTP_PORT: smtp! }
}

/** An empty folder that MariaDB's own user can get into as well; the caller takes it away. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'felloe-data-'))
  chmodSync(folder, 0o755)
  return folder
}

export const removeFolder = (folder: string) => rmSync(folder, { recursive: true, force: true })

export interface Launch {
  process: ChildProcess
  /** Everything it has written so far, both streams. */
  output: () => string
  /** Exit code; null after a signal. */
  ended: Promise<number | null>
  /** The address of its last line. Rejects with its output when it ends without. */
  ready: Promise<string>
}

/**
 * Runs the launcher. The build goes to test-output/dist, so that a running shop keeps the files it serves.
 * @param command what to run; the launcher in this checkout unless said otherwise
 */
export function launchShop(env: Record<string, string>, command: string[] = [process.execPath, LAUNCHER]): Launch {
  const own = Object.fromEntries(Object.entries(process.env).filter(([name]) => !SETTINGS.includes(name)))
  const [program = process.execPath, ...args] = command
  const child = spawn(program, args, {
    cwd: ROOT,
    env: { ...own, BUILD_DIR: 'test-output/dist', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
    detached: true,
  })
  let output = ''
  const ended = new Promise<number | null>((resolve) => {
    child.once('close', (code) => resolve(code))
    child.once('error', (error) => {
      output += error.message
      resolve(127)
    })
  })
  const ready = new Promise<string>((resolve, reject) => {
    const add = (chunk: Buffer) => {
      output += chunk.toString()
      const url = /^Felloe is ready at (\S+)$/m.exec(output)?.[1]
      if (url) resolve(url)
    }
    child.stdout.on('data', add)
    child.stderr.on('data', add)
    void ended.then(() => reject(new Error(`The launcher ended before it was ready:\n${output}`)))
  })
  // a test that expects a refusal looks at `ended`
  ready.catch(() => undefined)
  return { process: child, output: () => output, ended, ready }
}

/** Asks it to stop and waits until it has. */
export async function stopShop(launch: Launch): Promise<number | null> {
  launch.process.kill('SIGTERM')
  return launch.ended
}

/** Pids of all processes that have this data folder on their command line: MariaDB, the shop, the stand-ins. */
export function processesOf(dataDir: string, program = ''): number[] {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .filter((pid) => {
      try {
        const line = readFileSync(`/proc/${pid}/cmdline`, 'utf8')
        return line.includes(dataDir) && line.includes(program)
      } catch {
        return false // ended meanwhile
      }
    })
    .map(Number)
}
