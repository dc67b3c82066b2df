import { spawn } from 'node:child_process'
import path from 'node:path'
import { createInterface } from 'node:readline'
import type { Kysely } from 'kysely'
import { insertReadings, type ReadingRow } from '@/db/queries/readings'
import type { Database } from '@/db/schema'
import { DEMO_HISTORY_EVERY_S } from '@/lib/sensors/demo-roster'
import type { ScenarioName } from '@/lib/sensors/scenarios'
import { placeSeed, placeSensors, wasWorking } from './place'

export interface HistoryOptions {
  siteId: number
  /** By model, the number of the sensor within the site. */
  sensorIds: ReadonlyMap<string, number>
  now: Date
  days: number
  everyS?: number
  scenario?: ScenarioName
  onProgress: (share: number, readings: number) => void
}

/** One source of readings: a simulated instrument, for a sensor, over a part of the past. */
interface Source {
  model: string
  sensorId: number
  /** The instant of a reading counts when it lies so many minutes before now. */
  counts: (minutesAgo: number) => boolean
}

const minutesADay = 24 * 60
const batchRows = 10_000
const historyProgram = path.join(import.meta.dirname, '../../fake-sensors/history.ts')

function sourcesOf(sensorIds: ReadonlyMap<string, number>): Source[] {
  return placeSensors.flatMap((sensor): Source[] => {
    const sensorId = sensorIds.get(sensor.model)
    if (sensorId === undefined) throw new RangeError(`no sensor was made for ${sensor.model}`)
    const { before } = sensor
    const movedMinutesAgo = before === undefined ? Infinity : before.untilDaysAgo * minutesADay
    const here: Source = {
      model: sensor.model,
      sensorId,
      counts: (minutesAgo) => minutesAgo < movedMinutesAgo && wasWorking(sensor, minutesAgo),
    }
    if (before === undefined) return [here]
    return [here, { model: before.model, sensorId, counts: (minutesAgo) => minutesAgo >= movedMinutesAgo }]
  })
}

/**
 * Fills the past of every sensor with what the simulated instruments would have measured. The simulation is hardware
 * that knows nothing of the database, so it runs by itself, on another core where there is one, and is read line by line.
 * @returns how many readings were stored
 */
export async function insertHistory(db: Kysely<Database>, options: HistoryOptions): Promise<number> {
  const { siteId, now, days, everyS = DEMO_HISTORY_EVERY_S, scenario = 'normal-day', onProgress } = options
  const sources = sourcesOf(options.sensorIds)
  const toS = Math.floor(now.getTime() / 1000)
  const fromS = Math.floor((toS - days * 86_400) / everyS) * everyS
  let stored = 0
  // Two batches under way: while the database stores one, the next is read and sent.
  let before: Promise<void> = Promise.resolve()
  let rows: ReadingRow[] = []
  const store = async (batch: ReadingRow[], share: number) => {
    const inserted = await insertReadings(db, batch)
    stored += inserted
    onProgress(share, stored)
  }
  for await (const line of simulated(scenario, fromS, toS, everyS, sources)) {
    const [index, atS, temperatureC, humidityPct] = line.split(',').map(Number)
    if (index === undefined || atS === undefined || temperatureC === undefined || humidityPct === undefined)
      throw new Error(`The simulation wrote a line that is no reading: ${line}`)
    const source = sources[index]
    if (source === undefined || !source.counts((toS - atS) / 60)) continue
    rows.push({ siteId, sensorId: source.sensorId, at: new Date(atS * 1000), temperatureC, humidityPct })
    if (rows.length < batchRows) continue
    const batch = store(rows, (atS - fromS) / (toS - fromS))
    rows = []
    await before
    before = batch
  }
  await before
  await store(rows, 1)
  return stored
}

async function* simulated(
  scenario: ScenarioName,
  fromS: number,
  toS: number,
  everyS: number,
  sources: readonly Source[],
): AsyncGenerator<string> {
  const child = spawn(
    process.execPath,
    [
      '--import',
      'tsx',
      historyProgram,
      scenario,
      String(placeSeed),
      String(fromS),
      String(toS),
      String(everyS),
      ...sources.map((source) => source.model),
    ],
    { stdio: ['ignore', 'pipe', 'inherit'] },
  )
  const ended = new Promise<number | null>((resolve, reject) => {
    child.once('error', reject)
    child.once('close', resolve)
  })
  try {
    yield* createInterface({ input: child.stdout })
    const code = await ended
    if (code !== 0) throw new Error(`The simulation of the past ended with code ${String(code)}.`)
  } finally {
    child.kill()
  }
}
