/** Builds a part as the shop is built for use (no loader of the sources, whose helpers cost half as much again) and says where it lies. */
import path from 'node:path'
import { build } from 'esbuild'

export async function bundle(name: 'core' | 'http-server'): Promise<string> {
  const outfile = path.resolve(import.meta.dirname, `../../test-output/bench/${name}.mjs`)
  await build({
    entryPoints: [path.join(import.meta.dirname, `${name}.ts`)],
    outfile,
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    logLevel: 'warning',
  })
  return outfile
}
