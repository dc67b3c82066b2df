import { once } from 'node:events'
import { scenarioSchema } from '@/lib/sensors/scenarios'
import { createInstruments, isInstrumentName, type InstrumentName } from './climates/instruments'
import { HOUR_MS } from './climates/outdoor'
import { scenarioOf } from './scenarios/all'
import type { Scenario } from './scenarios/scenario'

/** So many slots make one piece of text: few writes, and no long text in memory. */
const LINES_TOGETHER = 200

/**
 * Prints what the simulated instruments would have measured over a stretch of the past, so that it can be loaded
 * without years of waiting. One line a reading: place in the list of instruments, second since 1970, °C, % RH.
 *
 * node --import tsx fake-sensors/history.ts SCENARIO SEED FROM_S TO_S EVERY_S NAME...
 *
 * The scenario starts at TO_S: what it did before then shows.
 */
export function* historyLines(
  seed: number,
  fromS: number,
  toS: number,
  everyS: number,
  names: readonly InstrumentName[],
  scenario?: Scenario,
): Generator<string> {
  const measure = createInstruments(
    seed,
    undefined,
    (room, atMs, air) => scenario?.airOf?.(room, (atMs - toS * 1000) / HOUR_MS, air) ?? air,
  )
  for (let stretchS = fromS; stretchS < toS; stretchS += LINES_TOGETHER * everyS) {
    let text = ''
    const endS = Math.min(toS, stretchS + LINES_TOGETHER * everyS)
    for (let slotS = stretchS; slotS < endS; slotS += everyS)
      names.forEach((name, index) => {
        // Sensors were not all switched on at the same second.
        const atS = slotS + ((index * 67) % everyS)
        if (atS >= toS) return
        const { temperatureC, humidityPct } = measure(name, atS * 1000)
        text += `${index},${atS},${temperatureC},${humidityPct}\n`
      })
    yield text
  }
}

async function main(): Promise<void> {
  const scenario = scenarioOf(scenarioSchema.parse(process.argv[2]))
  const [seed, fromS, toS, everyS] = process.argv.slice(3, 7).map(Number)
  const names = process.argv.slice(7).filter(isInstrumentName)
  if (seed === undefined || fromS === undefined || toS === undefined || everyS === undefined || !(everyS > 0))
    throw new Error('Usage: history.ts SCENARIO SEED FROM_S TO_S EVERY_S NAME...')
  if (names.length !== process.argv.length - 7) throw new Error('An instrument of that name does not exist.')
  for (const text of historyLines(seed, fromS, toS, everyS, names, scenario))
    if (!process.stdout.write(text)) await once(process.stdout, 'drain')
}

if (process.argv[1] === import.meta.filename) await main()
