import type { DemoRoster, DemoSensor } from '@/lib/sensors/demo-roster'
import { DEMO_HISTORY_EVERY_S } from '@/lib/sensors/demo-roster'
import type { ReadingMessage } from '@/lib/readings/payload'
import { missedInstants } from './backlog'
import { batteryPct } from './battery'
import { createInstruments, isInstrumentName } from './climates/instruments'
import { HOUR_MS } from './climates/outdoor'
import { startDevice, type Device } from './device'
import type { KeptState } from './kept-state'
import type { Scenario } from './scenarios/scenario'

export interface PlaceOptions {
  brokerUrl: string
  roster: DemoRoster
  scenario: Scenario
  state: KeptState
  onTrouble: (sentence: string) => void
  now?: () => number
}

export interface Place {
  sensors: number
  stop(): Promise<void>
}

const PHASE_STEP_MS = 7_000

/** Switches on every sensor of the roster in one simulated climate. */
export function startPlace({ roster, scenario, state, now = Date.now, ...rest }: PlaceOptions): Place {
  const startedAtMs = now()
  const storyFromMs = Date.parse(roster.storyFrom ?? new Date(startedAtMs).toISOString())
  const hoursOf = (atMs: number) => (atMs - storyFromMs) / HOUR_MS
  const measured = createInstruments(roster.seed, scenario.weatherFrom(startedAtMs), (room, atMs, air) =>
    scenario.airOf === undefined ? air : scenario.airOf(room, hoursOf(atMs), air),
  )
  const devices = roster.sensors.flatMap((sensor, index) => {
    const measure = measureOf(sensor)
    return measure === undefined ? [] : [start(sensor, index, measure)]
  })
  return {
    sensors: devices.length,
    async stop() {
      await Promise.all(devices.map((device) => device.stop()))
      await state.save()
    },
  }

  function measureOf(sensor: DemoSensor): ((atMs: number) => ReadingMessage) | undefined {
    const { model } = sensor
    if (!isInstrumentName(model)) {
      rest.onTrouble(`There is no simulated instrument called ${model}.`)
      return undefined
    }
    return (atMs) => ({
      at: new Date(atMs).toISOString(),
      ...measured(model, atMs),
      batteryPct: scenario.batteryOf?.(model, hoursOf(atMs)) ?? batteryPct(sensor, atMs),
    })
  }

  function start(sensor: DemoSensor, index: number, measure: (atMs: number) => ReadingMessage): Device {
    const { code, secret, everyS } = sensor
    const lastAtMs = Math.max(Date.parse(sensor.lastAt), state.lastAtMs(code) ?? 0)
    return startDevice({
      brokerUrl: rest.brokerUrl,
      siteCode: roster.siteCode,
      sensorCode: code,
      secret,
      everyMs: everyS * 1000,
      phaseMs: index * PHASE_STEP_MS,
      measure,
      spoiled: (atMs) => scenario.spoiled?.(sensor.model, hoursOf(atMs)),
      isAway: (atMs) => scenario.isAway(sensor, startedAtMs, atMs),
      missed: missedInstants(lastAtMs, startedAtMs, DEMO_HISTORY_EVERY_S * 1000),
      onAcknowledged: (atMs) => state.acknowledge(code, atMs),
      onTrouble: rest.onTrouble,
      now,
    })
  }
}
