import type { DemoSensor } from '@/lib/sensors/demo-roster'
import { DAY_MS } from './climates/outdoor'

/** A cell lasts about a year and a half. Invented. */
const LASTS_DAYS = 550
/** Where a simulated battery stops falling: nobody will change it. */
const LEAST_PCT = 3

/** What is left in a sensor's battery at an instant, to whole percent: a line down from what the roster says. */
export function batteryPct({ batteryPct: before, lastAt }: DemoSensor, atMs: number): number {
  const days = Math.max(0, atMs - Date.parse(lastAt)) / DAY_MS
  return Math.round(Math.max(Math.min(before, LEAST_PCT), before - (100 * days) / LASTS_DAYS))
}
