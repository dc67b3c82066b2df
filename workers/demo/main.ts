import { createDatabase } from '@/db/client'
import { readRunningConfig } from '../env'
import { lookAfterDemo } from './look-after'

/** Makes the demo when nothing is there, and then ends. `--reset` takes it away first. */

const config = readRunningConfig()
const db = createDatabase(config.databaseUrl, { max: 4, name: 'lidfast demo' })
try {
  await lookAfterDemo(db, {
    now: new Date(),
    dataDir: config.dataDir,
    isReset: process.argv.includes('--reset'),
    say: (sentence) => void process.stdout.write(`${sentence}\n`),
  })
} finally {
  await db.destroy()
}
