import { createDatabase } from '@/db/client'
import { migrateJobs } from '@/db/jobs'
import { beat } from '../_shared/heartbeat'
import { every } from '../_shared/every'
import { listen } from '../_shared/listen'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { followSites } from '../wood/follow-sites'
import { evaluateAll } from './evaluate'

/** Often enough for a time told to the minute; what a person does is looked at at once. */
const intervalMs = 30_000

const config = readRunningConfig()
const logger = createLogger('notices', config.logLevel)
const db = createDatabase(config.databaseUrl, {
  name: 'notices',
  max: 3,
  onIdleError: (error) => logger.warn({ err: error }, 'database connection lost'),
})
await migrateJobs(config.databaseUrl)

const loop = every(
  { intervalMs, onError: (error) => logger.error({ err: error }, 'could not decide') },
  async () => {
    const told = await evaluateAll(db, new Date(), config.baseUrl, (site, error) =>
      logger.error({ err: error, site }, 'could not decide for a site'),
    )
    await beat(db, 'notices', new Date())
    if (told > 0) logger.info({ told }, 'notices made')
  },
)
/** The wood changes by the hour; late readings are looked for each minute. */
const followIntervalMs = 60_000
const follow = every(
  {
    intervalMs: followIntervalMs,
    onError: (error) => logger.error({ err: error }, 'could not follow the wood'),
  },
  async () => {
    const counts = await followSites(db, new Date(), (site, error) =>
      logger.error({ err: error, site }, 'could not follow the wood of a site'),
    )
    if (counts.rebuilt > 0) logger.info(counts, 'wood followed anew')
  },
)
const listener = listen(config.databaseUrl, {
  onMessage: ({ kind }) => {
    if (kind !== 'reading' && kind !== 'notice') loop.nudge()
  },
  onError: (error) => logger.warn({ err: error }, 'not listening; going by the clock alone'),
})
logger.info('ready')

onShutdown(
  async () => {
    await listener.stop()
    await loop.stop()
    await follow.stop()
    await db.destroy()
  },
  { logger },
)
