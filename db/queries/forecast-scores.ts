import { type Kysely, sql } from 'kysely'
import { SCORED_LEADS } from '@/lib/forecast/room-forecast'
import type { Database } from '../schema'

const DAY_MS = 86_400_000
/** Readings that come later than this no longer change what is known of a forecast. Status: guess. */
const SCORED_FOR_MS = 14 * DAY_MS
/** An hour that moved by less than this was read the same, % MC. */
const SAME_PCT = 0.0005

export interface DueScore {
  roomId: number
  madeAt: Date
  leadH: number
  /** The whole hour that it spoke of. */
  hourAt: Date
  /** As it came. */
  emcPct: number
  recordPct: number
  /** What the promise "if you light it" said; null where there was none for that hour. */
  warmedPct: number | null
  sameAsNowPct: number
  yesterdayPct: number | null
}

/**
 * What forecasts of the last two weeks said of hours that have come since and are over: those not looked at yet, and those
 * whose figures late readings have changed.
 */
export async function listDueScores(db: Kysely<Database>, siteId: number, now: Date): Promise<DueScore[]> {
  const { rows } = await sql<{
    room_id: number
    made_at: Date
    lead_h: number
    hour_at: Date
    came: number
    record: number
    warmed: number | null
    same: number
    yesterday: number | null
  }>`
    select made.room_id, made.made_at, lead.lead_h, hours.hour_at, hours.came,
      (made.data -> 'recordPct' ->> (lead.lead_h - 1))::float8 as record,
      (made.data -> 'warmed' -> 'emcPct' ->> (lead.lead_h - 1))::float8 as warmed,
      (made.data ->> 'sameAsNowPct')::float8 as same,
      (made.data -> 'yesterdayPct' ->> (lead.lead_h - 1))::float8 as yesterday
    from forecast as made
    cross join unnest(${[...SCORED_LEADS]}::int[]) as lead (lead_h)
    join lateral (
      select hour_at, avg(emc_milli_sum::float8 / n / 1000) as came
      from room_hour
      where site_id = made.site_id and room_id = made.room_id
        and hour_at = made.made_at + (lead.lead_h - 1) * interval '1 hour'
      group by hour_at
    ) as hours on true
    left join forecast_score as score
      on score.site_id = made.site_id and score.room_id = made.room_id
      and score.made_at = made.made_at and score.lead_h = lead.lead_h
    where made.site_id = ${siteId}
      and made.made_at >= ${new Date(now.getTime() - SCORED_FOR_MS)} and made.made_at <= ${now}
      and hours.hour_at + interval '1 hour' <= ${now}
      and (score.emc_pct is null or abs(score.emc_pct - hours.came) > ${SAME_PCT})
    order by made.room_id, made.made_at, lead.lead_h`.execute(db)
  return rows.map((row) => ({
    roomId: row.room_id,
    madeAt: row.made_at,
    leadH: row.lead_h,
    hourAt: row.hour_at,
    emcPct: row.came,
    recordPct: row.record,
    warmedPct: row.warmed,
    sameAsNowPct: row.same,
    yesterdayPct: row.yesterday,
  }))
}

export type ScoreRow = Pick<
  DueScore,
  'roomId' | 'madeAt' | 'leadH' | 'emcPct' | 'recordPct' | 'sameAsNowPct' | 'yesterdayPct'
>

/** Rows of one statement: PostgreSQL takes 65,535 values at most. */
const ROWS_AT_ONCE = 2_000

/** Stores scores; one that is there already is replaced, as its hour has been read anew. */
export async function upsertScores(
  db: Kysely<Database>,
  siteId: number,
  rows: readonly ScoreRow[],
): Promise<void> {
  for (let from = 0; from < rows.length; from += ROWS_AT_ONCE) {
    await db
      .insertInto('forecast_score')
      .values(
        rows.slice(from, from + ROWS_AT_ONCE).map((row) => ({
          site_id: siteId,
          room_id: row.roomId,
          made_at: row.madeAt,
          lead_h: row.leadH,
          emc_pct: row.emcPct,
          record_pct: row.recordPct,
          same_as_now_pct: row.sameAsNowPct,
          yesterday_pct: row.yesterdayPct,
        })),
      )
      .onConflict((clash) =>
        clash.columns(['site_id', 'room_id', 'made_at', 'lead_h']).doUpdateSet((eb) => ({
          emc_pct: eb.ref('excluded.emc_pct'),
          record_pct: eb.ref('excluded.record_pct'),
          same_as_now_pct: eb.ref('excluded.same_as_now_pct'),
          yesterday_pct: eb.ref('excluded.yesterday_pct'),
        })),
      )
      .execute()
  }
}
