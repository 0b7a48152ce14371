/** `npm run solve-wheels`: puts the reference builds and the demo range through the structural model and writes server/seeds/solved-wheels.json. */
import { writeFileSync } from 'node:fs'
import { solveSeeds } from '../seeds/solve-seeds.ts'

const found = solveSeeds()
writeFileSync(new URL('../seeds/solved-wheels.json', import.meta.url), `${JSON.stringify(found)}\n`)
process.stdout.write(
  `${Object.keys(found.designs).length} designs and ${Object.values(found.reference).flatMap(({ front, rear }) => [...front, ...rear]).length} reference wheels solved\n`,
)
