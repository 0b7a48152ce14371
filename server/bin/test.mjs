/**
 * `npm test`: installs what is missing, then format, lint, types, the suites and the browser. Leaves a running shop and its
 * data alone: every suite has its own database, the built files go to test-output/dist.
 * The last line is always `N passed, N failed`; format, lint and types count as one each. Code 1 when anything failed.
 */
import { spawn } from 'node:child_process'
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import path from 'node:path'
import { MARIADB, assertInstallable, cleanEnv, installDebian, installPackages } from './launch/install.mjs'
import { aloneInCheckout } from './launch/lock.mjs'
import { run } from './launch/processes.mjs'
import { ROOT, checkNode } from './launch/settings.mjs'
import { Trouble } from './launch/trouble.mjs'

/** Fonts for what the shop's own font leaves open, so that screenshots look alike on every machine. */
const BROWSER = { what: 'Chromium', programs: ['chromium'], packages: ['chromium', 'fonts-dejavu-core'] }

const OUTPUT = path.join(ROOT, 'test-output')
const count = { passed: 0, failed: 0 }
const say = (line) => process.stdout.write(`${line}\n`)
const seconds = (from) => `${((Date.now() - from) / 1000).toFixed(1)} s`

/** A suite may never reach the shop that the person has running, or its database. */
function testEnv() {
  const ours =
    /^(HOST|PORT|PUBLIC_URL|DATA_DIR|BUILD_DIR|(MIGRATE_|TEST_)?DATABASE_URL|SESSION_SECRET|PAYMENTS|STRIPE_.*|MAIL_.*|SMTP_.*|LOG_LEVEL)$/
  const kept = Object.entries(cleanEnv(process.env)).filter(([name]) => !ours.test(name))
  return { ...Object.fromEntries(kept), TZ: 'UTC' }
}

/** One check that passes or fails as a whole; its output is shown when it fails. */
async function check(name, file, args) {
  const from = Date.now()
  const { code, output } = await run(process.execPath, [path.join(ROOT, file), ...args], { cwd: ROOT, env: testEnv() })
  count[code === 0 ? 'passed' : 'failed'] += 1
  if (code !== 0) say(output.trimEnd())
  say(`${name}: ${code === 0 ? 'passed' : 'failed'} (${seconds(from)})`)
}

/** Runs projects of vitest with their output as it comes, and counts their tests. */
async function suites(name, projects) {
  const from = Date.now()
  const report = path.join(OUTPUT, `${name}.json`)
  rmSync(report, { force: true })
  const args = [
    'run',
    ...projects.map((project) => `--project=${project}`),
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ]
  const code = await inherit(process.execPath, [path.join(ROOT, 'node_modules/vitest/vitest.mjs'), ...args])
  const { passed, failed } = readReport(report)
  count.passed += passed
  // an error outside of any test (a suite that does not load, a set-up that fails) counts as well
  count.failed += failed === 0 && code !== 0 ? 1 : failed
  say(`${name}: ${passed} passed, ${failed} failed (${seconds(from)})`)
}

/** A test that was skipped has not passed, so it counts as failed: nothing drops out of the sum unseen. */
function readReport(file) {
  if (!existsSync(file)) return { passed: 0, failed: 0 }
  const { testResults } = JSON.parse(readFileSync(file, 'utf8'))
  const tests = testResults.flatMap(({ assertionResults }) => assertionResults)
  const passed = tests.filter(({ status }) => status === 'passed').length
  const unloaded = testResults.filter(
    (one) => one.status === 'failed' && !one.assertionResults.some(({ status }) => status !== 'passed'),
  )
  return { passed, failed: tests.length - passed + unloaded.length }
}

let current = null
let stopped = false

function inherit(program, args) {
  return new Promise((resolve) => {
    current = spawn(program, args, { cwd: ROOT, env: testEnv(), stdio: ['ignore', 'inherit', 'inherit'] })
    current.once('error', () => resolve(127))
    current.once('exit', (code) => resolve(code ?? 1))
  })
}

async function install() {
  checkNode()
  for (const { what, programs, packages } of [MARIADB, BROWSER]) assertInstallable(what, programs, packages)
  await Promise.all([
    aloneInCheckout(() => installPackages('all', say)),
    // one after the other: apt works on one thing at a time
    installDebian(MARIADB.what, MARIADB.programs, MARIADB.packages, say).then(() =>
      installDebian(BROWSER.what, BROWSER.programs, BROWSER.packages, say),
    ),
  ])
}

async function test() {
  mkdirSync(OUTPUT, { recursive: true })
  const steps = [
    () =>
      Promise.all([
        check('lint', 'node_modules/eslint/bin/eslint.js', ['.']),
        check('format', 'node_modules/prettier/bin/prettier.cjs', ['--check', '.']).then(() =>
          check('types', 'node_modules/typescript/bin/tsc', ['--noEmit']),
        ),
      ]),
    () => suites('suites', ['core', 'api', 'ui', 'launch']),
    () => suites('browser', ['e2e']),
  ]
  for (const step of steps) if (!stopped) await step()
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    stopped = true
    current?.kill('SIGTERM')
  })
}

try {
  await install()
  await test()
} catch (error) {
  process.stderr.write(`${error instanceof Trouble ? error.message : error.stack}\n`)
  count.failed += 1
}
if (stopped) count.failed += 1
say(`${count.passed} passed, ${count.failed} failed`)
process.exitCode = count.failed === 0 ? 0 : 1
