import { Logger as JobLogger, run } from 'graphile-worker'
import { createTransport } from 'nodemailer'
import { createPool, databaseOn } from '@/db/client'
import { migrateJobs, personTasks } from '@/db/jobs'
import { requeueWaiting } from '@/db/queries/deliveries'
import { doUpkeep } from '@/db/queries/upkeep'
import { beat } from '../_shared/heartbeat'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { readTrapCertificate } from '../push-trap/certificate-file'
import { mailPerson } from './mail-person'
import { personSchema } from './payload'
import { pushPerson } from './push-person'
import { createPushService } from './push-service'

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
const links = { authSecret: config.authSecret, baseUrl: config.baseUrl }
const mailRoute = { ...links, transport, from: config.mailFrom }

const { vapid, pushTrapPort } = config
if (vapid === undefined) logger.warn('VAPID keys are not set: nothing goes to phones')
const trap =
  pushTrapPort === undefined
    ? undefined
    : {
        origin: `https://127.0.0.1:${pushTrapPort}`,
        certificate: await readTrapCertificate(config.dataDir),
      }
const service =
  vapid === undefined ? undefined : createPushService({ vapid, trap, contact: contactOf(config.mailFrom) })
const pushRoute = { ...links, service }

await migrateJobs(config.databaseUrl)
const runner = await run({
  pgPool: pool,
  concurrency: 3,
  noHandleSignals: true,
  logger: new JobLogger(() => (level, message) => {
    if (level === 'error' || level === 'warning') logger.warn({ job: true }, message)
  }),
  taskList: {
    [personTasks.mail]: async (payload) => {
      const { userId } = personSchema.parse(payload)
      const sent = await mailPerson(db, mailRoute, userId, new Date())
      if (sent > 0) logger.info({ sent }, 'mail sent')
    },
    [personTasks.push]: async (payload) => {
      const { userId } = personSchema.parse(payload)
      const sent = await pushPerson(db, pushRoute, userId, new Date())
      if (sent > 0) logger.info({ sent }, 'shown on phones')
    },
    requeue: async () => {
      await requeueWaiting(db, new Date())
      await beat(db, 'delivery', new Date())
    },
    upkeep: () => doUpkeep(db, new Date()),
  },
  // A long back-off must not outlast an outage by more than two minutes.
  crontab: ['*/2 * * * * requeue', '17 * * * * upkeep ?fill=2h'].join('\n'),
})
await beat(db, 'delivery', new Date())
logger.info('ready')

onShutdown(
  async () => {
    await runner.stop()
    transport?.close()
    service?.close()
    await db.destroy()
  },
  { logger },
)

/** Whom a push service may write to: the address that mails come from, without its name. */
function contactOf(mailFrom: string): string {
  return `mailto:${/<([^<>]+)>/.exec(mailFrom)?.[1] ?? mailFrom.trim()}`
}
