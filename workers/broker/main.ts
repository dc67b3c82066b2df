import { createDatabase } from '@/db/client'
import { createLogger } from '../_shared/logger'
import { onShutdown } from '../_shared/shutdown'
import { readRunningConfig } from '../env'
import { startBroker } from './broker'

const config = readRunningConfig()
const logger = createLogger('broker', config.logLevel)
const db = createDatabase(config.databaseUrl, {
  name: 'broker',
  max: 6,
  // A statement that hangs would hold up every sensor; it is tried again instead.
  statementTimeoutMs: 30_000,
  onIdleError: (error) => logger.warn({ err: error }, 'database connection lost'),
})
const broker = await startBroker({ db, logger, host: config.mqttHost, port: config.mqttPort })
logger.info({ host: config.mqttHost, port: broker.port }, 'ready')

onShutdown(
  async () => {
    await broker.stop()
    await db.destroy()
  },
  { logger },
)
