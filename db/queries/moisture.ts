import { createHash } from 'node:crypto'
import { type Kysely, sql } from 'kysely'
import { learnedPace, type Pace } from '@/lib/follow/learned-pace'
import type { Followed } from '@/lib/follow/record'
import { type PieceFilter, stateOfStored, storedOf, storedStateSchema } from '@/lib/follow/wood-state'
import { turnedSchema } from '@/lib/pieces/outcome'
import { movementClassSchema } from '@/lib/wood/site-wood'
import type { MovementClass } from '@/lib/wood/species'
import type { Database } from '../schema'

/** A piece's wood as stored, with what it was made from. */
export interface StoredMoisture {
  at: Date
  state: unknown
  outAt: Date | null
  outState: unknown
  pieceKey: string
  airKey: string
}

export async function findMoisture(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[],
): Promise<Map<number, StoredMoisture>> {
  if (pieceIds.length === 0) return new Map()
  const rows = await db
    .selectFrom('piece_moisture')
    .where('site_id', '=', siteId)
    .where('piece_id', 'in', [...pieceIds])
    .select(['piece_id', 'at', 'state', 'out_at', 'out_state', 'piece_key', 'air_key'])
    .execute()
  return new Map(
    rows.map((row) => [
      row.piece_id,
      {
        at: row.at,
        state: row.state,
        outAt: row.out_at,
        outState: row.out_state,
        pieceKey: row.piece_key,
        airKey: row.air_key,
      },
    ]),
  )
}

/** A stored state brought to life; undefined for one of another make, which is then made anew. */
export function followedOf(filter: PieceFilter, stored: StoredMoisture): Followed | undefined {
  const parsed = storedStateSchema.safeParse(stored.state)
  const state = parsed.success ? stateOfStored(filter, parsed.data) : undefined
  if (state === undefined) return undefined
  const out = stored.outState === null ? undefined : storedStateSchema.safeParse(stored.outState)
  const outState = out?.success === true ? (stateOfStored(filter, out.data) ?? null) : null
  return {
    atMs: stored.at.getTime(),
    state,
    outAtMs: outState === null ? null : (stored.outAt?.getTime() ?? null),
    outState,
  }
}

export interface MoistureRow {
  pieceId: number
  followed: Followed
  pieceKey: string
  airKey: string
}

/** Stores the wood of many pieces in one statement. A later state is never replaced by one that stops earlier. */
export async function upsertMoisture(
  db: Kysely<Database>,
  siteId: number,
  rows: readonly MoistureRow[],
): Promise<void> {
  if (rows.length === 0) return
  await db
    .insertInto('piece_moisture')
    .values(
      rows.map(({ pieceId, followed, pieceKey, airKey }) => ({
        site_id: siteId,
        piece_id: pieceId,
        at: new Date(followed.atMs),
        state: JSON.stringify(storedOf(followed.state)),
        out_at: followed.outAtMs === null ? null : new Date(followed.outAtMs),
        out_state: followed.outState === null ? null : JSON.stringify(storedOf(followed.outState)),
        piece_key: pieceKey,
        air_key: airKey,
      })),
    )
    .onConflict((clash) =>
      clash.columns(['site_id', 'piece_id']).doUpdateSet((eb) => ({
        at: eb.ref('excluded.at'),
        state: eb.ref('excluded.state'),
        out_at: eb.ref('excluded.out_at'),
        out_state: eb.ref('excluded.out_state'),
        piece_key: eb.ref('excluded.piece_key'),
        air_key: eb.ref('excluded.air_key'),
        made_at: sql<Date>`now()`,
      })),
    )
    .execute()
}

/** A short stand-in for a value that is only ever compared. */
export const keyOf = (value: unknown): string =>
  createHash('sha256').update(JSON.stringify(value)).digest('base64url').slice(0, 22)

/**
 * For each room, a key of all its figures before a moment: sums of the days, and of the hours of the last day. A late or
 * corrected reading changes it.
 * @param dayOn the site's day that holds the moment, with its first instant
 */
export async function findAirKeys(
  db: Kysely<Database>,
  siteId: number,
  at: Date,
  day: { on: string; startsAt: Date },
): Promise<Map<number, string>> {
  const { rows } = await sql<{ room_id: number; key: string }>`
    select room_id, string_agg(part, ' ' order by part) as key
    from (
      select room_id, 'd' || sum(n) || ',' || sum(emc_milli_sum) || ',' || sum(temperature_milli_sum) as part
      from room_day
      where site_id = ${siteId} and day_on < ${day.on}
      group by room_id
      union all
      select room_id, 'h' || sum(n) || ',' || sum(emc_milli_sum) || ',' || sum(temperature_milli_sum) as part
      from room_hour
      where site_id = ${siteId} and hour_at >= ${day.startsAt} and hour_at < ${at}
      group by room_id
    ) as parts
    group by room_id`.execute(db)
  return new Map(rows.map((row) => [row.room_id, row.key]))
}

/** Hourly air of rooms: a room's hour is the mean over its sensors' own means. */
export async function listRoomHours(
  db: Kysely<Database>,
  siteId: number,
  roomIds: ReadonlySet<number>,
  since: Date,
  until: Date,
): Promise<Map<number, Map<number, { emcPct: number; temperatureC: number }>>> {
  const hours = new Map<number, Map<number, { emcPct: number; temperatureC: number }>>()
  if (roomIds.size === 0) return hours
  const { rows } = await sql<{ room_id: number; hour_at: Date; emc_pct: number; temperature_c: number }>`
    select room_id, hour_at,
      avg(emc_milli_sum::float8 / n / 1000) as emc_pct,
      avg(temperature_milli_sum::float8 / n / 1000) as temperature_c
    from room_hour
    where site_id = ${siteId} and room_id = any(${[...roomIds]}::int[])
      and hour_at >= ${since} and hour_at <= ${until}
    group by room_id, hour_at
    order by room_id, hour_at`.execute(db)
  for (const row of rows) {
    const own = hours.get(row.room_id) ?? new Map<number, { emcPct: number; temperatureC: number }>()
    own.set(row.hour_at.getTime(), { emcPct: row.emc_pct, temperatureC: row.temperature_c })
    hours.set(row.room_id, own)
  }
  return hours
}

/** More outcomes than these no longer move the estimate. */
const outcomesMax = 200

/** What a site's outcomes say of how quickly its wood follows, by movement class. */
export async function findPaces(db: Kysely<Database>, siteId: number): Promise<Map<MovementClass, Pace>> {
  const rows = await db
    .selectFrom('outcome')
    .where('site_id', '=', siteId)
    .where('undone_at', 'is', null)
    // A lid turned at rest says nothing of the pace: only those from a stay count, of which all three are known.
    .where('used_slow', 'is not', null)
    .select(['movement_class', 'turned', 'used_slow', 'used_middle', 'used_fast'])
    .orderBy('at', 'desc')
    .limit(outcomesMax)
    .execute()
  const byClass = new Map<MovementClass, Parameters<typeof learnedPace>[0][number][]>()
  for (const row of rows) {
    const movementClass = movementClassSchema.parse(row.movement_class)
    const own = byClass.get(movementClass) ?? []
    const usedMiddle = row.used_middle ?? 0
    own.push({
      turned: turnedSchema.parse(row.turned),
      usedMiddle,
      usedSlow: row.used_slow ?? usedMiddle,
      usedFast: row.used_fast ?? usedMiddle,
    })
    byClass.set(movementClass, own)
  }
  return new Map([...byClass].map(([movementClass, outcomes]) => [movementClass, learnedPace(outcomes)]))
}
