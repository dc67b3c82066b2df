import { quantileOfSorted } from '@/lib/doubt/spread'
import { dot, fitRecord, type RecordFit } from './fit'
import { bestMethod, type LeadScore } from './goodness'
import { type ForecastInput, isEnough, type Prepared, prepared } from './prepare'
import type { HourlyRecord, Measure } from './record'
import { FORECAST_HOURS, type ForecastMethod, type RoomForecast } from './room-forecast'
import { warmedForecast } from './warmed'

const DAY_HOURS = 24
const ALL_LEADS = Array.from({ length: FORECAST_HOURS }, (_, n) => n + 1)
const LIMITS: Readonly<Record<Measure, readonly [number, number]>> = {
  emcPct: [0, 30],
  temperatureC: [-40, 60],
  humidityPct: [0, 100],
}

const held = (value: number, measure: Measure): number =>
  Math.min(LIMITS[measure][1], Math.max(LIMITS[measure][0], value))

/** What the record alone says of an hour so far ahead. */
export function toldByRecord(
  prep: Prepared,
  fit: RecordFit,
  leadH: number,
  measure: Measure,
): number | undefined {
  const { calm, moves, table } = prep
  const lead = fit.leads.find((one) => one.leadH === leadH)
  const last = calm.length - 1
  if (lead === undefined || Number.isNaN(table.rows[last * table.size] ?? NaN)) return undefined
  const season = moves === null ? 0 : (moves[measure][last + leadH] ?? 0)
  return held((calm[measure][last] ?? NaN) + dot(table, last, lead.weights[measure]) + season, measure)
}

/** The same hour of the last day that has it whole; null where that is not on record. */
export function toldByYesterday(record: HourlyRecord, leadH: number, measure: Measure): number | null {
  const days = Math.ceil(leadH / DAY_HOURS)
  const value = record[measure][record.length - 1 + leadH - days * DAY_HOURS] ?? NaN
  return Number.isNaN(value) ? null : value
}

export const fitOf = ({ calm, table, isWarmed }: Prepared, leads: readonly number[]): RecordFit | undefined =>
  fitRecord(calm, table, (n) => isWarmed[n] === 0, leads)

/** The fit that a forecast is made by, for callers that make many and fit anew only now and then; undefined where too little is on record. */
export const fitForecast = (input: ForecastInput): RecordFit | undefined =>
  isEnough(input.record) ? fitOf(prepared(input), ALL_LEADS) : undefined

/**
 * The next 48 hours of a room from its own record: hour of day, how the present stands against the days before and how
 * soon that fades, the season of the year before, an outdoor room's air. Warmed hours are left out and told apart.
 * @param scores how far off each way has been; where the record was no better, the better of the others is used
 * @param fitted by `fitForecast`, of some days ago at most; fitted anew where it is left out
 * @returns undefined where too little is on record, or the last hour is not
 */
export function makeForecast(
  input: ForecastInput,
  scores: readonly LeadScore[],
  fitted?: RecordFit,
): RoomForecast | undefined {
  if (!isEnough(input.record)) return undefined
  const prep = prepared(input)
  const fit = fitted?.size === prep.table.size ? fitted : fitOf(prep, ALL_LEADS)
  if (fit === undefined) return undefined
  const { record } = input
  const now = (measure: Measure) => record[measure].at(-1) ?? NaN
  const byRecord = (measure: Measure) =>
    ALL_LEADS.map((leadH) => toldByRecord(prep, fit, leadH, measure) ?? now(measure))
  const own = {
    emcPct: byRecord('emcPct'),
    temperatureC: byRecord('temperatureC'),
    humidityPct: byRecord('humidityPct'),
  }
  const yesterdayPct = ALL_LEADS.map((leadH) => toldByYesterday(record, leadH, 'emcPct'))
  const method = ALL_LEADS.map((leadH): ForecastMethod => {
    const best = bestMethod(scores, leadH)
    return best === 'record' || isUnlit(prep, best, leadH) ? best : 'record'
  })
  const used = (measure: Measure) =>
    ALL_LEADS.map((leadH, n) =>
      method[n] === 'same-as-now'
        ? now(measure)
        : method[n] === 'yesterday'
          ? (toldByYesterday(record, leadH, measure) ?? now(measure))
          : (own[measure][n] ?? now(measure)),
    )
  const emcPct = used('emcPct')
  const temperatureC = used('temperatureC')
  const range = ALL_LEADS.map((leadH, n) => errorsOf(prep, fit, method[n] ?? 'record', leadH))
  const edge = (share: number) =>
    emcPct.map((value, n) => held(value + quantileOfSorted(range[n] ?? NO_ERROR, share), 'emcPct'))
  const unlit = { emcPct, temperatureC, emcPctLow: edge(0.1), emcPctHigh: edge(0.9) }
  return {
    madeAt: input.madeAt,
    ...unlit,
    humidityPct: used('humidityPct'),
    method,
    recordPct: own.emcPct,
    sameAsNowPct: now('emcPct'),
    yesterdayPct,
    usesOutdoors: input.outdoors !== null,
    usesLastYear: prep.moves !== null,
    warmed: warmedForecast(prep, unlit),
  }
}

/** Whether the hour that a simple way takes over is on record and was not warmed: what a fire did is no forecast. */
function isUnlit({ isWarmed, input }: Prepared, way: ForecastMethod, leadH: number): boolean {
  const last = input.record.length - 1
  const taken = way === 'same-as-now' ? last : last + leadH - Math.ceil(leadH / DAY_HOURS) * DAY_HOURS
  return isWarmed[taken] === 0 && !Number.isNaN(input.record.emcPct[taken] ?? NaN)
}

const NO_ERROR = Float64Array.of(0)

/** Errors on record of the way that is used for an hour so far ahead, sorted. */
function errorsOf(prep: Prepared, fit: RecordFit, way: ForecastMethod, leadH: number): Float64Array {
  if (way === 'record') return fit.leads.find((one) => one.leadH === leadH)?.errorsPct ?? NO_ERROR
  const { emcPct } = prep.input.record
  const back = way === 'same-as-now' ? leadH : Math.ceil(leadH / DAY_HOURS) * DAY_HOURS
  const errors = emcPct
    .map((value, n) => value - (emcPct[n - back] ?? NaN))
    .filter((one) => !Number.isNaN(one))
  return errors.length === 0 ? NO_ERROR : errors.sort()
}
