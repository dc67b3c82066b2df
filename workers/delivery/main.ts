import { Logger as JobLogger, run } from 'graphile-worker'
import { createTransport } from 'nodemailer'
import { createPool, databaseOn } from '@/db/client'
import { mailPersonTask, migrateJobs } from '@/db/jobs'
import { requeueWaitingMail } from '@/db/queries/deliveries'
import { doUpkeep } from '@/db/queries/upkeep'
import { beat } from '../_shared/heartbeat'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { mailPerson } from './mail-person'
import { personSchema } from './payload'

const config = readRunningConfig()
const logger = createLogger('delivery', config.logLevel)
const pool = createPool(config.databaseUrl, {
  name: 'delivery',
  max: 6,
  onIdleError: (error) => logger.warn({ err: error }, 'database connection lost'),
})
const db = databaseOn(pool)
const transport =
  config.smtpUrl === undefined
    ? undefined
    : createTransport({ url: config.smtpUrl, connectionTimeout: 5_000, socketTimeout: 10_000 })
if (transport === undefined) logger.warn('SMTP_URL is not set: notices stay on their page, no mail is sent')
const route = { transport, from: config.mailFrom, baseUrl: config.baseUrl }

await migrateJobs(config.databaseUrl)
const runner = await run({
  pgPool: pool,
  concurrency: 3,
  noHandleSignals: true,
  logger: new JobLogger(() => (level, message) => {
    if (level === 'error' || level === 'warning') logger.warn({ job: true }, message)
  }),
  taskList: {
    [mailPersonTask]: async (payload) => {
      const { userId } = personSchema.parse(payload)
      const sent = await mailPerson(db, route, userId, new Date())
      if (sent > 0) logger.info({ sent }, 'mail sent')
    },
    requeue_mail: async () => {
      await requeueWaitingMail(db, new Date())
      await beat(db, 'delivery', new Date())
    },
    upkeep: () => doUpkeep(db, new Date()),
  },
  // A long back-off must not outlast an outage by more than two minutes.
  crontab: ['*/2 * * * * requeue_mail', '17 * * * * upkeep ?fill=2h'].join('\n'),
})
await beat(db, 'delivery', new Date())
logger.info('ready')

onShutdown(
  async () => {
    await runner.stop()
    transport?.close()
    await db.destroy()
  },
  { logger },
)
