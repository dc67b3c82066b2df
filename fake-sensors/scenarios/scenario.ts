import type { Air, ClimateRoom } from '../climates/rooms'
import type { DemoSensor } from '@/lib/sensors/demo-roster'
import type { Weather } from '../climates/outdoor'

/** A course of events for the simulated place, counted from the moment that the simulation starts. */
export interface Scenario {
  name: string
  /** What the scenario adds to the weather from then on; nothing before, so that history and presence join. */
  weatherFrom: (startedAtMs: number) => Weather
  /** Whether this sensor has lost its network at that instant. */
  isAway: (sensor: Pick<DemoSensor, 'habit'>, startedAtMs: number, atMs: number) => boolean
  /**
   * What it makes of a room's air, some hours after the start; before the start the hours are negative, and the past
   * that is made for the demo shows the same.
   */
  airOf?: (room: ClimateRoom, hours: number, air: Air) => Air
  /** What is left in a sensor's battery, where the scenario says so. */
  batteryOf?: (model: string, hours: number) => number | undefined
  /** What a sensor sends instead of its reading, where the scenario spoils it. */
  spoiled?: (model: string, hours: number) => string | undefined
}
