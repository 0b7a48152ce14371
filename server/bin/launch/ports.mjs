/** Which ports are free, and what to say about one that is not. */
import net from 'node:net'
import { Trouble } from './trouble.mjs'

/** @returns the error code of listening there, or null when it would work */
export function portProblem(host, port) {
  return new Promise((resolve) => {
    const probe = net.createServer()
    probe.once('error', (error) => resolve(error.code ?? 'UNKNOWN'))
    probe.listen({ host, port, exclusive: true }, () => probe.close(() => resolve(null)))
  })
}

/** @throws Trouble naming the port, what it is for, and the setting that moves it */
export async function assertFree(ports) {
  for (const { what, setting, host, port } of ports) {
    const problem = await portProblem(host, port)
    if (problem === null) continue
    if (problem === 'EADDRINUSE') {
      throw new Trouble(
        `Port ${port} on ${host} is in use, and ${what} needs it: free it, or set ${setting} to another port.`,
      )
    }
    if (problem === 'EACCES') {
      throw new Trouble(
        `Port ${port} is reserved for the administrator, and ${what} needs it: set ${setting} to another port.`,
      )
    }
    throw new Trouble(`HOST ${host} cannot be listened on (${problem}): set HOST to an address of this machine.`)
  }
}

/** A port on loopback that nobody holds at this moment and that is not among `taken`. */
export async function freePort(taken = []) {
  for (;;) {
    const port = await new Promise((resolve, reject) => {
      const probe = net.createServer()
      probe.once('error', reject)
      probe.listen(0, '127.0.0.1', () => {
        const { port } = probe.address()
        probe.close(() => resolve(port))
      })
    })
    if (!taken.includes(port)) return port
  }
}

/** True when something accepts connections there. */
export function answers(host, port) {
  return new Promise((resolve) => {
    const socket = net.connect(port, host)
    const finish = (answer) => {
      socket.destroy()
      resolve(answer)
    }
    socket.setTimeout(1_000, () => finish(false))
    socket.once('error', () => finish(false))
    socket.once('connect', () => finish(true))
  })
}

/** True once a MariaDB server sends its greeting there: protocol 10 in the fifth byte. Its init file has run by then. */
export function greets(port) {
  return new Promise((resolve) => {
    const socket = net.connect(port, '127.0.0.1')
    const finish = (answer) => {
      socket.destroy()
      resolve(answer)
    }
    socket.setTimeout(1_000, () => finish(false))
    socket.once('error', () => finish(false))
    socket.once('close', () => resolve(false))
    socket.once('data', (bytes) => finish(bytes[4] === 10))
  })
}
