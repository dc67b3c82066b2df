import { type Kysely, sql } from 'kysely'
import { dayOfInstant, daysAfter, daysFrom, monthsBefore, startOfDayAt } from '@/lib/climate/days'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import type { PieceMaterial } from '@/lib/carry/material'
import { eventDataSchema } from '@/lib/pieces/event'
import type { RestEvent } from '@/lib/seasoning/rest'
import { type DayOfRooms, woodCourse, type WoodCourse } from '@/lib/seasoning/wood-course'
import type { Database } from '../schema'
import { listStays } from './piece-facts'
import { findRoomYears } from './room-figures'
import { listCountedWeights } from './weighings'

/** What the judgement of a resting piece looks at, besides the piece itself. */
export interface RestInputs {
  weighings: { at: number; grams: number; stepG: number | null }[]
  events: RestEvent[]
  scaleStepG: number | null
  /** The keep room's middle over its own last twelve months, with the days of them that have a record. */
  target: { pct: number; days: number } | undefined
  courseThrough: (known: { at: number; mcPct: number } | undefined) => WoodCourse | undefined
}

/** Rooms' days are looked at from so long before the first weight: what the wood remembers of before fades. */
const daysBeforeFirst = 180
/** And for this long at most, however long ago it was first weighed. */
const daysBackMax = 800

/**
 * Loads the weights of one piece, what happened to it, and the days of the rooms that it was in: page and API judge by
 * `restOf` of `lib/seasoning/rest.ts`. Hours are not gone through: those stand with the piece already.
 */
export async function loadRestInputs(
  db: Kysely<Database>,
  site: { siteId: number; timeZone: string },
  pieceId: number,
  own: PieceMaterial,
  now: Date,
): Promise<RestInputs> {
  const { siteId, timeZone } = site
  const todayOn = dayOfInstant(now, timeZone)
  const [weighings, events, scaleStepG, stays, years] = await Promise.all([
    listCountedWeights(db, siteId, pieceId),
    listRestEvents(db, siteId, pieceId),
    findScaleStepG(db, siteId),
    listStays(db, siteId, [pieceId]),
    findRoomYears(db, siteId, monthsBefore(todayOn, 12), todayOn),
  ])
  const ownStays = stays.get(pieceId) ?? []
  const firstOn = dayOfInstant(new Date(weighings[0]?.at ?? now), timeZone)
  const fromOn = latestOf(daysAfter(firstOn, -daysBeforeFirst), daysAfter(todayOn, -daysBackMax))
  const days = await listDaysOfRooms(
    db,
    site,
    [...new Set(ownStays.map((stay) => stay.roomId))],
    fromOn,
    todayOn,
  )
  const year = own.keepRoomId === null ? undefined : years.get(own.keepRoomId)
  return {
    weighings,
    events,
    scaleStepG,
    target: year && { pct: year.emcPctMiddle, days: year.days },
    courseThrough: (known) =>
      // What plastic in the wood does to it is not worked out.
      own.facts.woodKind === 'stabilised'
        ? undefined
        : woodCourse({
            filter: woodOfPiece(own.facts).filter,
            stays: ownStays,
            days,
            middlePctOf: (roomId) => years.get(roomId)?.emcPctMiddle,
            diffusionFactor: own.pace.factor,
            fromAt: startOfDayAt(fromOn, timeZone).getTime(),
            untilAt: now.getTime(),
            known,
          }),
  }
}

const latestOf = (one: string, other: string): string => (one > other ? one : other)

/** The mean air of every calendar day up to and with today, room by room. */
async function listDaysOfRooms(
  db: Kysely<Database>,
  { siteId, timeZone }: { siteId: number; timeZone: string },
  roomIds: readonly number[],
  fromOn: string,
  todayOn: string,
): Promise<DayOfRooms[]> {
  if (roomIds.length === 0) return []
  const { rows } = await sql<{ room_id: number; day_on: string; emc_pct: number; temperature_c: number }>`
    select room_id, day_on,
      avg(emc_milli_sum::float8 / n / 1000) as emc_pct,
      avg(temperature_milli_sum::float8 / n / 1000) as temperature_c
    from room_day
    where site_id = ${siteId} and room_id = any(${[...roomIds]}::int[])
      and day_on >= ${fromOn} and day_on <= ${todayOn}
    group by room_id, day_on`.execute(db)
  const byDay = new Map<string, Map<number, { emcPct: number; temperatureC: number }>>()
  for (const row of rows) {
    const day = byDay.get(row.day_on) ?? new Map<number, { emcPct: number; temperatureC: number }>()
    day.set(row.room_id, { emcPct: row.emc_pct, temperatureC: row.temperature_c })
    byDay.set(row.day_on, day)
  }
  return Array.from({ length: daysFrom(fromOn, todayOn) + 1 }, (_, n) => {
    const dayOn = daysAfter(fromOn, n)
    return { at: startOfDayAt(dayOn, timeZone).getTime(), rooms: byDay.get(dayOn) ?? new Map() }
  })
}

/** Every kind that ends a series, starts a rest, or tells how moist or how dry the wood is. */
async function listRestEvents(db: Kysely<Database>, siteId: number, pieceId: number): Promise<RestEvent[]> {
  const rows = await db
    .selectFrom('piece_event')
    .where('site_id', '=', siteId)
    .where('piece_id', '=', pieceId)
    .where('undone_at', 'is', null)
    .where('kind', '<>', 'note')
    .select(['kind', 'at', 'data'])
    .orderBy('at')
    .execute()
  return rows.map((row) => {
    const data = eventDataSchema.safeParse(row.data)
    const { mcPct, ovenDryG } = data.success ? data.data : {}
    return { kind: row.kind, at: row.at.getTime(), mcPct, ovenDryG }
  })
}

async function findScaleStepG(db: Kysely<Database>, siteId: number): Promise<number | null> {
  const row = await db
    .selectFrom('site')
    .where('id', '=', siteId)
    .select('scale_step_g')
    .executeTakeFirstOrThrow()
  return row.scale_step_g
}
