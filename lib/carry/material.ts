import { HOUSE_SENSOR_DOUBT_PCT } from '@/lib/follow/doubt'
import { airsOf, type Followed, HOUR_MS, type RoomHours, type Stay, stepThrough } from '@/lib/follow/record'
import { type AirFrom, copyState, evenState, type WoodState } from '@/lib/follow/wood-state'
import type { RoomForecast } from '@/lib/forecast/room-forecast'
import type { Cover } from '@/lib/pieces/piece'
import type { RoomAir } from '@/lib/rooms/room'
import type { AirThere, CarryCheckInput, CutMc, PieceFacts } from './carry-check'
import { aheadDoubtPct, comingHours, forecastHours } from './forecast'
import { woodOfPiece } from './joint-defaults'
import { moistureOfToldAir, type ToldAir } from './told-air'

/** Everything that checks of carries look at, as loaded by `db/queries/carry-inputs.ts`: for any number of pieces. */
export interface CarryMaterial {
  now: Date
  pieces: ReadonlyMap<number, PieceMaterial>
  rooms: ReadonlyMap<number, RoomMaterial>
  /** The site's tub, where a sensor of its own was heard lately: its readings rule in the place of a reckoned tub. */
  tub?: { name: string; emcPct: number; temperatureC: number } | undefined
}

export interface PieceMaterial {
  /** Its public id. */
  code: string
  facts: PieceFacts
  /** Oldest first: those that reach into the hours that are loaded. */
  stays: readonly Stay[]
  /** Its wood as kept with it; null until it has been followed for the first time. */
  followed: Followed | null
  /** The room that it is kept to match: its own, or else the site's cupboard. */
  keepRoomId: number | null
  isKeepRoomAssumed: boolean
  /** Null: taken as its present MC. */
  cut: CutMc | null
  /** What the site has learned of how quickly such wood follows. */
  pace: { factor: number; logSpread: number }
}

export interface RoomMaterial {
  air: RoomAir
  /** The last days, by the hour's start in epoch ms. */
  hours: RoomHours
  /** Over its own last twelve months. */
  emcPctMean: number | null
  /** The newest forecast on record, if that is not too old; absent while none could be made. */
  forecast?: RoomForecast | null
}

/** How far back hours are loaded: enough to see a week's days alike, and to carry a piece on that was followed lately. */
export const hoursBackMs = 7 * 24 * HOUR_MS
/** Nobody stays longer than this in one check; beyond, the last day's mean holds. */
const forecastHoursMax = 30 * 24

export function baselineOf(material: CarryMaterial, piece: PieceMaterial): number | null {
  return piece.keepRoomId === null ? null : (material.rooms.get(piece.keepRoomId)?.emcPctMean ?? null)
}

/**
 * A piece's wood at a moment, carried on from what is kept with it.
 * @param at epoch ms; what lies ahead is taken as the room's coming hours
 * @returns null where nothing is known of the air that it was in
 */
export function woodAt(material: CarryMaterial, piece: PieceMaterial, at: number): WoodState | null {
  const { filter } = woodOfPiece(piece.facts)
  const { followed, pace } = piece
  if (followed === null) {
    const mcPct = baselineOf(material, piece)
    return mcPct === null ? null : evenState(filter, mcPct, 'closed')
  }
  if (followed.outState !== null && followed.outAtMs !== null && Math.abs(followed.outAtMs - at) < 1000)
    return followed.outState
  const state = copyState(followed.state)
  const now = material.now.getTime()
  const recorded = airsOf(piece.stays, (id) => material.rooms.get(id), followed.atMs, Math.min(at, now))
  stepThrough(filter, state, recorded, followed.atMs, Math.min(at, now), pace.factor)
  if (at > now) stepThrough(filter, state, comingAtRest(material, piece, now, at), now, at, pace.factor)
  return state
}

