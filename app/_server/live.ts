import 'server-only'
import { findSiteMember, type SiteMember } from '@/db/queries/members'
import type { Role } from '@/lib/sites/permissions'
import type { LiveEvent } from '@/lib/sites/live'
import { database } from './database'
import { liveHub } from './live-hub'
import { log } from './log'
import { findSession } from './session'

/** Long enough not to bother anybody, short enough for proxies that cut what is quiet for 30 s. */
const beatMs = 15_000

/** What an onlooker may hear: that something changed, and neither when a room was read nor when a piece went out. */
const onlookersHear = new Set<LiveEvent['kind']>(['site', 'room', 'piece'])

export function heardBy(role: Role, event: LiveEvent): LiveEvent | undefined {
  if (role !== 'onlooker') return event
  return onlookersHear.has(event.kind) ? { kind: event.kind, id: null } : undefined
}

/**
 * A stream of what changes at a site, for as long as the page is open and the member belongs there. Session, membership
 * and role are asked for again at each beat.
 */
export function liveStream(request: Request, member: SiteMember): Response {
  const encoder = new TextEncoder()
  let stop = (): void => undefined
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      let { role } = member
      const send = (text: string): void => {
        try {
          controller.enqueue(encoder.encode(text))
        } catch (error) {
          // The page has gone and the stream with it.
          log().debug({ err: error }, 'a live stream was gone')
          stop()
        }
      }
      const tell = (event: LiveEvent): void => {
        const heard = heardBy(role, event)
        if (heard !== undefined) send(`event: change\ndata: ${JSON.stringify(heard)}\n\n`)
      }
      const beat = setInterval(() => {
        stillThere(request.headers, member).then(
          (now) => {
            if (now === undefined) return stop()
            role = now.role
            send(': here\n\n')
          },
          // With the database away nobody can say; the page keeps its stream and asks again at the next beat.
          (error: unknown) => {
            log().warn({ err: error }, 'a live stream could not be checked')
            send(': here\n\n')
          },
        )
      }, beatMs)
      const leave = liveHub().subscribe(member.siteId, tell, () => stop())
      stop = () => {
        stop = () => undefined
        clearInterval(beat)
        leave()
        try {
          controller.close()
        } catch (error) {
          log().debug({ err: error }, 'a live stream was closed already')
        }
      }
      if (request.signal.aborted) return stop()
      request.signal.addEventListener('abort', () => stop())
      send('retry: 3000\n: here\n\n')
    },
    cancel() {
      stop()
    },
  })
  return new Response(body, {
    headers: {
      'content-type': 'text/event-stream; charset=utf-8',
      'cache-control': 'no-store, no-transform',
      'x-accel-buffering': 'no',
    },
  })
}

async function stillThere(headers: Headers, member: SiteMember): Promise<SiteMember | undefined> {
  const session = await findSession(headers, false)
  if (session?.user.id !== member.userId) return undefined
  return findSiteMember(database(), member.siteCode, member.userId)
}
