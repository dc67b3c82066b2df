import { createDatabase } from '@/db/client'
import { migrateJobs } from '@/db/jobs'
import { beat } from '../_shared/heartbeat'
import { every } from '../_shared/every'
import { listen } from '../_shared/listen'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { forecastTurn } from '../forecast/forecast-sites'
import { followSites } from '../wood/follow-sites'
import { evaluateAll } from './evaluate'
import { evaluateHeard } from './evaluate-heard'
import type { CostlyFacts } from './surroundings'
import { makeRepeats } from './make-repeats'

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

/** Sites that have not been looked at yet can wait for the next start. */
let stopping = false
/** Means of days and the readiness of blanks are worked out once an hour. */
const costly: CostlyFacts = new Map()
const loop = every(
  { intervalMs, onError: (error) => logger.error({ err: error }, 'could not decide') },
  async () => {
    const told = await evaluateAll(
      db,
      new Date(),
      config.baseUrl,
      (site, error) => logger.error({ err: error, site }, 'could not decide for a site'),
      costly,
      () => stopping,
    )
    await beat(db, 'notices', new Date())
    if (told > 0) logger.info({ told }, 'notices made')
  },
)
/** Sites whose air was read: looked at within the second, so that a reading is told of while it is news. */
const heard = new Set<number>()
const heardIntervalMs = 1_000
const afterReadings = every(
  {
    intervalMs: heardIntervalMs,
    onError: (error) => logger.error({ err: error }, 'could not decide after readings'),
  },
  async () => {
    const told = await evaluateHeard(
      db,
      heard,
      new Date(),
      config.baseUrl,
      (site, error) => logger.error({ err: error, site }, 'could not decide for a site'),
      costly,
    )
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
/** Once an hour for each site; asked each minute whether it is time. */
const forecasts = forecastTurn(db)
const forecast = every(
  {
    intervalMs: followIntervalMs,
    onError: (error) => logger.error({ err: error }, 'could not forecast'),
  },
  async () => {
    const counts = await forecasts.run(new Date(), (site, error) =>
      logger.error({ err: error, site }, 'could not forecast for a site'),
    )
    if (counts.made > 0) logger.info(counts, 'forecasts made')
  },
)
/** A week ahead, so a minute is soon enough; whoever makes a plan has its carries made at once. */
const repeatIntervalMs = 60_000
const repeats = every(
  {
    intervalMs: repeatIntervalMs,
    onError: (error) => logger.error({ err: error }, 'could not make the carries of repeats'),
  },
  async () => {
    const made = await makeRepeats(db, new Date(), (site, error) =>
      logger.error({ err: error, site }, 'could not make the carries of a site'),
    )
    if (made > 0) logger.info({ made }, 'carries of repeats made')
  },
)
const listener = listen(config.databaseUrl, {
  onMessage: ({ kind, site }) => {
    if (kind === 'reading') heard.add(site)
    else if (kind !== 'notice') loop.nudge()
  },
  onError: (error) => logger.warn({ err: error }, 'not listening; going by the clock alone'),
})
logger.info('ready')

onShutdown(
  async () => {
    stopping = true
    await listener.stop()
    await Promise.all([loop, afterReadings, follow, repeats, forecast].map((one) => one.stop()))
    await db.destroy()
  },
  { logger },
)
