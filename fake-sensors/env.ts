import path from 'node:path'
import { z } from 'zod'
import { parseConfig } from '@/lib/config'
import { DEMO_ROSTER_FILE } from '@/lib/sensors/demo-roster'
import { scenarioNames, scenarioSchema, type ScenarioName } from '@/lib/sensors/scenarios'

export interface FakeSensorsEnvironment {
  brokerUrl: string
  scenario: ScenarioName
  rosterFile: string
  stateFile: string
  logLevel: string
}

const ownSchema = z.object({
  FAKE_SCENARIO: scenarioSchema.default('normal-day'),
  FAKE_SENSORS_FILE: z.string().min(1).optional(),
})

/** Throws the sentence that names a bad variable. */
export function readFakeSensorsEnvironment(): FakeSensorsEnvironment {
  const config = parseConfig(process.env)
  if (!config.ok) throw new Error(config.error.sentence)
  const own = ownSchema.safeParse({
    FAKE_SCENARIO: process.env.FAKE_SCENARIO || undefined,
    FAKE_SENSORS_FILE: process.env.FAKE_SENSORS_FILE || undefined,
  })
  if (!own.success) throw new Error(`FAKE_SCENARIO must be one of ${scenarioNames.join(', ')}.`)
  const { mqttHost, mqttPort, dataDir, logLevel } = config.value
  return {
    brokerUrl: `mqtt://${mqttHost.includes(':') ? `[${mqttHost}]` : mqttHost}:${String(mqttPort)}`,
    scenario: own.data.FAKE_SCENARIO,
    rosterFile: own.data.FAKE_SENSORS_FILE ?? path.join(dataDir, DEMO_ROSTER_FILE),
    stateFile: path.join(dataDir, 'fake-sensors-state.json'),
    logLevel,
  }
}
