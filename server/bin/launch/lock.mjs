/** Locks that the kernel holds for this process and lets go when it ends, however it ends: there is no stale lock. */
import { spawnSync } from 'node:child_process'
import { closeSync, openSync } from 'node:fs'
import path from 'node:path'
import { run } from './processes.mjs'
import { ROOT } from './settings.mjs'
import { Trouble } from './trouble.mjs'

// flock(1) locks the open file that it shares with us, so the lock stays when flock itself has ended
const flock = (...flags) => ['flock', ['--exclusive', ...flags, '3']]

/** @returns false when another process holds it; otherwise it is ours to the end */
export function takeLock(fd) {
  const { status, error } = spawnSync(...flock('--nonblock'), { stdio: ['ignore', 'ignore', 'ignore', fd] })
  if (error) throw new Trouble('The program flock is missing: install the Debian package util-linux.')
  return status === 0
}

/** Runs `work` while no other start or test run installs or builds in this checkout; waits for one that does. */
export async function aloneInCheckout(work) {
  const fd = openSync(path.join(ROOT, 'package.json'), 'r')
  try {
    await run(...flock(), { fd })
    return await work()
  } finally {
    closeSync(fd)
  }
}
