import { connect, createServer } from 'node:net'

/** Whether a program could listen there now. */
export function isPortFree(host: string, port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const server = createServer()
    server.once('error', () => resolve(false))
    server.listen({ host, port, exclusive: true }, () => server.close(() => resolve(true)))
  })
}

/** A port of this machine alone that is free now. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen({ host: '127.0.0.1', port: 0 }, () => {
      const address = server.address()
      server.close(() =>
        typeof address === 'object' && address !== null
          ? resolve(address.port)
          : reject(new Error('The system gave no port.')),
      )
    })
  })
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