function comingAtRest(material: CarryMaterial, piece: PieceMaterial, from: number, until: number): AirFrom[] {
  const stay = piece.stays.at(-1)
  const room = stay === undefined ? undefined : material.rooms.get(stay.roomId)
  if (stay === undefined || room === undefined || room.air.kind === 'never') return []
  const hours = Math.min(forecastHoursMax, Math.ceil((until - from) / HOUR_MS))
  return comingAirs(material, room, room.air, from, hours).map((hour) => ({ ...hour, cover: stay.cover }))
}

/** The last hour's worth of air holds for good: the mean of the last day that anything is told of. */
function comingAirs(
  material: CarryMaterial,
  room: RoomMaterial,
  present: { emcPct: number; temperatureC: number },
  startsAt: number,
  hours: number,
): Omit<AirFrom, 'cover'>[] {
  const now = material.now.getTime()
  const { forecast } = room
  const told = { now, startsAt, hours, present }
  const coming = forecast
    ? forecastHours({ ...told, forecast })
    : comingHours({ ...told, record: recordOf(room) })
  const lastDay = forecast
    ? forecast.emcPct
        .map((emcPct, n) => ({ emcPct, temperatureC: forecast.temperatureC[n] ?? present.temperatureC }))
        .slice(-24)
    : coming.slice(-24)
  const mean = (of: 'emcPct' | 'temperatureC') =>
    lastDay.reduce((sum, hour) => sum + hour[of], 0) / lastDay.length
  return [
    ...coming.map((hour) => ({ ...hour, isKnown: true })),
    ...(lastDay.length === 0
      ? []
      : [
          {
            at: startsAt + coming.length * HOUR_MS,
            emcPct: mean('emcPct'),
            temperatureC: mean('temperatureC'),
            isKnown: true,
          },
        ]),
  ]
}

const recordOf = (room: RoomMaterial) => [...room.hours].map(([at, air]) => ({ at, ...air }))

/** The air of a room at a moment to come; undefined where none is to be told of it. */
export function airOfHour(
  material: CarryMaterial,
  roomId: number,
  at: number,
): { emcPct: number; temperatureC: number } | undefined {
  const room = material.rooms.get(roomId)
  return room === undefined || room.air.kind === 'never'
    ? undefined
    : comingAirs(material, room, room.air, at, 1)[0]
}

/** How far the air there may be out against the air that the piece was followed by, ± % MC: sensors, and hours to come. */
function airDoubtPct(room: RoomMaterial | undefined, now: number, startsAt: number, stayMs: number): number {
  if (room === undefined || room.air.kind === 'never') return 0
  const forecast = room.forecast ?? null
  const aheadPct = aheadDoubtPct({
    now,
    startsAt,
    stayMs,
    forecast,
    record: forecast === null ? recordOf(room) : [],
  })
  return Math.hypot(room.air.emcDoubtPct, HOUSE_SENSOR_DOUBT_PCT, aheadPct)
}

export function airThere(air: RoomAir | undefined): AirThere {
  if (air === undefined || air.kind === 'never') return { kind: 'never' }
  const { kind, temperatureC, humidityPct, emcPct } = air
  return { kind, at: new Date(air.at).getTime(), emcPct, temperatureC, humidityPct }
}

export interface CarryAsked {
  pieceId: number
  toRoomId: number
  startsAt: Date
  stayMinutes: number
  cover: Cover
}
/** To a place that is no room of the site, in air as told. */
export type ToldCarryAsked = Omit<CarryAsked, 'toRoomId'> & { toAir: ToldAir }

/** The input of one piece's check; `undefined` for a piece that was not loaded. */
export function carryCheckInput(
  material: CarryMaterial,
  asked: CarryAsked | ToldCarryAsked,
): CarryCheckInput | undefined {
  const piece = material.pieces.get(asked.pieceId)
  if (piece === undefined) return undefined
  const startsAt = asked.startsAt.getTime()
  return {
    now: material.now.getTime(),
    piece: piece.facts,
    start: woodAt(material, piece, startsAt),
    cut: piece.cut,
    ...('toAir' in asked ? toldThere(material, asked) : roomThere(material, piece, asked)),
    pace: piece.pace,
    startsAt,
    stayMinutes: asked.stayMinutes,
    cover: asked.cover,
    tub: material.tub,
  }
}

