import type { IncomingMessage, ServerResponse } from 'node:http'
import { createServer } from 'node:https'
import type { AddressInfo } from 'node:net'
import type { TrapCertificate } from './certificate'

export interface PushRequest {
  /** The last part of the address: which phone it is for. */
  phone: string
  headers: IncomingMessage['headers']
  body: Buffer
}

export interface PushTrap {
  origin: string
  close(): Promise<void>
}

/** What push services take at most, with room for headers inside the body (RFC 8030 asks for 4,096 bytes). */
const mostBytes = 8_192

/**
 * A push service that shows nothing to anybody: each message goes to `keep`, which says how it is answered
 * (201 taken, 404 or 410 gone, 5xx not now).
 */
export async function startPushTrap(options: {
  port: number
  identity: TrapCertificate
  keep: (request: PushRequest) => Promise<number>
}): Promise<PushTrap> {
  const server = createServer(
    { key: options.identity.key, cert: options.identity.certificate },
    (request, response) => {
      answer(request, options.keep).then(
        (status) => end(response, status),
        () => end(response, 500),
      )
    },
  )
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(options.port, '127.0.0.1', resolve)
  })
  const { port } = server.address() as AddressInfo
  return {
    origin: `https://127.0.0.1:${port}`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve())
        server.closeAllConnections()
      }),
  }
}

function end(response: ServerResponse, status: number): void {
  response.writeHead(status).end()
}

async function answer(
  request: IncomingMessage,
  keep: (request: PushRequest) => Promise<number>,
): Promise<number> {
  if (request.method !== 'POST') return 405
  if (request.headers.authorization?.startsWith('vapid ') !== true) return 401
  const parts: Buffer[] = []
  let size = 0
  for await (const part of request) {
    const bytes = Buffer.from(part as Uint8Array)
    size += bytes.length
    if (size > mostBytes) return 413
    parts.push(bytes)
  }
  const phone = (request.url ?? '').split('/').at(-1) ?? ''
  return keep({ phone, headers: request.headers, body: Buffer.concat(parts) })
}
