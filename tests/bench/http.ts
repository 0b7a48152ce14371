/**
 * POST /api/advice of the whole application against a bare Express that parses the same body and sends it back: CPU time per request of either
 * process, in turns within one run, so that the ratio means something on a shared machine. Both listen on loopback only; requests are counted.
 */
import { fork, type ChildProcess } from 'node:child_process'
import { Agent, request } from 'node:http'
import { testDatabase } from '../support/test-db.ts'
import { startTestServer } from '../support/mariadb-server.ts'
import { bundle } from './bundle.ts'
import { median, say } from './measure.ts'
import { riders } from './riders.ts'

const ROUNDS = 7
const REQUESTS = 600
const AT_ONCE = 8

export async function benchHttp(): Promise<void> {
  const server = await startTestServer()
  process.env.TEST_DATABASE_URL = server.url
  const database = await testDatabase({ seed: 'range' })
  const built = await bundle('http-server')
  const shop = await start(built, 'shop', database.url)
  const echo = await start(built, 'echo', '')
  const lean = await start(built, 'lean', '')
  try {
    const bodies = riders(200).map((answers) => JSON.stringify(answers))
    const replies = await Promise.all(bodies.map((body) => text(shop, body)))
    await load(shop, bodies, 2 * REQUESTS)
    await load(echo, bodies, 2 * REQUESTS)
    await load(lean, bodies, 2 * REQUESTS)
    await load(echo, replies, 2 * REQUESTS)
    const found: Record<Kind | 'alike', Figures[]> = { shop: [], echo: [], lean: [], alike: [] }
    for (let round = 0; round < ROUNDS; round += 1) {
      found.shop.push(await load(shop, bodies, REQUESTS))
      found.echo.push(await load(echo, bodies, REQUESTS))
      found.lean.push(await load(lean, bodies, REQUESTS))
      found.alike.push(await load(echo, replies, REQUESTS))
    }
    const cpu = (name: Kind | 'alike') => median(found[name].map(({ cpuMicros }) => cpuMicros))
    const wall = (name: Kind) => median(found[name].map(({ wallMicros }) => wallMicros))
    const size = median(found.shop.map(({ bytes }) => bytes))
    say(
      `POST /api/advice: CPU per request ${cpu('shop').toFixed(0)} µs, bare Express echo ${cpu('echo').toFixed(0)} µs, ratio ${(cpu('shop') / cpu('echo')).toFixed(2)} (goal 1.60); reply ${(size / 1024).toFixed(1)} kB`,
    )
    say(
      `  echo of a body as large as our reply: ${cpu('alike').toFixed(0)} µs, ratio ${(cpu('shop') / cpu('alike')).toFixed(2)}`,
    )
    say(
      `  bare Express with the same check and sums: ${cpu('lean').toFixed(0)} µs, ratio ${(cpu('shop') / cpu('lean')).toFixed(2)}`,
    )
    say(`  wall time per request with ${AT_ONCE} at once: ${wall('shop').toFixed(0)} and ${wall('echo').toFixed(0)} µs`)
  } finally {
    shop.child.disconnect()
    echo.child.disconnect()
    lean.child.disconnect()
    await database.close()
    await server.stop()
  }
}

type Kind = 'shop' | 'echo' | 'lean'

interface Running {
  child: ChildProcess
  port: number
  path: string
  agent: Agent
}
interface Figures {
  cpuMicros: number
  wallMicros: number
  bytes: number
}

function start(built: string, kind: Kind, databaseUrl: string): Promise<Running> {
  const child = fork(built, [kind], {
    execArgv: process.env.BENCH_PROFILE
      ? ['--cpu-prof', `--cpu-prof-dir=${process.env.BENCH_PROFILE}`, `--cpu-prof-name=${kind}`]
      : [],
    env: { ...process.env, DATABASE_URL: databaseUrl, NODE_ENV: 'production' },
  })
  return new Promise((resolve, reject) => {
    child.once('exit', (code) => {
      reject(new Error(`${kind} ended with ${code}`))
    })
    child.once('message', (message) => {
      const { port } = message as { port: number }
      resolve({ child, port, path: '/api/advice', agent: new Agent({ keepAlive: true, maxSockets: AT_ONCE }) })
    })
  })
}

const cpuOf = ({ child }: Running) =>
  new Promise<number>((resolve) => {
    child.once('message', (message) => {
      resolve((message as { cpuMicros: number }).cpuMicros)
    })
    child.send('cpu')
  })

async function load(target: Running, bodies: readonly string[], count: number): Promise<Figures> {
  const before = await cpuOf(target)
  const began = performance.now()
  let [sent, bytes] = [0, 0]
  const worker = async () => {
    while (sent < count) {
      const body = bodies[sent % bodies.length] ?? ''
      sent += 1
      const size = await post(target, body)
      bytes += size
    }
  }
  await Promise.all(Array.from({ length: AT_ONCE }, worker))
  const wallMicros = ((performance.now() - began) * 1000) / count
  return { cpuMicros: ((await cpuOf(target)) - before) / count, wallMicros, bytes: bytes / count }
}

const post = async (target: Running, body: string) => Buffer.byteLength(await text(target, body))

function text({ port, path, agent }: Running, body: string): Promise<string> {
  return new Promise((resolve, reject) => {
    const headers = { 'content-type': 'application/json', 'content-length': Buffer.byteLength(body) }
    const sent = request({ host: '127.0.0.1', port, path, method: 'POST', agent, headers }, (reply) => {
      const parts: Buffer[] = []
      reply.on('data', (part: Buffer) => parts.push(part))
      reply.on('end', () => {
        if (reply.statusCode === 200) resolve(Buffer.concat(parts).toString())
        else reject(new Error(`status ${reply.statusCode}`))
      })
    })
    sent.on('error', reject)
    sent.end(body)
  })
}
