import { parseArgs } from 'node:util'
import { createDatabase } from '@/db/client'
import { scenarioSchema } from '@/lib/sensors/scenarios'
import { readRunningConfig } from '../env'
import { lookAfterDemo } from './look-after'

/**
 * Makes the demo when nothing is there, and then ends. `--reset` takes it away first, and so does `--scenario NAME`, as a
 * scenario has a past of its own.
 */

const config = readRunningConfig()
const { values: asked } = parseArgs({
  options: { reset: { type: 'boolean', default: false }, scenario: { type: 'string' } },
})
const scenario = asked.scenario === undefined ? undefined : scenarioSchema.parse(asked.scenario)
const db = createDatabase(config.databaseUrl, { max: 4, name: 'lidfast demo' })
try {
  await lookAfterDemo(db, {
    now: new Date(),
    dataDir: config.dataDir,
    isReset: asked.reset || scenario !== undefined,
    scenario,
    say: (sentence) => void process.stdout.write(`${sentence}\n`),
  })
} finally {
  await db.destroy()
}
