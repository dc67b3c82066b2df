import { daysAfter, daysFrom, startOfDayAt } from '@/lib/climate/days'
import { emcOfReadingPct } from '@/lib/wood/emc'
import type { RoomSeries } from './room'

/** A room's figures in one step of time. */
export interface SeriesPoint {
  at: Date
  temperatureC: number
  humidityPct: number
  emcPct: number
  emcPctMin: number
  emcPctMax: number
}

export type SeriesColumns = Pick<
  RoomSeries,
  'at' | 'temperatureC' | 'humidityPct' | 'emcPct' | 'emcPctMin' | 'emcPctMax'
>

export interface SensorReading {
  sensorId: number
  at: Date
  temperatureC: number
  humidityPct: number
}

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length

function grouped<T, K>(items: readonly T[], keyOf: (item: T) => K): Map<K, T[]> {
  const groups = new Map<K, T[]>()
  for (const item of items) {
    const group = groups.get(keyOf(item))
    if (group === undefined) groups.set(keyOf(item), [item])
    else group.push(item)
  }
  return groups
}

/** Single readings, gathered into steps: the mean over the sensors of each sensor's own mean. */
export function pointsFromReadings(readings: readonly SensorReading[], stepMs: number): SeriesPoint[] {
  const steps = grouped(readings, (reading) => Math.floor(reading.at.getTime() / stepMs) * stepMs)
  return [...steps]
    .toSorted(([a], [b]) => a - b)
    .map(([at, inStep]) => {
      const emcs = inStep.map((reading) => emcOfReadingPct(reading.temperatureC, reading.humidityPct))
      const bySensor = [...grouped(inStep, (reading) => reading.sensorId).values()]
      const over = (valueOf: (reading: SensorReading) => number) =>
        mean(bySensor.map((own) => mean(own.map(valueOf))))
      return {
        at: new Date(at),
        temperatureC: over((reading) => reading.temperatureC),
        humidityPct: over((reading) => reading.humidityPct),
        // Averaged from readings: the EMC of averaged air would be another figure.
        emcPct: over((reading) => emcOfReadingPct(reading.temperatureC, reading.humidityPct)),
        emcPctMin: Math.min(...emcs),
        emcPctMax: Math.max(...emcs),
      }
    })
}

const empty = (): SeriesColumns => ({
  at: [],
  temperatureC: [],
  humidityPct: [],
  emcPct: [],
  emcPctMin: [],
  emcPctMax: [],
})

function push(columns: SeriesColumns, at: Date, point: SeriesPoint | undefined): void {
  columns.at.push(at.toISOString())
  columns.temperatureC.push(point?.temperatureC ?? null)
  columns.humidityPct.push(point?.humidityPct ?? null)
  columns.emcPct.push(point?.emcPct ?? null)
  columns.emcPctMin.push(point?.emcPctMin ?? null)
  columns.emcPctMax.push(point?.emcPctMax ?? null)
}

/** Points as they come, with one empty row where nothing was read for longer than the gap: so no line bridges it. */
export function columnsWithGaps(points: readonly SeriesPoint[], gapMs: number): SeriesColumns {
  const columns = empty()
  let previous: Date | undefined
  for (const point of points) {
    if (previous !== undefined && point.at.getTime() - previous.getTime() > gapMs) {
      push(columns, new Date((previous.getTime() + point.at.getTime()) / 2), undefined)
    }
    push(columns, point.at, point)
    previous = point.at
  }
  return columns
}

const hourMs = 3_600_000

/** Every hour that the range touches; those without a reading are empty. */
export function hourColumns(points: readonly SeriesPoint[], from: Date, to: Date): SeriesColumns {
  const byHour = new Map(points.map((point) => [point.at.getTime(), point]))
  const columns = empty()
  for (let at = Math.floor(from.getTime() / hourMs) * hourMs; at < to.getTime(); at += hourMs)
    push(columns, new Date(at), byHour.get(at))
  return columns
}

export interface DayPoint extends Omit<SeriesPoint, 'at'> {
  dayOn: string
}

/**
 * Every calendar day from the first to the last, or every few days together where there would be too many.
 * A day begins when it begins in the site's zone, so it may have 23, 24 or 25 hours.
 */
export function dayColumns(
  points: readonly DayPoint[],
  range: { firstOn: string; lastOn: string; timeZone: string; days: number },
): SeriesColumns {
  const byStep = grouped(points, (point) => Math.floor(daysFrom(range.firstOn, point.dayOn) / range.days))
  const columns = empty()
  const steps = Math.floor(daysFrom(range.firstOn, range.lastOn) / range.days)
  for (let step = 0; step <= steps; step += 1) {
    const at = startOfDayAt(daysAfter(range.firstOn, step * range.days), range.timeZone)
    push(columns, at, together(at, byStep.get(step)))
  }
  return columns
}

function together(at: Date, points: readonly DayPoint[] | undefined): SeriesPoint | undefined {
  if (points === undefined) return undefined
  return {
    at,
    temperatureC: mean(points.map((point) => point.temperatureC)),
    humidityPct: mean(points.map((point) => point.humidityPct)),
    emcPct: mean(points.map((point) => point.emcPct)),
    emcPctMin: Math.min(...points.map((point) => point.emcPctMin)),
    emcPctMax: Math.max(...points.map((point) => point.emcPctMax)),
  }
}
