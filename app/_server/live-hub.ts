import 'server-only'
import { Client } from 'pg'
import { liveChannel, type LiveEvent, liveMessageSchema } from '@/lib/sites/live'
import { serverConfig } from './env'
import { log } from './log'

type Listener = (event: LiveEvent) => void

interface Hub {
  subscribe: (siteId: number, listener: Listener, onEnd: () => void) => () => void
}

const retryMsMin = 500
const retryMsMax = 15_000

/**
 * The one connection of this process that listens to the database, and the pages that want to hear of it. It is opened
 * with the first page and closed with the last. After a break it says "site" to everyone, so that each fetches anew what
 * it may have missed.
 */
function createHub(): Hub {
  const pages = new Map<Listener, { siteId: number; onEnd: () => void }>()
  let client: Client | undefined
  let retryMs = retryMsMin
  let wasCut = false
  let isEnding = false

  const tell = (siteId: number | undefined, event: LiveEvent): void => {
    for (const [listener, page] of pages) if (siteId === undefined || page.siteId === siteId) listener(event)
  }

  const open = (): void => {
    const own = new Client({
      connectionString: serverConfig().databaseUrl,
      application_name: 'lidfast live',
      keepAlive: true,
    })
    client = own
    own.on('notification', (notification) => hear(notification.payload))
    own.on('error', (error) => lost(own, error))
    own.on('end', () => lost(own))
    own
      .connect()
      .then(() => own.query(`listen ${liveChannel}`))
      .then(() => {
        retryMs = retryMsMin
        if (wasCut) tell(undefined, { kind: 'site', id: null })
        wasCut = false
      })
      .catch((error: unknown) => lost(own, error))
  }

  const hear = (payload: string | undefined): void => {
    const message = liveMessageSchema.safeParse(jsonOf(payload ?? ''))
    if (!message.success) return
    tell(message.data.site, { kind: message.data.kind, id: message.data.id })
  }

  const lost = (own: Client, error?: unknown): void => {
    // An error and the end of the same connection are one loss.
    if (client !== own) return
    client = undefined
    endQuietly(own)
    if (pages.size === 0 || isEnding) return
    wasCut = true
    log().warn({ err: error }, 'the live connection to the database was lost')
    setTimeout(() => {
      if (client === undefined && pages.size > 0 && !isEnding) open()
    }, retryMs).unref()
    retryMs = Math.min(retryMsMax, retryMs * 2)
  }

  const closeWhenIdle = (): void => {
    if (pages.size > 0) return
    const idle = client
    client = undefined
    if (idle !== undefined) endQuietly(idle)
  }

  // An open stream would keep the server from ending. Registered with the first page and never at import, where a build
  // would run it too.
  const endAll = (): void => {
    isEnding = true
    for (const page of [...pages.values()]) page.onEnd()
  }
  process.once('SIGTERM', endAll)
  process.once('SIGINT', endAll)

  return {
    subscribe(siteId, listener, onEnd) {
      pages.set(listener, { siteId, onEnd })
      if (client === undefined && !isEnding) open()
      return () => {
        pages.delete(listener)
        closeWhenIdle()
      }
    },
  }
}

function endQuietly(client: Client): void {
  client.end().catch((error: unknown) => log().debug({ err: error }, 'the live connection did not end well'))
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch (error) {
    if (error instanceof SyntaxError) return undefined
    throw error
  }
}

const kept = globalThis as typeof globalThis & { lidfastLive?: Hub }

export function liveHub(): Hub {
  kept.lidfastLive ??= createHub()
  return kept.lidfastLive
}
