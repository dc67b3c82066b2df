import { randomInt } from 'node:crypto'
import { connect, createServer } from 'node:net'

/** Whether a program could listen there now. */
export function isPortFree(host: string, port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const server = createServer()
    server.once('error', () => resolve(false))
    server.listen({ host, port, exclusive: true }, () => server.close(() => resolve(true)))
  })
}

/**
 * Below the range from which the system takes ports for outgoing connections (32768 on, by Linux's default): a port of
 * that range that is free now may be a stranger's before our program listens on it.
 */
const firstPort = 20_000
const lastPort = 32_767

/** A port of this machine alone that is free now. */
export async function freePort(): Promise<number> {
  for (let tries = 0; tries < 200; tries += 1) {
    const port = randomInt(firstPort, lastPort + 1)
    if (await isPortFree('127.0.0.1', port)) return port
  }
  throw new Error(`No free port between ${firstPort} and ${lastPort}.`)
}

/** Whether a program answers there. */
export function portAnswers(host: string, port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = connect({ host, port })
    const end = (answer: boolean) => {
      socket.destroy()
      resolve(answer)
    }
    socket.setTimeout(1_000, () => end(false))
    socket.once('connect', () => end(true))
    socket.once('error', () => end(false))
  })
}

/** Where a local program reaches one that listens on `host`. */
export const reachable = (host: string): string =>
  host === '0.0.0.0' || host === '::' || host === '' ? '127.0.0.1' : host
