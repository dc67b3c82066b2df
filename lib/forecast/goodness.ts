import { z } from 'zod'
import { type ForecastMethod, SCORED_LEADS } from './room-forecast'

/** How far off each way of telling an hour so far ahead has been: mean errors either way, % MC. */
export const leadScoreSchema = z.object({
  leadH: z.int(),
  /** Hours that it was looked at. */
  n: z.int(),
  recordPct: z.number(),
  sameAsNowPct: z.number(),
  /** Null where yesterday never had such an hour. */
  yesterdayPct: z.number().nullable(),
})
export type LeadScore = z.infer<typeof leadScoreSchema>

/** Fewer hours than this say nothing of which way is better. Status: guess. */
const SCORES_MIN = 20

/** The hours that speak for one so far ahead: those of the next longer lead that is looked at. */
const scoreOf = (scores: readonly LeadScore[], leadH: number): LeadScore | undefined => {
  const scored = SCORED_LEADS.find((lead) => lead >= leadH)
  return scores.find((score) => score.leadH === scored && score.n >= SCORES_MIN)
}

/**
 * The way that has been least far off for an hour so far ahead; the room's own record while nothing speaks against it.
 * @param leadH hours after the last whole hour that was read, 1 to 48
 */
export function bestMethod(scores: readonly LeadScore[], leadH: number): ForecastMethod {
  const score = scoreOf(scores, leadH)
  if (score === undefined) return 'record'
  const { recordPct, sameAsNowPct, yesterdayPct } = score
  if (recordPct <= sameAsNowPct && (yesterdayPct === null || recordPct <= yesterdayPct)) return 'record'
  return yesterdayPct !== null && yesterdayPct < sameAsNowPct ? 'yesterday' : 'same-as-now'
}

/** The mean error of what would be used now, % MC. */
export function usedErrorPct(score: LeadScore): number {
  const way = bestMethod([score], score.leadH)
  return way === 'record'
    ? score.recordPct
    : way === 'yesterday'
      ? (score.yesterdayPct ?? score.sameAsNowPct)
      : score.sameAsNowPct
}
