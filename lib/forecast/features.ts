import { saturationPressurePa } from '@/lib/air/saturation'
import { type HourlyRecord, HOUR_MS, trailingMean } from './record'

/** What is looked at of each hour, row by row. A row with anything unknown is NaN in its first place. */
export interface FeatureTable {
  readonly size: number
  readonly rows: Float64Array
}

const DAY_HOURS = 24
const HARMONICS = [1, 2, 3]
/** The level of the last weeks, hours. */
const LEVEL_HOURS = 7 * DAY_HOURS

const at = (values: Float64Array, n: number): number => values[n] ?? NaN

/** Water vapour in a room's air, as percent of what it could hold at another temperature. */
const heldPct = (humidityPct: number, temperatureC: number, heldAtC: number): number =>
  (humidityPct * saturationPressurePa(temperatureC)) / saturationPressurePa(heldAtC)

/**
 * What the coming hours are reckoned from: the hour of day, and how the present stands against the hours, the day and the
 * weeks before; with an outdoor room also how its air stands against the room's.
 */
export function featuresOf(
  record: HourlyRecord,
  hourOfDay: (at: number) => number,
  outdoors: HourlyRecord | null,
): FeatureTable {
  const { emcPct, temperatureC, humidityPct } = record
  const day = { emc: trailingMean(emcPct, DAY_HOURS), warmth: trailingMean(temperatureC, DAY_HOURS) }
  const level = longMean(emcPct)
  const levelC = longMean(temperatureC)
  const outside = outdoors === null ? null : outsideOf(record, outdoors)
  const columns: ((n: number) => number)[] = [
    () => 1,
    ...HARMONICS.flatMap((harmonic) => {
      const angle = (n: number) =>
        (2 * Math.PI * harmonic * hourOfDay(record.firstAt + n * HOUR_MS)) / DAY_HOURS
      return [(n: number) => Math.cos(angle(n)), (n: number) => Math.sin(angle(n))]
    }),
    (n) => at(emcPct, n) - at(emcPct, n - 1),
    (n) => at(emcPct, n) - at(emcPct, n - 3),
    (n) => at(emcPct, n) - at(emcPct, n - DAY_HOURS),
    (n) => at(emcPct, n) - at(day.emc, n),
    (n) => at(day.emc, n) - at(day.emc, n - DAY_HOURS),
    (n) => at(day.emc, n) - at(level, n),
    (n) => at(temperatureC, n) - at(temperatureC, n - 3),
    (n) => at(temperatureC, n) - at(temperatureC, n - DAY_HOURS),
    (n) => at(temperatureC, n) - at(day.warmth, n),
    (n) => at(day.warmth, n) - at(day.warmth, n - DAY_HOURS),
    (n) => at(day.warmth, n) - at(levelC, n),
    ...(outside === null
      ? []
      : [
          (n: number) => at(outside.vapour, n) - at(humidityPct, n),
          (n: number) => at(outside.vapour, n) - at(outside.vapour, n - 3),
          (n: number) => at(outside.vapour, n) - at(outside.vapourDay, n),
          (n: number) => at(outside.warmth, n) - at(temperatureC, n),
          (n: number) => at(outside.warmth, n) - at(outside.warmthDay, n),
        ]),
  ]
  const size = columns.length
  const rows = new Float64Array(record.length * size)
  for (let n = 0; n < record.length; n += 1) {
    let isKnown = true
    columns.forEach((column, k) => {
      const value = column(n)
      rows[n * size + k] = value
      if (Number.isNaN(value)) isKnown = false
    })
    if (!isKnown) rows[n * size] = NaN
  }
  return { size, rows }
}

/** The mean of the weeks before, over what is known of them, fading by the week. */
function longMean(values: Float64Array): Float64Array {
  const means = new Float64Array(values.length).fill(NaN)
  const fade = Math.exp(-1 / LEVEL_HOURS)
  let sum = 0
  let weight = 0
  values.forEach((value, n) => {
    sum *= fade
    weight *= fade
    if (!Number.isNaN(value)) {
      sum += value
      weight += 1
    }
    if (weight > 0) means[n] = sum / weight
  })
  return means
}

function outsideOf(record: HourlyRecord, outdoors: HourlyRecord) {
  const shift = Math.round((record.firstAt - outdoors.firstAt) / HOUR_MS)
  const vapour = new Float64Array(record.length).fill(NaN)
  const warmth = new Float64Array(record.length).fill(NaN)
  for (let n = 0; n < record.length; n += 1) {
    const outC = at(outdoors.temperatureC, n + shift)
    const ownC = at(record.temperatureC, n)
    warmth[n] = outC
    if (!Number.isNaN(outC) && !Number.isNaN(ownC))
      vapour[n] = heldPct(at(outdoors.humidityPct, n + shift), outC, ownC)
  }
  return {
    vapour,
    warmth,
    vapourDay: trailingMean(vapour, DAY_HOURS),
    warmthDay: trailingMean(warmth, DAY_HOURS),
  }
}
