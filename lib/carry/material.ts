import type { Cover, PlaceCover } from '@/lib/pieces/piece'
import type { RoomAir } from '@/lib/rooms/room'
import type { AirThere, CarryCheckInput, HourOfAir, PieceFacts } from './carry-check'
import { comingHours } from './forecast'

/** Everything that checks of carries look at, as loaded by `db/queries/carry-inputs.ts`: for any number of pieces. */
export interface CarryMaterial {
  now: Date
  pieces: ReadonlyMap<number, PieceMaterial>
  rooms: ReadonlyMap<number, RoomMaterial>
}

export interface PieceMaterial {
  /** Its public id. */
  code: string
  facts: PieceFacts
  /** Oldest first, as far as the history goes back. */
  places: readonly { roomId: number; fromAt: Date; toAt: Date | null; cover: PlaceCover }[]
  /** The room that it is kept to match: its own, or else the site's cupboard. */
  keepRoomId: number | null
  isKeepRoomAssumed: boolean
  /** Null: taken as its present MC. */
  cutMcPct: number | null
}

export interface RoomMaterial {
  air: RoomAir
  /** By the hour's start, epoch ms; oldest first. Hours without a reading are left out. */
  hours: ReadonlyMap<number, { emcPct: number; temperatureC: number }>
  /** Over its own last twelve months. */
  emcPctMean: number | null
}

const hourMs = 3_600_000
/** How far back the wood remembers: a thin ring has forgotten sooner, a blank is not judged. */
export const historyMs = 60 * 24 * hourMs
/** Nobody stays longer than this in one check; beyond, the day repeats itself. */
const forecastHoursMax = 30 * 24

/**
 * The air that a piece was in, hour by hour, each hour cut where the piece changed its place or its cover. An hour of a
 * room without a reading is a gap.
 */
export function historyOfPiece(material: CarryMaterial, piece: PieceMaterial): HourOfAir[] {
  const until = material.now.getTime()
  const since = Math.floor((until - historyMs) / hourMs) * hourMs
  return piece.places.flatMap((place) => {
    const hours: HourOfAir[] = []
    const record = material.rooms.get(place.roomId)?.hours
    const end = Math.min(place.toAt?.getTime() ?? until, until)
    let at = Math.max(place.fromAt.getTime(), since)
    while (at < end) {
      const hourAt = Math.floor(at / hourMs) * hourMs
      const air = record?.get(hourAt)
      hours.push({
        at,
        emcPct: air?.emcPct ?? null,
        temperatureC: air?.temperatureC ?? null,
        cover: place.cover,
      })
      at = hourAt + hourMs
    }
    return hours
  })
}

export function baselineOf(material: CarryMaterial, piece: PieceMaterial): number | null {
  return piece.keepRoomId === null ? null : (material.rooms.get(piece.keepRoomId)?.emcPctMean ?? null)
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

/** The input of one piece's check; `undefined` for a piece that was not loaded. */
export function carryCheckInput(material: CarryMaterial, asked: CarryAsked): CarryCheckInput | undefined {
  const piece = material.pieces.get(asked.pieceId)
  if (piece === undefined) return undefined
  const room = material.rooms.get(asked.toRoomId)
  const now = material.now.getTime()
  const there = airThere(room?.air)
  const startsAt = asked.startsAt.getTime()
  const lastAt = startsAt + asked.stayMinutes * 60_000
  const hours = Math.min(forecastHoursMax, Math.max(72, Math.ceil((lastAt - startsAt) / hourMs) + 48))
  return {
    now,
    piece: piece.facts,
    history: historyOfPiece(material, piece),
    baselineEmcPct: baselineOf(material, piece),
    cutMcPct: piece.cutMcPct,
    there,
    forecast:
      there.kind === 'fresh'
        ? comingHours({
            now,
            startsAt: Math.max(startsAt, now),
            hours,
            present: there,
            record: [...(room?.hours ?? [])].map(([at, air]) => ({ at, ...air })),
          })
        : [],
    startsAt,
    stayMinutes: asked.stayMinutes,
    cover: asked.cover,
  }
}
