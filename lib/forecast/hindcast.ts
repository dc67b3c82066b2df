import { fitOf, toldByRecord, toldByYesterday } from './make-forecast'
import { type ForecastInput, isEnough, prepared } from './prepare'
import type { RecordFit } from './fit'
import { HOUR_MS, recordUpTo } from './record'
import { SCORED_LEADS } from './room-forecast'
import { warmedForecast } from './warmed'

export interface HindcastScore {
  madeAt: number
  leadH: number
  emcPct: number
  recordPct: number
  sameAsNowPct: number
  yesterdayPct: number | null
}

const DAY_MS = 24 * HOUR_MS

/**
 * What forecasts of past days would have said, from what was on record then, beside what came: so that it is known from
 * the first day how good they are.
 * @param input as for the forecast of now, its record reaching far enough back
 * @param how for how many days back, how many hours apart, fitted anew every so many days, on how many days of record
 * @returns an hour that was warmed counts only where that was promised: by what the promise said
 */
export function hindcastScores(
  input: ForecastInput,
  how: { days: number; everyHours: number; fitEveryDays: number; recordDays: number },
): HindcastScore[] {
  const { record } = input
  const scores: HindcastScore[] = []
  const { isWarmed } = prepared(input)
  let fit: RecordFit | undefined
  let fittedAt = -Infinity
  for (
    let madeAt = input.madeAt - how.days * DAY_MS;
    madeAt < input.madeAt;
    madeAt += how.everyHours * HOUR_MS
  ) {
    const known = recordUpTo(record, madeAt - how.recordDays * DAY_MS, madeAt)
    if (!isEnough(known)) continue
    const prep = prepared({ ...input, record: known, madeAt })
    if (madeAt - fittedAt >= how.fitEveryDays * DAY_MS || fit?.size !== prep.table.size) {
      fit = fitOf(prep, SCORED_LEADS)
      fittedAt = madeAt
    }
    if (fit === undefined) continue
    scores.push(...scoresAt(input, prep, fit, isWarmed))
  }
  return scores
}

function scoresAt(
  { record }: ForecastInput,
  prep: ReturnType<typeof prepared>,
  fit: RecordFit,
  isWarmed: Uint8Array,
): HindcastScore[] {
  const { madeAt, record: known } = prep.input
  const first = Math.round((madeAt - record.firstAt) / HOUR_MS)
  const sameAsNowPct = known.emcPct.at(-1) ?? NaN
  return SCORED_LEADS.flatMap((leadH) => {
    const came = record.emcPct[first + leadH - 1] ?? NaN
    const unlitPct = toldByRecord(prep, fit, leadH, 'emcPct')
    if (Number.isNaN(came) || unlitPct === undefined) return []
    const recordPct = isWarmed[first + leadH - 1] === 1 ? litPct(prep, fit, leadH) : unlitPct
    if (recordPct === null) return []
    const yesterdayPct = toldByYesterday(known, leadH, 'emcPct')
    return { madeAt, leadH, emcPct: came, recordPct, sameAsNowPct, yesterdayPct }
  })
}

/** What was promised of an hour if lit: the one hour is all that is asked about, so it stands for every one. */
function litPct(prep: ReturnType<typeof prepared>, fit: RecordFit, leadH: number): number | null {
  const all = (value: number) => Array.from({ length: 48 }, () => value)
  const emc = toldByRecord(prep, fit, leadH, 'emcPct') ?? NaN
  const warmth = toldByRecord(prep, fit, leadH, 'temperatureC') ?? NaN
  const unlit = { emcPct: all(emc), emcPctLow: all(emc), emcPctHigh: all(emc), temperatureC: all(warmth) }
  return warmedForecast(prep, unlit)?.emcPct[leadH - 1] ?? null
}
