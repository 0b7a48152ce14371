/** Builds the client (vite) and the server (esbuild) when their sources have changed since the last build. */
import { createHash } from 'node:crypto'
import { existsSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { cleanEnv } from './install.mjs'
import { run } from './processes.mjs'
import { ROOT } from './settings.mjs'
import { Trouble, tail } from './trouble.mjs'

const SOURCES = [
  'src',
  'server',
  'locales',
  'index.html',
  'vite.config.ts',
  'tailwind.config.ts',
  'tsconfig.json',
  'package-lock.json',
]
const STAMP = '.source-sha256'

/** Built entries: name in dist/server, and the source it starts from. */
const ENTRIES = { index: 'server/index.ts', fakes: 'server/fakes/index.ts', migrate: 'server/bin/migrate.ts' }

export const entryFile = (buildDir, name) => path.join(buildDir, 'server', `${name}.mjs`)

/** SHA-256 over names and contents of everything that goes into the build. */
export function sourceHash() {
  const hash = createHash('sha256').update(process.versions.node.split('.')[0])
  const add = (name) => {
    const file = path.join(ROOT, name)
    if (!existsSync(file)) return
    hash.update(`\0${name}\0`)
    hash.update(readFileSync(file))
  }
  for (const source of SOURCES) {
    if (path.extname(source)) add(source)
    else for (const name of filesBelow(source)) add(name)
  }
  return hash.digest('hex')
}

function filesBelow(folder) {
  if (!existsSync(path.join(ROOT, folder))) return []
  return readdirSync(path.join(ROOT, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && !entry.name.endsWith('.mjs'))
    .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name)))
    .sort()
}

/**
 * Both are built beside and moved into place together, so that a build that fails leaves the last good one.
 * @returns true when something was built
 * @throws Trouble with what the builder said
 */
export async function build(buildDir, say) {
  const hash = sourceHash()
  const stamp = path.join(buildDir, STAMP)
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return false
  say('Building …')
  const draft = path.join(buildDir, '.new')
  rmSync(draft, { recursive: true, force: true })
  // vite takes NODE_ENV for the kind of React to ship
  const env = { ...cleanEnv(), NODE_ENV: 'production' }
  const results = await Promise.all([
    run(
      process.execPath,
      [
        'node_modules/vite/bin/vite.js',
        'build',
        // the usual loader writes into node_modules, which may belong to another user
        '--configLoader=runner',
        '--outDir',
        path.join(draft, 'client'),
        '--emptyOutDir',
      ],
      {
        cwd: ROOT,
        env,
      },
    ),
    // a native program, or a script with a #! line where install scripts are off: started directly it is right in both cases
    run(path.join(ROOT, 'node_modules/esbuild/bin/esbuild'), serverFlags(draft), { cwd: ROOT, env }),
  ])
  const failed = results.find(({ code }) => code !== 0)
  if (failed) {
    rmSync(draft, { recursive: true, force: true })
    throw new Trouble(`The build failed, so nothing was started: the reason is below.\n${tail(failed.output, 30)}`)
  }
  // without the stamp what is there counts as unfinished, should the machine stop between the two
  rmSync(stamp, { force: true })
  for (const part of ['client', 'server']) {
    rmSync(path.join(buildDir, part), { recursive: true, force: true })
    renameSync(path.join(draft, part), path.join(buildDir, part))
  }
  rmSync(draft, { recursive: true })
  writeFileSync(stamp, hash)
  return true
}

/** Packages stay outside (sequelize loads its drivers by name); `#contract/…` and `#core/…` are ours and go in. */
const serverFlags = (out) => [
  ...Object.entries(ENTRIES).map(([name, source]) => `${name}=${source}`),
  '--bundle',
  '--platform=node',
  '--target=node20',
  '--format=esm',
  '--packages=external',
  '--sourcemap',
  `--outdir=${path.join(out, 'server')}`,
  '--out-extension:.js=.mjs',
  '--log-level=warning',
]
