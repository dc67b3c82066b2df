import type { Kysely } from 'kysely'
import { listDueScores, upsertScores } from '@/db/queries/forecast-scores'
import {
  findLeadScores,
  insertForecast,
  listForecastDays,
  listForecastHours,
  listRoomsForecast,
} from '@/db/queries/forecasts'
import { listRoomRecords } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { dayOfInstant, daysAfter } from '@/lib/climate/days'
import { hindcastScores } from '@/lib/forecast/hindcast'
import { makeForecast } from '@/lib/forecast/make-forecast'
import { type ForecastInput, isWarmedByHand, warmedHours } from '@/lib/forecast/prepare'
import { hourlyRecord, recordUpTo } from '@/lib/forecast/record'
import type { RoomKind } from '@/lib/rooms/room'

const HOUR_MS = 3_600_000
const DAY_MS = 24 * HOUR_MS
/** Readings of the hour just past may still be on their way. */
export const WAIT_MS = 2 * 60_000
/** A forecast looks at so much of the record. */
const RECORD_DAYS = 56
/** Days that are hindcast when a room is forecast for the first time. */
const HINDCAST = { days: 30, everyHours: 6, fitEveryDays: 2, recordDays: RECORD_DAYS }
/** Scores of so many days say which way is better now. Status: guess. */
const JUDGED_DAYS = 60
const YEAR_DAYS = 365
const NEAR_DAYS = 17
/** That a room was lit shows some hours later: until then its hours are not scored. */
const LIT_SHOWS_MS = 3 * HOUR_MS

export interface ForecastSite {
  siteId: number
  timeZone: string
}

interface Room {
  id: number
  kind: RoomKind
}

/**
 * Makes the forecast of the hour for every room of a site that has enough on record, and looks at what earlier ones said
 * of hours that have come. A room without any score is hindcast first, so that its page can tell how good forecasts are.
 * May run twice, or in two workers: what is there stays.
 * @returns how many forecasts and scores were made
 */
export async function forecastSite(
  db: Kysely<Database>,
  site: ForecastSite,
  now: Date,
): Promise<{ made: number; scored: number }> {
  const madeAt = Math.floor(now.getTime() / HOUR_MS) * HOUR_MS
  if (now.getTime() - madeAt < WAIT_MS) return { made: 0, scored: 0 }
  const { siteId } = site
  const [rooms, done] = await Promise.all([
    listRoomRecords(db, siteId),
    listRoomsForecast(db, siteId, new Date(madeAt)),
  ])
  const due = rooms.filter((room) => !done.has(room.id))
  const inputOf = await loadInputs(db, site, rooms, madeAt)
  let scored = await scoreCome(db, site, inputOf, rooms, now)
  let made = 0
  for (const room of due) {
    const input = inputOf(room)
    const scoresOf = async () => (await leadScores(db, siteId, now)).get(room.id) ?? []
    let scores = await scoresOf()
    if (scores.length === 0) {
      scored += await hindcast(db, siteId, room.id, input)
      scores = await scoresOf()
    }
    const record = recordUpTo(input.record, madeAt - RECORD_DAYS * DAY_MS, madeAt)
    const forecast = makeForecast({ ...input, record }, scores)
    if (forecast === undefined) continue
    await insertForecast(db, siteId, room.id, forecast)
    made += 1
  }
  return { made, scored }
}

const leadScores = (db: Kysely<Database>, siteId: number, now: Date) =>
  findLeadScores(db, siteId, new Date(now.getTime() - JUDGED_DAYS * DAY_MS), now)

async function loadInputs(
  db: Kysely<Database>,
  { siteId, timeZone }: ForecastSite,
  rooms: readonly Room[],
  madeAt: number,
): Promise<(room: Room) => ForecastInput> {
  const firstAt = madeAt - (RECORD_DAYS + HINDCAST.days) * DAY_MS
  const dayAt = (days: number) => daysAfter(dayOfInstant(new Date(madeAt), timeZone), days - YEAR_DAYS)
  const [hours, days] = await Promise.all([
    listForecastHours(db, siteId, new Date(firstAt), new Date(madeAt)),
    listForecastDays(db, siteId, dayAt(-RECORD_DAYS - HINDCAST.days - NEAR_DAYS), dayAt(NEAR_DAYS + 3)),
  ])
  const recordOf = (roomId: number) => hourlyRecord(hours.get(roomId) ?? [], firstAt, madeAt)
  const outside = rooms.find((room) => room.kind === 'outdoor' && hours.has(room.id))
  const outdoors = outside === undefined ? null : recordOf(outside.id)
  return (room) => ({
    madeAt,
    timeZone,
    record: recordOf(room.id),
    outdoors: room.id === outside?.id ? null : outdoors,
    lastYear: days.get(room.id) ?? [],
    isWarmedByHand: isWarmedByHand(room.kind),
  })
}

async function hindcast(
  db: Kysely<Database>,
  siteId: number,
  roomId: number,
  input: ForecastInput,
): Promise<number> {
  const scores = hindcastScores(input, HINDCAST)
  await upsertScores(
    db,
    siteId,
    scores.map((score) => ({ ...score, roomId, madeAt: new Date(score.madeAt) })),
  )
  return scores.length
}

/** Scores what has come. An hour that was warmed is held against what was promised of it, or not at all. */
async function scoreCome(
  db: Kysely<Database>,
  { siteId }: ForecastSite,
  inputOf: (room: Room) => ForecastInput,
  rooms: readonly Room[],
  now: Date,
): Promise<number> {
  const due = await listDueScores(db, siteId, now)
  const warmed = new Map<number, ReadonlySet<number>>()
  for (const room of rooms) {
    if (isWarmedByHand(room.kind) && due.some((score) => score.roomId === room.id))
      warmed.set(room.id, warmedHours(inputOf(room)))
  }
  const rows = due.flatMap((score) => {
    const hours = warmed.get(score.roomId)
    if (hours === undefined) return score
    const hourAt = score.hourAt.getTime()
    if (hourAt + HOUR_MS > now.getTime() - LIT_SHOWS_MS) return []
    if (!hours.has(hourAt)) return score
    return score.warmedPct === null ? [] : { ...score, recordPct: score.warmedPct }
  })
  await upsertScores(db, siteId, rows)
  return rows.length
}
