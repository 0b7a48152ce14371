/** Installs what is missing: npm packages by the lock file, and Debian packages. */
import { accessSync, constants, existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { run } from './processes.mjs'
import { ROOT } from './settings.mjs'
import { Trouble, tail } from './trouble.mjs'

/** PATH, and /usr/sbin, where Debian puts servers and which is on root's PATH alone. */
const FOLDERS = () => [...(process.env.PATH ?? '').split(':'), '/usr/sbin']

/** @returns the full path of a program, or null */
export function findProgram(name) {
  for (const folder of FOLDERS().filter(Boolean)) {
    const file = path.join(folder, name)
    try {
      accessSync(file, constants.X_OK)
      return file
    } catch {
      // not in this folder
    }
  }
  return null
}

const readPackages = (file) => {
  try {
    return JSON.parse(readFileSync(file, 'utf8')).packages
  } catch {
    return null
  }
}

/**
 * Compares the lock file with the note that npm itself keeps of what it has installed, so that it does not matter who
 * installed, and an installation that was cut short shows: npm writes the note last.
 * @param kind 'runtime' leaves packages aside that only development needs, whether they are there or not
 * @returns 'complete' | 'some' (a few are missing or of another version) | 'none'
 */
export function packagesState(kind, root = ROOT) {
  const wanted = readPackages(path.join(root, 'package-lock.json'))
  if (!wanted) throw new Trouble('package-lock.json is missing or broken: restore it from the repository.')
  const there = readPackages(path.join(root, 'node_modules/.package-lock.json'))
  if (!there) return 'none'
  const complete = Object.entries(wanted).every(([name, one]) => {
    // optional ones depend on the machine; extraneous ones are in the lock file and wanted by nobody
    if (name === '' || one.optional || one.extraneous || one.os || one.cpu) return true
    if (kind === 'runtime' && (one.dev || one.devOptional)) return true
    return there[name]?.version === one.version && existsSync(path.join(root, name))
  })
  return complete ? 'complete' : 'some'
}

const hasDevPackages = () =>
  Object.values(readPackages(path.join(ROOT, 'node_modules/.package-lock.json')) ?? {}).some((one) => one.dev)

/**
 * Nothing there: `npm ci`. Something missing: added without taking away what is there, as another shop may be running
 * from these packages.
 * @param kind 'runtime' for a start, 'all' for the tests
 * @throws Trouble with the end of npm's output
 */
export async function installPackages(kind, say) {
  const state = packagesState(kind)
  if (state === 'complete') return
  say(state === 'none' ? 'Installing the packages (about 20 seconds) …' : 'Bringing the packages up to date …')
  const include = kind === 'all' || hasDevPackages() ? '--include=dev' : '--omit=dev'
  const flags = [include, '--no-audit', '--no-fund', '--loglevel=error']
  const args = state === 'none' ? ['ci', ...flags] : ['install', '--no-save', ...flags]
  const npm = process.env.npm_execpath
  const [program, before] = npm?.endsWith('.js') ? [process.execPath, [npm]] : ['npm', []]
  const { code, output } = await run(program, [...before, ...args], { cwd: ROOT, env: cleanEnv() })
  if (code !== 0) {
    throw new Trouble(`The packages could not be installed: check the connection to the npm registry.\n${tail(output)}`)
  }
}

/** Without NODE_ENV, which would make npm leave packages out, and without what an outer npm passed on. */
export function cleanEnv(env = process.env) {
  const kept = Object.entries(env).filter(
    ([name]) => name !== 'NODE_ENV' && !/^npm_(lifecycle|package|command|execpath)/.test(name),
  )
  return Object.fromEntries(kept)
}

/**
 * Says at once when Debian packages are missing that this user cannot install; called before anything is made.
 * @param otherWay another way out, as the end of the sentence
 */
export function assertInstallable(what, programs, packages, otherWay = '') {
  if (programs.every((name) => findProgram(name))) return
  if (process.getuid() === 0 && findProgram('apt-get')) return
  const command = `apt-get update && apt-get install -y --no-install-recommends ${packages.join(' ')}`
  throw new Trouble(
    `${what} is not installed and installing it needs root: have an administrator run "${command}"${otherWay}.`,
  )
}

/** @throws Trouble with the end of apt's output */
export async function installDebian(what, programs, packages, say) {
  if (programs.every((name) => findProgram(name))) return
  say(`Installing ${what} from Debian …`)
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const wait = ['-o', 'DPkg::Lock::Timeout=120']
  // a failed update is told by the installation: with good lists from earlier it may well work
  const update = await run('apt-get', ['update', '-qq', ...wait], { env, uninterrupted: true })
  const { code, output } = await run('apt-get', ['install', '-y', '--no-install-recommends', ...wait, ...packages], {
    env,
    uninterrupted: true,
  })
  if (code !== 0 || !programs.every((name) => findProgram(name))) {
    throw new Trouble(
      `${what} could not be installed: run "apt-get install ${packages.join(' ')}" and see what it says.\n${tail(update.output + output)}`,
    )
  }
}

export const MARIADB = {
  what: 'MariaDB',
  programs: ['mariadbd', 'mariadb-install-db'],
  packages: ['mariadb-server'],
}
