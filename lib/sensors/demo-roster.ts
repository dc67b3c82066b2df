import { z } from 'zod'
import { codeSchema } from '@/lib/sites/site'

/**
 * The file that the demo's maker leaves for the simulated sensors: what a person would type into each real one,
 * and the instant up to which the history already holds its readings.
 */
export const demoSensorSchema = z.strictObject({
  code: codeSchema,
  /** The simulated instrument that stands behind it. */
  model: z.string().min(1).max(60),
  secret: z.string().min(1),
  everyS: z.int().min(1).max(3600),
  lastAt: z.iso.datetime(),
  /** What was left in its battery then. */
  batteryPct: z.number().min(0).max(100),
  /** steady: always there; drops-out: goes away now and then and catches up; silent: no longer heard. */
  habit: z.enum(['steady', 'drops-out', 'silent']),
})
export type DemoSensor = z.infer<typeof demoSensorSchema>

export const demoRosterSchema = z.strictObject({
  siteCode: codeSchema,
  seed: z.int(),
  /** When the demo was made: what a scenario does counts from then, before a restart as after it. */
  storyFrom: z.iso.datetime().optional(),
  sensors: z.array(demoSensorSchema),
})
export type DemoRoster = z.infer<typeof demoRosterSchema>

/** Where both sides look for it, inside the data folder. */
export const DEMO_ROSTER_FILE = 'demo-sensors.json'

/** How far apart the readings of the history, and those that a simulated sensor kept while it was off, are. */
export const DEMO_HISTORY_EVERY_S = 600
