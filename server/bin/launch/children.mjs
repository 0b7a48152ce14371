/** The shop and the local stand-ins: started, waited for, watched, stopped. */
import { readFileSync } from 'node:fs'
import path from 'node:path'
import { answers } from './ports.mjs'
import { launch, stop, stopLeftovers } from './processes.mjs'
import { ROOT, localUrl } from './settings.mjs'
import { Trouble, pause, tail } from './trouble.mjs'

const READY_MS = 60_000
/** The shop lets go of its last visitor after 5 s by itself. */
const STOP_MS = 6_000

const LEASH = path.join(import.meta.dirname, 'leash.mjs')

/** Marks a child as belonging to this data folder, so that the next start finds one that was left behind. */
const mark = (dataDir) => `--data-dir=${dataDir}`

/** Ends what a killed launcher left behind; usually the leash has done it. */
export const stopLeftChildren = (dataDir) => stopLeftovers(mark(dataDir), STOP_MS)

/**
 * Starts one built entry; its output goes to DATA_DIR/logs/<logName>.log.
 * @param name how a sentence about it begins
 * @returns { name, log, ended, hasEnded, stop }
 */
export function startChild(name, logName, file, { dataDir, env }) {
  const log = path.join(dataDir, 'logs', `${logName}.log`)
  const args = ['--enable-source-maps', `--import=${LEASH}`, file, mark(dataDir)]
  const running = launch(process.execPath, args, { cwd: ROOT, env, log, ipc: true })
  return { name, log, ended: running.ended, hasEnded: running.hasEnded, stop: () => stop(running, STOP_MS) }
}

/** @throws Trouble with the end of its log when it ends before it answers */
export async function waitForPort(child, host, port) {
  await waitUntil(child, () => answers(host, port))
}

/** @throws Trouble with the end of its log when it ends before it says that it is ready */
export async function waitForReady(child, host, port) {
  const url = `${localUrl(host, port)}/api/health/ready`
  await waitUntil(child, async () => {
    try {
      return (await fetch(url, { signal: AbortSignal.timeout(2_000) })).status === 200
    } catch {
      return false
    }
  })
}

async function waitUntil(child, check) {
  for (const until = Date.now() + READY_MS; !(await check()); await pause(40)) {
    if (child.hasEnded())
      throw new Trouble(`${child.name} ${await child.ended} while starting: the reason is below.\n${lastLines(child)}`)
    if (Date.now() > until)
      throw new Trouble(`${child.name} did not become ready: see ${child.log}.\n${lastLines(child)}`)
  }
}

export function lastLines({ log }) {
  try {
    return tail(readFileSync(log, 'utf8'), 8)
  } catch {
    return ''
  }
}
