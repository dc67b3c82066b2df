import type { Kysely } from 'kysely'
import { storeMessages, type SensorMessage } from '@/db/queries/messages'
import { ensurePartitions, monthOf, monthsAhead } from '@/db/queries/partitions'
import type { Database } from '@/db/schema'
import type { Logger } from '../_shared/logger'
import { createAllowance } from './allowance'
import { type Batcher, createBatcher } from './batcher'
import { isFaultOfData, isMissingMonth } from './fault'

export type Ingest = Batcher<SensorMessage>

export interface IngestOptions {
  db: Kysely<Database>
  logger: Logger
  now?: () => Date
  /** Runs between the commit and the answers, for tests of what happens when the process ends there. */
  afterCommit?: () => Promise<void>
}

/** Long enough for many sensors to share a commit, too short for anybody to notice. */
const lingerMs = 20
const batchRows = 1_000
/** About 20 MB at most, while the database is away. */
const pendingRows = 50_000

/**
 * The way of sensors' messages into the database, shared by all connections: whatever `add` has resolved for is
 * committed and on the disk. A message may be acknowledged then, and only then.
 */
export function createIngest(options: IngestOptions): Ingest {
  const { db, logger, now = () => new Date(), afterCommit } = options
  const months = new Set<string>()
  const mayRecord = createAllowance(() => now().getTime())

  async function makeMonths(messages: readonly SensorMessage[]): Promise<void> {
    const at = messages.flatMap((message) => message.readings.map((reading) => monthOf(reading.at)))
    const missing = [...new Set(at)].filter((month) => !months.has(month))
    if (missing.length === 0) return
    const wanted = [...missing, ...monthsAhead(now())]
    const made = await ensurePartitions(db, wanted)
    if (made.length > 0) logger.info({ months: made }, 'months made')
    for (const month of wanted) months.add(month)
  }

  return createBatcher<SensorMessage>({
    lingerMs,
    batchRows,
    pendingRows,
    sizeOf: (message) => Math.max(1, message.readings.length + message.refusals.length),
    isTheirFault: isFaultOfData,
    onUnstorable: (error, { siteId, sensorId, topic, headHex }) =>
      logger.error({ err: error, siteId, sensorId, topic, headHex }, 'a message that can not be stored'),
    onAway(error, tries) {
      if (isMissingMonth(error)) months.clear()
      // Once when it begins and then every minute or so: the log must not fill while the database is away.
      if (tries === 1 || tries % 30 === 0) logger.error({ err: error, tries }, 'database away, waiting')
    },
    onBack: () => logger.info('database is back'),
    async write(messages) {
      await makeMonths(messages)
      const stored = await storeMessages(db, messages, now(), mayRecord)
      logger.debug({ messages: messages.length, ...stored }, 'stored')
      await afterCommit?.()
    },
  })
}
