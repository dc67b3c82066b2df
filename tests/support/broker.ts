import { createLogger } from '@/workers/_shared/logger'
import { type BrokerOptions, type RunningBroker, startBroker } from '@/workers/broker/broker'
import type { TestDatabase } from './database'

/** The real broker in this process, on a free port. */
export const startTestBroker = (
  database: TestDatabase,
  options: Partial<BrokerOptions> = {},
): Promise<RunningBroker> =>
  startBroker({
    ...{ db: database.db, logger: createLogger('test', 'silent'), host: '127.0.0.1', port: 0 },
    ...options,
  })
