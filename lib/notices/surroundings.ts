import type { RoomKind } from '@/lib/rooms/room'
import type { ShopUse } from './shop-used'

/** What the rules about rooms, pieces at rest and sensors look at, beside what is out and planned. */
export interface Surroundings {
  rooms: readonly NoticeRoom[]
  boxes: readonly RestingBox[]
  blanks: readonly NoticeBlank[]
  strips: readonly NoticeStrip[]
  refused: readonly RefusedCount[]
  tubs: readonly NoticeTub[]
  evening: EveningFacts
}

/** A room's day: means over the whole of it, each sensor counted once. */
export interface RoomDay {
  dayOn: string
  /** When it began and ended by the clocks of the site, epoch ms: 23 to 25 h apart. */
  at: number
  endsAt: number
  temperatureC: number
  humidityPct: number
  emcPct: number
}

export interface RoomHour {
  /** Its start, epoch ms. */
  at: number
  temperatureC: number
  humidityPct: number
}

export interface NoticeRoom {
  code: string
  name: string
  kind: RoomKind
  keepsDryWork: boolean
  /** Pieces are kept to match it. */
  isKeepRoom: boolean
  /** A blank or a roughed piece rests in it. */
  hasRestingWood: boolean
  /** Oldest first, without today; days without a reading are left out. */
  days: readonly RoomDay[]
  /** The last days by the hour, oldest first, without the hour that runs. */
  hours: readonly RoomHour[]
}

/** A finished box that stands in a room, with a joint that can be worked out. */
export interface RestingBox {
  code: string
  number: string
  roomCode: string
  roomName: string
  /** Share of its allowance that is used at a quarter turn, by the middle of the model: 0 and up, may pass 1. */
  used: number
}

export interface NoticeBlank {
  code: string
  number: string
  roomCode: string
  /** Opens anew with each series of weights. */
  seriesKey: string
  isReady: boolean
  /** Only because the maker lets weights alone decide. */
  isByWeightAlone: boolean
  /** Epoch ms. */
  weighingDueAt: number
}

export type StripKind = 'fit' | 'tolerable' | 'unfit' | 'fit-if-lit' | 'unknown'

/** The coming hours of a shop, by its forecast. */
export interface NoticeStrip {
  roomCode: string
  roomName: string
  cells: readonly { at: number; kind: StripKind }[]
}

export interface RefusedCount {
  sensorCode: string
  sensorName: string
  today: number
  lastHour: number
  /** It sent such messages the day before as well. */
  isOldNews: boolean
}

export interface NoticeTub {
  roomCode: string
  roomName: string
  /** The tub's readings of the last hour and a bit, oldest first. */
  readings: readonly { at: number; temperatureC: number }[]
  /** Present air, °C; null where it is not known. */
  shopC: number | null
  houseC: number | null
  /** Its own mean of the last days, °C: where it stands as a rule. */
  usualC: number | null
  /** A carry with this cover is out. */
  isLoggedOut: boolean
}

export interface EveningFacts {
  shopUse: ShopUse['why']
  /** Somebody has said today that nothing else is out. */
  isAnswered: boolean
}
