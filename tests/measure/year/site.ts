import type { CarryMaterial, PieceMaterial } from '@/lib/carry/material'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import type { YearCarry } from './maker'
import type { RoomRecord } from './record'
import type { YearScore } from './score'
import type { YearSensor } from './sensors'
import type { ShelfBox } from './shelf'
import type { ShopForecasts } from './shop-forecast'
import type { TrueSite } from './truth-box'

export const ROOMS = { cupboard: 1, shop: 2, outdoor: 3 } as const

/** A simulated site as it stands at one moment of its year. */
export interface SiteYear {
  readonly site: TrueSite
  readonly rooms: Readonly<Record<keyof typeof ROOMS, { record: RoomRecord; sensor: YearSensor }>>
  readonly forecasts: ShopForecasts
  readonly shelf: ShelfBox[]
  carries: YearCarry[]
  readonly score: YearScore
  /** Of the day that runs: carries that went or came, and whether somebody said that nothing else is out. */
  today: { dayOn: string; carries: number; isAnswered: boolean }
}

/** What the product's checks look at, made in memory as its loader makes it of the database. */
export function materialOf({ shelf, rooms, forecasts }: SiteYear, now: number): CarryMaterial {
  const at = new Date(now)
  return {
    now: at,
    pieces: new Map(
      shelf.map((box): [number, PieceMaterial] => [
        box.id,
        {
          code: box.code,
          facts: box.facts,
          stays: box.stays,
          followed: box.followed,
          keepRoomId: ROOMS.cupboard,
          isKeepRoomAssumed: false,
          cut: box.cut,
          pace: UNLEARNED_PACE,
        },
      ]),
    ),
    rooms: new Map([
      [ROOMS.cupboard, rooms.cupboard.record.material(at)],
      [ROOMS.shop, { ...rooms.shop.record.material(at), forecast: forecasts.newest(now) }],
    ]),
  }
}
