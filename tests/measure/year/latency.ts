import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { setTimeout as delay } from 'node:timers/promises'
import mqtt from 'mqtt'
import { createDatabase } from '@/db/client'
import { migrateToLatest } from '@/db/migrate'
import { createLogger } from '@/workers/_shared/logger'
import { listen } from '@/workers/_shared/listen'
import { startBroker } from '@/workers/broker/broker'
import { createMissingDatabase } from '@/workers/supervisor/cluster'
import { startTestCluster } from '../../support/cluster'
import { cleanEnvironment } from '../../support/env'
import { eventually } from '../../support/eventually'
import { databaseUrlOf } from '../../support/template'
import { seedWaitingSite, type WaitingSite } from './latency-site'

const SITES = 50
const DEADLINE_MS = 60_000
const DATABASE = 'lidfast_measure'
/** Readings come when they come, not in step with the worker's turns. */
const PAUSE_MOST_MS = 1_500

/**
 * From a reading sent over MQTT to the row of the notice that it leads to, committed: a real PostgreSQL, the real broker
 * and the real notices' worker as a process of its own, many sites that are all decided for in turn.
 * @returns milliseconds, one for each site, in order of size; Infinity for one that was not told within a minute
 */
export async function readingToNoticeMs(): Promise<number[]> {
  const cluster = await startTestCluster()
  const url = databaseUrlOf(cluster.adminUrl, DATABASE)
  try {
    await createMissingDatabase(cluster.adminUrl, DATABASE)
    await migrateToLatest(url)
    return await measured(url)
  } finally {
    await cluster.stop()
  }
}

async function measured(url: string): Promise<number[]> {
  const db = createDatabase(url, { name: 'measure' })
  const broker = await startBroker({
    db,
    logger: createLogger('measure', 'silent'),
    host: '127.0.0.1',
    port: 0,
  })
  const sites: WaitingSite[] = []
  for (let n = 0; n < SITES; n += 1) sites.push(await seedWaitingSite(db, new Date()))
  const told = new Map<number, number>()
  const ear = listen(url, {
    onMessage: ({ kind, site }) => {
      if (kind === 'notice') told.set(site, performance.now())
    },
    onError: (error) => {
      throw error
    },
  })
  const worker = spawn(process.execPath, ['--import', 'tsx', 'workers/notices/main.ts'], {
    env: {
      ...cleanEnvironment(),
      NODE_ENV: 'production',
      DATABASE_URL: url,
      AUTH_SECRET: 'a secret of the measure, long enough for anyone',
      LOG_LEVEL: 'warn',
    },
    stdio: ['ignore', 'inherit', 'inherit'],
  })
  try {
    await eventually('the worker to have decided once', () => hasBeaten(db), DEADLINE_MS)
    const taken: number[] = []
    for (const site of sites) {
      await delay(PAUSE_MOST_MS * Math.random())
      taken.push(await tellingMs(site, broker.port, told))
    }
    return taken.sort((one, other) => one - other)
  } finally {
    const ended = once(worker, 'exit')
    worker.kill('SIGTERM')
    await ended
    await ear.stop()
    await broker.stop()
    await db.destroy()
  }
}

async function hasBeaten(db: ReturnType<typeof createDatabase>): Promise<boolean> {
  const row = await db.selectFrom('heartbeat').where('part', '=', 'notices').select('part').executeTakeFirst()
  return row !== undefined
}

async function tellingMs(
  { siteId, sensor }: WaitingSite,
  port: number,
  told: Map<number, number>,
): Promise<number> {
  const client = await mqtt.connectAsync(`mqtt://127.0.0.1:${String(port)}`, {
    username: sensor.name,
    password: sensor.secret,
    clientId: sensor.name,
  })
  told.delete(siteId)
  const sentAt = performance.now()
  await client.publishAsync(
    sensor.topic,
    JSON.stringify({ at: new Date().toISOString(), temperatureC: 8, humidityPct: 88 }),
    { qos: 1 },
  )
  try {
    return (
      (await eventually('the notice', () => told.get(siteId), DEADLINE_MS).catch(() => Infinity)) - sentAt
    )
  } finally {
    await client.endAsync()
  }
}
