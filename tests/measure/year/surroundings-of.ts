import { jointOfPiece } from '@/lib/carry/joint-defaults'
import { type CarryMaterial, woodAt } from '@/lib/carry/material'
import { usedOf } from '@/lib/carry/used-at-end'
import { startOfDayOf } from '@/lib/climate/days'
import type { Rule } from '@/lib/notices/notice'
import { shopWasUsed } from '@/lib/notices/shop-used'
import type { NoticeRoom, RestingBox, Surroundings } from '@/lib/notices/surroundings'
import type { RoomRecord } from './record'
import type { ShelfBox } from './shelf'

type Rooms = Readonly<Record<'cupboard' | 'shop' | 'outdoor', { readonly record: RoomRecord }>>

export interface Yard {
  readonly rooms: Rooms
  readonly shelf: readonly ShelfBox[]
  /** Carries that went out or came back today. */
  readonly carriesToday: number
  /** Somebody has said today that nothing else is out. */
  readonly isAnswered: boolean
}

const HOUR_MS = 3_600_000
const HOURS_BACK = 7 * 24

/** Rules that go by days and by resting pieces: looked at once a day, where the product looks each half minute. */
export const SLOW_RULES: ReadonlySet<string> = new Set<Rule>([
  'losing-fit',
  'keep-room-band',
  'damper-than-normal',
  'mould-risk',
  'too-dry',
  'cold-iron',
])
const SLOW_LOOK_MS = 8 * HOUR_MS
export const isSlowLook = (now: number): boolean => now % (24 * HOUR_MS) === SLOW_LOOK_MS

/**
 * What the rules about rooms and resting pieces look at, as the product's worker loads it; rooms and boxes are left out
 * but for the slow looks. There are no blanks, tubs or refused messages in the simulated year, and no strip of good hours.
 */
export function surroundingsOf(timeZone: string) {
  return (material: CarryMaterial, yard: Yard): Surroundings => {
    const now = material.now.getTime()
    const isSlow = isSlowLook(now)
    const dayStart = startOfDayOf(material.now, timeZone).getTime()
    const today = yard.rooms.shop.record.hours().slice(-25)
    const { why } = shopWasUsed([today.filter(({ at }) => at >= dayStart)], yard.carriesToday)
    return {
      rooms: isSlow ? roomsOf(yard.rooms, now) : [],
      boxes: isSlow ? boxesOf(material, yard.shelf) : [],
      blanks: [],
      strips: [],
      refused: [],
      tubs: [],
      evening: { shopUse: why, isAnswered: yard.isAnswered },
    }
  }
}

function roomsOf(rooms: Rooms, now: number): NoticeRoom[] {
  const roomOf = (key: keyof Rooms, name: string): NoticeRoom => ({
    code: key,
    name,
    kind: key,
    keepsDryWork: key === 'cupboard',
    isKeepRoom: key === 'cupboard',
    hasRestingWood: false,
    days: rooms[key].record.days().slice(0, -1),
    hours: rooms[key].record
      .hours()
      .slice(-HOURS_BACK - 1)
      .filter(({ at }) => at + HOUR_MS <= now),
  })
  return [roomOf('cupboard', 'Cupboard'), roomOf('shop', 'Shop'), roomOf('outdoor', 'Yard')]
}

function boxesOf(material: CarryMaterial, shelf: readonly ShelfBox[]): RestingBox[] {
  return shelf.flatMap((box) => {
    const own = material.pieces.get(box.id)
    const joint = jointOfPiece(box.facts)
    if (own === undefined || joint === undefined || box.stays.at(-1)?.cover !== 'closed') return []
    const wood = woodAt(material, own, material.now.getTime())
    if (wood === null) return []
    return {
      code: box.code,
      number: box.facts.number,
      roomCode: 'cupboard',
      roomName: 'Cupboard',
      used: usedOf(joint, wood, box.cut),
    }
  })
}
