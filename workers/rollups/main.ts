import { createDatabase } from '@/db/client'
import { createLogger } from '../_shared/logger'
import { readRunningConfig } from '../env'
import { rebuild } from './rebuild'

/** `node --import tsx workers/rollups/main.ts [site]`: makes figures again; without a site, those of all. */
const [siteCode] = process.argv.slice(2)
const config = readRunningConfig()
const logger = createLogger('rollups', config.logLevel)
const db = createDatabase(config.databaseUrl, { name: 'rollups', max: 2 })
const sites = await rebuild(db, siteCode, (rebuilt) => logger.info(rebuilt, 'figures made again'))
if (sites === 0) {
  logger.error({ siteCode }, 'there is no such site')
  process.exitCode = 1
}
await db.destroy()
