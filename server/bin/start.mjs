/**
 * `npm start`: installs what is missing, starts MariaDB, migrates, seeds once, builds, starts the shop and its local stand-ins.
 * Plain Node without any package, because it runs before there are any. Every step has a file in launch/.
 * Ends with code 0 after a signal and 1 after anything else; whatever it started is stopped in reverse order.
 */
import path from 'node:path'
import { build, entryFile } from './launch/build.mjs'
import { lastLines, startChild, stopLeftChildren, waitForPort, waitForReady } from './launch/children.mjs'
import { openDataDir, secretSettings } from './launch/data-dir.mjs'
import { prepareDatabase } from './launch/database.mjs'
import { shopEnv, standInsEnv } from './launch/environment.mjs'
import { MARIADB, assertInstallable, cleanEnv, installDebian, installPackages } from './launch/install.mjs'
import { aloneInCheckout } from './launch/lock.mjs'
import { assertFree } from './launch/ports.mjs'
import { run, stopTools } from './launch/processes.mjs'
import { ROOT, bracketed, checkNode, readSettings } from './launch/settings.mjs'
import { Trouble, tail } from './launch/trouble.mjs'

const say = (line) => process.stdout.write(`${line}\n`)
const near = (folder) => path.relative(ROOT, folder) || folder

/** What was started, in order: each { name, stop, ended }. */
const started = []
let stopping = null

/** Stops everything, newest first, and ends. Only the first call counts: npm passes a Ctrl-C on a second time. */
function finish(code) {
  stopping ??= (async () => {
    await stopTools(8_000)
    while (started.length > 0) await started.pop().stop()
    process.exit(code)
  })()
  return stopping
}

function keep(one) {
  started.push(one)
  void one.ended.then((how) => {
    if (stopping || !one.watched) return
    process.stderr.write(`${one.name} ${how}, so everything is stopped. The end of its log:\n${lastLines(one)}\n`)
    void finish(1)
  })
  return one
}

async function start() {
  checkNode()
  const settings = readSettings(process.env)
  const { host, port, ports, standIns, payments, dataDir, buildDir } = settings
  const ownDatabase = settings.databaseUrl === null
  // everything that can be refused is refused before anything is made
  if (ownDatabase) {
    assertInstallable(
      MARIADB.what,
      MARIADB.programs,
      MARIADB.packages,
      ', or set DATABASE_URL to a MariaDB that is there',
    )
  }
  openDataDir(dataDir)
  await stopLeftChildren(dataDir)
  await assertFree(ports)

  const database = ownDatabase
    ? installDebian(MARIADB.what, MARIADB.programs, MARIADB.packages, say).then(() => openDatabase(settings))
    : Promise.resolve({ shopUrl: settings.databaseUrl, migrateUrl: settings.migrateUrl })
  const built = aloneInCheckout(async () => {
    await installPackages('runtime', say)
    await build(buildDir, say)
  })
  const [{ shopUrl, migrateUrl }] = await Promise.all([database, built])
  if (stopping) return

  await migrate(entryFile(buildDir, 'migrate'), migrateUrl, ownDatabase)
  if (stopping) return

  const env = shopEnv(settings, shopUrl, secretSettings(dataDir, payments, process.env), process.env)
  const startOne = (name, logName, entry, ownEnv) =>
    keep(startChild(name, logName, entryFile(buildDir, entry), { dataDir, env: ownEnv }))
  const others = Object.values(standIns)
  const fakes =
    others.length > 0 ? startOne('The process of the stand-ins', 'stand-ins', 'fakes', standInsEnv(env)) : null
  const shop = startOne('The shop', 'shop', 'index', env)
  for (const one of others) await waitForPort(fakes, one.host, one.port)
  await waitForReady(shop, host, port)
  if (stopping) return
  for (const one of started) {
    one.watched = true
    if (one.hasEnded()) throw new Trouble(`${one.name} ${await one.ended}: see ${one.log}.`)
  }

  if (standIns.STRIPE_FAKE_PORT) say(`  payments (stand-in)  http://127.0.0.1:${standIns.STRIPE_FAKE_PORT.port}`)
  if (standIns.MAIL_SINK_PORT) say(`  mails to read        http://127.0.0.1:${standIns.MAIL_SINK_PORT.port}`)
  say(`  data and logs        ${near(dataDir)}`)
  say(`Felloe is ready at http://${bracketed(host)}:${port}`)
}

async function openDatabase({ dataDir, ports }) {
  if (stopping) return {}
  const taken = ports.map((one) => one.port)
  const startServer = await prepareDatabase(dataDir, taken, say)
  if (stopping) return {}
  const database = startServer()
  const { ended, hasEnded } = database.process
  keep({ name: 'MariaDB', log: path.join(dataDir, 'mariadb/error.log'), ended, hasEnded, stop: () => database.stop() })
  await database.ready()
  return database
}

async function migrate(file, url, ownDatabase) {
  const { code, output } = await run(process.execPath, [file, 'seed'], {
    cwd: ROOT,
    env: { ...cleanEnv(process.env), TZ: 'UTC', DATABASE_URL: url },
  })
  if (code === 0 || stopping) return
  const where = ownDatabase ? 'the database' : 'the database that DATABASE_URL names'
  throw new Trouble(`The tables could not be brought up to date in ${where}: the reason is below.\n${tail(output)}`)
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void finish(0))
// a reader that went away (npm start | head) is no reason to leave processes behind
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {})

try {
  await start()
} catch (error) {
  if (stopping) await stopping
  process.stderr.write(`${error instanceof Trouble ? error.message : error.stack}\n`)
  await finish(1)
}
