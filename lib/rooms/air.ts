import { dewPointC } from '@/lib/air/dew-point'
import { AIR_MAX_C, AIR_MIN_C, vapourPressurePa } from '@/lib/air/humidity'
import {
  freshForMs,
  sensorHumidityDoubtPct,
  temperatureDoubtK,
  typedHumidityDoubtPct,
} from '@/lib/notices/policy'
import { EMC_TEMPERATURE_MAX_C, EMC_TEMPERATURE_MIN_C, emcDoubtPct, emcFlags } from '@/lib/wood/emc'
import { isKeepingRoom, type RoomAir, type RoomKind } from './room'

/** The last reading of one sensor that hangs in a room. */
export interface LastReading {
  isTyped: boolean
  at: Date
  temperatureC: number
  humidityPct: number
  emcPct: number
  usualGapS: number | null
}

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length

const within = (value: number, min: number, max: number): number => Math.min(max, Math.max(min, value))

export function isFresh(reading: LastReading, kind: RoomKind, now: Date): boolean {
  const ageMs = now.getTime() - reading.at.getTime()
  return (
    ageMs <=
    freshForMs({
      isKeepingRoom: isKeepingRoom(kind),
      isTyped: reading.isTyped,
      usualGapS: reading.usualGapS,
    })
  )
}

/**
 * The air of a room as last read: the mean over its fresh sensors. A typed reading speaks only where no sensor does,
 * as its doubt is wider. With nothing fresh the newest reading is given as stale, never as the present.
 * @param readings the last reading of every sensor that hangs there
 */
export function roomAir(readings: readonly LastReading[], kind: RoomKind, now: Date): RoomAir {
  const newest = readings.toSorted((a, b) => b.at.getTime() - a.at.getTime())[0]
  if (newest === undefined) return { kind: 'never' }
  const fresh = readings.filter((reading) => isFresh(reading, kind, now))
  const devices = fresh.filter((reading) => !reading.isTyped)
  const counted = devices.length > 0 ? devices : fresh.length > 0 ? fresh : [newest]
  return airOf(counted, fresh.length > 0 ? 'fresh' : 'stale', now)
}

function airOf(counted: readonly LastReading[], kind: 'fresh' | 'stale', now: Date): RoomAir {
  const temperatureC = mean(counted.map((reading) => reading.temperatureC))
  const humidityPct = mean(counted.map((reading) => reading.humidityPct))
  const isTyped = counted.every((reading) => reading.isTyped)
  const at = new Date(Math.max(...counted.map((reading) => reading.at.getTime())))
  return {
    kind,
    at: at.toISOString(),
    ageS: Math.max(0, Math.round((now.getTime() - at.getTime()) / 1000)),
    temperatureC,
    humidityPct,
    // The mean of the sensors' EMC, not the EMC of their mean air: the curve is not straight.
    emcPct: mean(counted.map((reading) => reading.emcPct)),
    emcDoubtPct: emcDoubtPct(
      within(temperatureC, EMC_TEMPERATURE_MIN_C, EMC_TEMPERATURE_MAX_C),
      within(humidityPct, 0, 100),
      isTyped ? typedHumidityDoubtPct : sensorHumidityDoubtPct,
      temperatureDoubtK,
    ),
    dewPointC: roomDewPointC(temperatureC, humidityPct),
    isTyped,
    flags: emcFlags(temperatureC, humidityPct),
  }
}

/** Sensors report over water at every temperature. None for air so dry, cold or hot that no dew point can be given. */
function roomDewPointC(temperatureC: number, humidityPct: number): number | null {
  if (!(temperatureC >= AIR_MIN_C && temperatureC <= AIR_MAX_C)) return null
  const point = dewPointC(vapourPressurePa(temperatureC, humidityPct, 'water'), 'water')
  return point.ok ? point.value : null
}

/** A day's mean as a room's air, for those who see daily figures only. It counts as present for two days. */
export function dailyAir(
  day: { endedAt: Date; temperatureC: number; humidityPct: number; emcPct: number } | undefined,
  now: Date,
): RoomAir {
  if (day === undefined) return { kind: 'never' }
  const isRecent = now.getTime() - day.endedAt.getTime() <= 2 * 86_400_000
  const reading: LastReading = { ...day, at: day.endedAt, isTyped: false, usualGapS: null }
  return airOf([reading], isRecent ? 'fresh' : 'stale', now)
}

/**
 * Up to when figures are settled, and how old the newest reading is. A sensor that has fallen silent does not hold the
 * others back: its gap is drawn as a gap.
 */
export function settledTo(
  readings: readonly LastReading[],
  kind: RoomKind,
  now: Date,
): { completeTo: string | null; age: number | null } {
  if (readings.length === 0) return { completeTo: null, age: null }
  const fresh = readings.filter((reading) => isFresh(reading, kind, now))
  const times = (fresh.length > 0 ? fresh : readings).map((reading) => reading.at.getTime())
  const newest = Math.max(...readings.map((reading) => reading.at.getTime()))
  const settled = fresh.length > 0 ? Math.min(...times) : newest
  return {
    completeTo: new Date(settled).toISOString(),
    age: Math.max(0, Math.round((now.getTime() - newest) / 1000)),
  }
}
