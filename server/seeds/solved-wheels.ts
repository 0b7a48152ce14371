/** What `npm run solve-wheels` found, read as data; tests hold it to a fresh solution. */
import { readFileSync } from 'node:fs'
import type { SolvedSeeds } from './solve-seeds.ts'

export const solvedWheels = JSON.parse(
  readFileSync(new URL('solved-wheels.json', import.meta.url), 'utf8'),
) as SolvedSeeds
