/** Starting, finding and stopping processes. Every one is in a group of its own, so that Ctrl-C reaches the launcher alone and it decides the order. */
import { spawn } from 'node:child_process'
import { randomUUID } from 'node:crypto'
import { closeSync, openSync, readFileSync, readdirSync, renameSync, rmSync, statSync } from 'node:fs'
import os from 'node:os'
import path from 'node:path'
import { pause } from './trouble.mjs'

const LOG_BYTES = 5_000_000

/** Opens a log for adding; a long one is put aside first, so that two are the most there ever are. */
export function openLog(file) {
  const size = statSync(file, { throwIfNoEntry: false })?.size ?? 0
  if (size > LOG_BYTES) renameSync(file, `${file}.old`)
  return openSync(file, 'a', 0o600)
}

/**
 * Starts a program that keeps running, its output in `log`.
 * @param ipc keep a channel open, so that the child notices the launcher's end (see leash.mjs)
 * @returns { child, ended: Promise<string> how it ended, hasEnded() }
 */
export function launch(program, args, { cwd, env, log, ipc = false }) {
  const out = openLog(log)
  const stdio = ['ignore', out, out, ...(ipc ? ['ipc'] : [])]
  const child = spawn(program, args, { cwd, env, stdio, detached: true })
  closeSync(out)
  let end = null
  const ended = new Promise((resolve) => {
    const finish = (how) => {
      end ??= how
      resolve(end)
    }
    child.once('error', (error) => finish(error.message))
    child.once('exit', (code, signal) => finish(signal ? `ended by ${signal}` : `ended with code ${code}`))
  })
  return { child, ended, hasEnded: () => end !== null }
}

/** TERM, and KILL for one that has not gone after `patienceMs`. */
export async function stop({ child, ended, hasEnded }, patienceMs) {
  if (hasEnded()) return
  child.kill('SIGTERM')
  const kill = setTimeout(() => child.kill('SIGKILL'), patienceMs)
  await ended
  clearTimeout(kill)
}

/** Running tools (npm, apt, vite, …), so that a signal in the middle of an installation can end them. */
const tools = new Set()

/**
 * Runs a program to its end.
 * @param options uninterrupted: never signalled, and it writes to a file that stays when we are gone, as half-configured
 *   Debian packages would be left behind otherwise; fd: an open file that it gets as its number 3
 * @returns { code, output } output holds both streams, in order
 */
export function run(program, args, { cwd, env, fd, uninterrupted = false } = {}) {
  const file = path.join(os.tmpdir(), `felloe-${process.pid}-${randomUUID()}.log`)
  const out = openSync(file, 'wx+', 0o600)
  return new Promise((resolve) => {
    const child = spawn(program, args, {
      cwd,
      env,
      stdio: ['ignore', out, out, ...(fd === undefined ? [] : [fd])],
      detached: true,
    })
    const tool = { pid: child.pid, uninterrupted }
    tools.add(tool)
    const finish = (code, reason = '') => {
      if (!tools.delete(tool)) return
      const output = readFileSync(file, 'utf8') + reason
      closeSync(out)
      rmSync(file)
      resolve({ code, output })
    }
    child.once('error', (error) => finish(127, error.message))
    child.once('exit', (code) => finish(code ?? 1))
  })
}

/** Ends running tools, or waits a while for those that should not be interrupted. */
export async function stopTools(patienceMs) {
  for (const { pid, uninterrupted } of tools) {
    if (!uninterrupted) signalGroup(pid)
  }
  for (let waited = 0; tools.size > 0 && waited < patienceMs; waited += 25) await pause(25)
}

function signalGroup(pid) {
  try {
    process.kill(-pid, 'SIGTERM')
  } catch {
    // gone already
  }
}

/** Pids whose command line holds this argument: what an earlier launcher that was killed has left behind. */
export function findProcesses(argument) {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .filter((pid) => commandLine(pid).includes(argument))
    .map(Number)
}

function commandLine(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0')
  } catch {
    return [] // ended meanwhile
  }
}

/** Stops processes that are not our children. @returns the pids that may not be stopped by this user */
export async function stopLeftovers(argument, patienceMs) {
  const refused = []
  const signal = (name) => {
    for (const pid of findProcesses(argument)) {
      try {
        process.kill(pid, name)
      } catch (error) {
        if (error.code === 'EPERM') refused.push(pid)
      }
    }
  }
  signal('SIGTERM')
  for (let waited = 0; findProcesses(argument).length > refused.length && waited < patienceMs; waited += 25)
    await pause(25)
  if (findProcesses(argument).length > refused.length) {
    signal('SIGKILL')
    await pause(50)
  }
  return refused
}
