import { createDatabase } from '@/db/client'
import { migrateJobs } from '@/db/jobs'
import { beat } from '../_shared/heartbeat'
import { every } from '../_shared/every'
import { listen } from '../_shared/listen'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
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
    await db.destroy()
  },
  { logger },
)