type There = Pick<CarryCheckInput, 'there' | 'airs' | 'airDoubtPct'>

function roomThere(material: CarryMaterial, piece: PieceMaterial, asked: CarryAsked): There {
  const room = material.rooms.get(asked.toRoomId)
  const now = material.now.getTime()
  const there = airThere(room?.air)
  return {
    there,
    airs: room !== undefined && there.kind === 'fresh' ? airsOfStay(material, piece, room, there, asked) : [],
    airDoubtPct: airDoubtPct(room, now, asked.startsAt.getTime(), asked.stayMinutes * 60_000),
  }
}

/** Air as told stays as told: nobody knows its hours. */
function toldThere(material: CarryMaterial, { toAir, startsAt, cover }: ToldCarryAsked): There {
  const { temperatureC, humidityPct } = toAir
  const { emcPct, emcDoubtPct } = moistureOfToldAir(toAir)
  const air = { at: startsAt.getTime(), emcPct, temperatureC, isKnown: true }
  return {
    there: { kind: 'told', emcPct, temperatureC, humidityPct },
    airs: [inCover(material, air, cover)],
    airDoubtPct: Math.hypot(emcDoubtPct, HOUSE_SENSOR_DOUBT_PCT),
  }
}

/** Air to come as a piece meets it in a cover: in a tub that is read, the tub's own. */
const inCover = (material: CarryMaterial, air: Omit<AirFrom, 'cover'>, cover: Cover): AirFrom =>
  cover === 'tub' && material.tub !== undefined
    ? { ...air, emcPct: material.tub.emcPct, cover: 'closed' }
    : { ...air, cover }

/** The room that a piece comes back to: where it is, or for one that is out, where it was before; else its keep room. */
function homeRoomId(piece: PieceMaterial, asked: CarryAsked | ToldCarryAsked): number | null {
  const toRoomId = 'toAir' in asked ? null : asked.toRoomId
  return piece.stays.findLast((stay) => stay.roomId !== toRoomId)?.roomId ?? piece.keepRoomId
}

/**
 * As `carryCheckInput`, with the air of the room that the piece comes home to, from the start of the stay on. Its parts
 * lie side by side there, as a lid that is to be judged should.
 */
export function carryThereAndBack(
  material: CarryMaterial,
  asked: CarryAsked | ToldCarryAsked,
): CarryCheckInput | undefined {
  const input = carryCheckInput(material, asked)
  const piece = material.pieces.get(asked.pieceId)
  const roomId = piece === undefined ? null : homeRoomId(piece, asked)
  const room = roomId === null ? undefined : material.rooms.get(roomId)
  if (input === undefined || roomId === null || room === undefined || room.air.kind === 'never') return input
  const now = material.now.getTime()
  const atHome = [{ roomId, fromAt: asked.startsAt, toAt: null, cover: 'open' as const }]
  const recorded = airsOf(atHome, (id) => material.rooms.get(id), input.startsAt, now)
  const hours = Math.min(forecastHoursMax, Math.max(72, Math.ceil(asked.stayMinutes / 60) + 48))
  const coming = comingAirs(material, room, room.air, Math.max(input.startsAt, now), hours)
  return { ...input, home: [...recorded, ...coming.map((hour) => ({ ...hour, cover: 'open' as const }))] }
}

/** The air of a stay: what was recorded since it went, and what is to come, in the cover asked about. */
function airsOfStay(
  material: CarryMaterial,
  piece: PieceMaterial,
  room: RoomMaterial,
  there: { emcPct: number; temperatureC: number },
  asked: CarryAsked,
): AirFrom[] {
  const now = material.now.getTime()
  const startsAt = asked.startsAt.getTime()
  const recorded = airsOf(piece.stays, (id) => material.rooms.get(id), startsAt, now)
  const stayHours = Math.ceil(asked.stayMinutes / 60)
  const hours = Math.min(forecastHoursMax, Math.max(72, stayHours + 48))
  const coming = comingAirs(material, room, there, Math.max(startsAt, now), hours)
  return [...recorded, ...coming.map((hour) => inCover(material, hour, asked.cover))]
}
