/** What `npm run solve-wheels` found, read as data; tests hold it to a fresh solution. */
import found from './solved-wheels.json' with { type: 'json' }
import type { SolvedSeeds } from './solve-seeds.ts'

export const solvedWheels = found as unknown as SolvedSeeds
