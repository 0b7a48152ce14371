/** `npm run -s core -- <name>`: one JSON object on stdin, one on stdout. Without a name it lists what there is. */
import { text } from 'node:stream/consumers'
import { answer } from './sums.ts'

const name = process.argv[2]
const { out, error, code } = answer(name, name === undefined ? '' : await text(process.stdin))
process.stdout.write(out)
process.stderr.write(error)
process.exitCode = code
