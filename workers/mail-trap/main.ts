import { createDatabase } from '@/db/client'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { startMailTrap } from './server'
import { storeMail } from './store'

const config = readRunningConfig()
const logger = createLogger('mail-trap', config.logLevel)
if (config.smtpUrl === undefined) throw new Error('SMTP_URL is not set: it says where the mail trap listens.')
const { hostname, port } = new URL(config.smtpUrl)

const db = createDatabase(config.databaseUrl, {
  max: 2,
  name: 'lidfast mail-trap',
  onIdleError: (error) => logger.warn({ err: error }, 'database away'),
})
const trap = await startMailTrap({
  host: hostname,
  port: Number(port),
  logger,
  keep: (mail) => storeMail(db, mail),
})
logger.info({ host: hostname, port: Number(port) }, 'ready')

onShutdown(
  async () => {
    await trap.close()
    await db.destroy()
  },
  { logger },
)
