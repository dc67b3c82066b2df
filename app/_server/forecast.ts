import 'server-only'
import type { Kysely } from 'kysely'
import { assumedKeepRoom, loadCarryMaterial } from '@/db/queries/carry-inputs'
import { findForecasts, findLeadScores } from '@/db/queries/forecasts'
import type { SiteMember } from '@/db/queries/members'
import { findRoom, listHangingSensors, listRoomRecords } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import type { RoomForecastView } from '@/lib/forecast/forecast-view'
import { bestMethod, usedErrorPct } from '@/lib/forecast/goodness'
import { forecastWords, goodnessWords } from '@/lib/forecast/goodness-words'
import { hourStrip } from '@/lib/forecast/hour-strip'
import type { RoomForecast } from '@/lib/forecast/room-forecast'
import { ok } from '@/lib/result'
import { settledTo } from '@/lib/rooms/air'
import { notThere, type Outcome } from './problem'

const HOUR_MS = 3_600_000
/** How far back it is told how good forecasts have been. */
const GOODNESS_DAYS = 60

/** The next 48 hours of a room, what they would be if it is lit, and how good such forecasts have been. */
export async function getRoomForecast(
  db: Kysely<Database>,
  member: SiteMember,
  roomCode: string,
  now: Date,
): Promise<Outcome<RoomForecastView>> {
  const { siteId } = member
  const room = await findRoom(db, siteId, roomCode)
  if (room === undefined) return notThere()
  const since = new Date(now.getTime() - GOODNESS_DAYS * 24 * HOUR_MS)
  const [rooms, sensors, forecasts, scores] = await Promise.all([
    listRoomRecords(db, siteId),
    listHangingSensors(db, siteId, room.id),
    findForecasts(db, siteId, new Set([room.id]), now),
    findLeadScores(db, siteId, since, now),
  ])
  const material = await loadCarryMaterial(db, member, [], [room.id], now)
  const forecast = forecasts.get(room.id)
  const leads = (scores.get(room.id) ?? []).map((score) => ({
    ...score,
    method: bestMethod([score], score.leadH),
    usedPct: usedErrorPct(score),
  }))
  const told = {
    hours: forecast === undefined ? [] : hoursOf(forecast),
    warmed: forecast === undefined ? null : warmedOf(forecast),
    usesOutdoors: forecast?.usesOutdoors ?? false,
    usesLastYear: forecast?.usesLastYear ?? false,
  }
  const goodness = { days: GOODNESS_DAYS, leads, words: goodnessWords(leads) }
  const readings = sensors.flatMap((sensor) => sensor.last ?? [])
  return ok({
    room: { id: room.code, name: room.name, mark: room.mark },
    madeAt: forecast === undefined ? null : new Date(forecast.madeAt).toISOString(),
    ...told,
    goodness,
    words: forecastWords(told),
    strip: hourStrip(material, {
      roomId: room.id,
      pieceIds: [],
      keepRoomId: assumedKeepRoom(rooms)?.id ?? null,
      timeZone: member.timeZone,
    }),
    ...settledTo(readings, room.kind, now),
  })
}

const hourAt = (forecast: RoomForecast, n: number): string =>
  new Date(forecast.madeAt + n * HOUR_MS).toISOString()

const hoursOf = (forecast: RoomForecast): RoomForecastView['hours'] =>
  forecast.emcPct.map((emcPct, n) => ({
    at: hourAt(forecast, n),
    temperatureC: forecast.temperatureC[n] ?? 0,
    humidityPct: forecast.humidityPct[n] ?? 0,
    emcPct,
    emcPctLow: forecast.emcPctLow[n] ?? emcPct,
    emcPctHigh: forecast.emcPctHigh[n] ?? emcPct,
    method: forecast.method[n] ?? 'record',
  }))

function warmedOf(forecast: RoomForecast): RoomForecastView['warmed'] {
  const { warmed } = forecast
  if (warmed === null) return null
  const { litAtTime, warmings, lengthHours } = warmed
  return {
    litAtTime,
    warmings,
    lengthHours,
    hours: warmed.emcPct.flatMap((emcPct, n) =>
      emcPct === null
        ? []
        : {
            at: hourAt(forecast, n),
            temperatureC: warmed.temperatureC[n] ?? 0,
            emcPct,
            emcPctLow: warmed.emcPctLow[n] ?? emcPct,
            emcPctHigh: warmed.emcPctHigh[n] ?? emcPct,
          },
    ),
  }
}
