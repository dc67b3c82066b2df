import { readFile } from 'node:fs/promises'
import { pino } from 'pino'
import { demoRosterSchema } from '@/lib/sensors/demo-roster'
import { readFakeSensorsEnvironment } from './env'
import { KeptState } from './kept-state'
import { startPlace, type Place } from './place'
import { scenarioOf } from './scenarios/all'

const SAVE_MS = 20_000

const environment = readFakeSensorsEnvironment()
// Pino's own writer tries for ever when the reader of the pipe is gone, and then this never ends.
process.stdout.on('error', () => undefined)
const log = pino(
  { level: environment.logLevel, base: { name: 'fake-sensors' } },
  { write: (line: string) => void process.stdout.write(line) },
)
const state = await KeptState.open(environment.stateFile)
const told = new Set<string>()

let place: Place | undefined
let rosterText: string | undefined
let timer: NodeJS.Timeout | undefined

/** The same trouble comes back with every try to reconnect; once is enough. */
function tellOnce(sentence: string): void {
  if (told.has(sentence)) return
  told.add(sentence)
  log.warn(sentence)
}

/** Looks at the roster again now and then: the demo may be made, made anew, or removed while this runs. */
async function follow(): Promise<void> {
  const text = await readFile(environment.rosterFile, 'utf8').catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return ''
    throw error
  })
  if (text === rosterText) return state.save()
  rosterText = text
  await place?.stop()
  place = undefined
  if (text === '') return void log.info('No demo sensors to simulate; waiting for a demo.')
  const roster = demoRosterSchema.parse(JSON.parse(text))
  const scenario = scenarioOf(environment.scenario)
  place = startPlace({ brokerUrl: environment.brokerUrl, roster, scenario, state, onTrouble: tellOnce })
  log.info({ sensors: place.sensors, scenario: scenario.name }, 'simulated sensors are on')
}

function turn(): void {
  follow()
    .catch((error: unknown) => log.error({ err: error }, 'could not read the roster of simulated sensors'))
    .finally(() => (timer = setTimeout(turn, SAVE_MS)))
}
turn()

for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.once(signal, () => {
    clearTimeout(timer)
    const end = place?.stop() ?? state.save()
    end.then(
      () => process.exit(0),
      (error: unknown) => {
        log.error({ err: error }, 'the simulated sensors did not stop well')
        process.exit(1)
      },
    )
  })
