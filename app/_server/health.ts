import 'server-only'
import { setTimeout as delay } from 'node:timers/promises'
import { readHealthFacts, type HealthFacts } from '@/db/queries/health'
import packageJson from '@/package.json'
import { database } from './database'

export interface Health {
  status: 'ok' | 'degraded'
  database: 'ok' | 'away'
  /** Unknown while the database is away: the broker says there that it is alive. */
  broker: 'ok' | 'away' | 'unknown'
  newestReadingAgeS: number | null
  version: string
}

/** Whoever asks for health wants an answer soon, and an answer that takes this long is no good news. */
const patienceMs = 3_000
/** The broker says every 15 s that it is alive; three missed ones are no accident. */
const brokerSilentMs = 60_000

export async function health(now: Date): Promise<Health> {
  const facts = await readSoon()
  if (facts === undefined) {
    return { status: 'degraded', database: 'away', broker: 'unknown', newestReadingAgeS: null, version }
  }
  const beat = facts.brokerBeatAt
  const broker = beat !== null && now.getTime() - beat.getTime() < brokerSilentMs ? 'ok' : 'away'
  const newest = facts.newestReadingAt
  return {
    status: broker === 'ok' ? 'ok' : 'degraded',
    database: 'ok',
    broker,
    newestReadingAgeS:
      newest === null ? null : Math.max(0, Math.round((now.getTime() - newest.getTime()) / 1000)),
    version,
  }
}

const { version } = packageJson

/** An outage is what this is asked for, so here it is an answer and not an error. */
async function readSoon(): Promise<HealthFacts | undefined> {
  const given = new AbortController()
  const read = readHealthFacts(database()).catch(() => undefined)
  const late = delay(patienceMs, undefined, { signal: given.signal }).catch(() => undefined)
  const facts = await Promise.race([read, late])
  given.abort()
  return facts
}
