/** Where the stand-ins listen: always on loopback, where the shop calls them, and on the shop's own address too, where its visitors come from. */
import { lookup } from 'node:dns/promises'
import { createServer, type RequestListener, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'

const LOOPBACK = '127.0.0.1'
const EVERYWHERE = new Set(['0.0.0.0', '::'])

const addressesOf = async (host: string) => {
  if (EVERYWHERE.has(host)) return [host]
  if (host === 'localhost') return [LOOPBACK]
  // Names are looked up first: one that stands for loopback would have it asked for twice.
  const { address } = await lookup(host)
  return [...new Set([LOOPBACK, address])]
}

/**
 * The name a browser can use for `host`.
 * @param publicUrl says it where the stand-in listens everywhere, which is no address
 */
export function reachableHost(host: string, publicUrl: string): string {
  if (EVERYWHERE.has(host)) return new URL(publicUrl).hostname
  return host.includes(':') ? `[${host}]` : host
}

/** @param port 0 takes a free one, the same on each address */
export async function listen(handler: RequestListener, host: string, port: number) {
  const servers: Server[] = []
  const close = async () => {
    await Promise.all(
      servers.map(
        (server) =>
          new Promise((resolve) => {
            server.close(resolve)
            server.closeAllConnections()
          }),
      ),
    )
  }
  let taken = port
  for (const address of await addressesOf(host)) {
    const server = createServer(handler)
    try {
      await new Promise<void>((resolve, reject) => {
        server.once('error', reject)
        server.listen(taken, address, resolve)
      })
    } catch (error) {
      await close()
      throw error
    }
    servers.push(server)
    taken = (server.address() as AddressInfo).port
  }
  return { port: taken, close }
}
