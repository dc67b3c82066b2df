import type { DemoSensor } from '@/lib/sensors/demo-roster'
import type { Weather } from '../climates/outdoor'

/** A course of events for the simulated place, counted from the moment that the simulation starts. */
export interface Scenario {
  name: string
  /** What the scenario adds to the weather from then on; nothing before, so that history and presence join. */
  weatherFrom: (startedAtMs: number) => Weather
  /** Whether this sensor has lost its network at that instant. */
  isAway: (sensor: Pick<DemoSensor, 'habit'>, startedAtMs: number, atMs: number) => boolean
}
