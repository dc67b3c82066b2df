import type { Cover } from '@/lib/pieces/piece'
import type { Role } from '@/lib/sites/permissions'
import type { RoomKey } from './place'

/** When, as seen from now: some minutes off, or a time of day some days off in the place's own zone. */
export type Moment = { minutes: number } | { days: number; time: string }

export interface PlaceCarry {
  pieces: readonly string[]
  to: RoomKey
  cover: Cover
  planned: Moment
  stayMinutes: number
  /** Left out: not started. */
  started?: Moment
  /** Left out: still out, or still planned. */
  ended?: Moment
  isCalledOff?: boolean
  isAgainstAdvice?: boolean
  note?: string
  by: Role
}

const toShop = (carry: Omit<PlaceCarry, 'to'>): PlaceCarry => ({ to: 'shop', ...carry })

/** Out for so long already, when the demo is made. */
export const outMinutes = { nearlyDue: 75, fine: 40, overdue: 330 } as const

/** Oldest first. */
export const placeCarries: readonly PlaceCarry[] = [
  toShop({
    pieces: ['191', '195'],
    cover: 'open',
    planned: { days: -9, time: '10:00' },
    started: { days: -9, time: '10:05' },
    ended: { days: -9, time: '11:40' },
    stayMinutes: 120,
    by: 'maker',
  }),
  toShop({
    pieces: ['209'],
    cover: 'open',
    planned: { days: -6, time: '13:30' },
    started: { days: -6, time: '13:30' },
    ended: { days: -6, time: '18:10' },
    stayMinutes: 180,
    isAgainstAdvice: true,
    note: 'Foot turned off, took longer than thought.',
    by: 'maker',
  }),
  toShop({
    pieces: ['212', '204'],
    cover: 'tub',
    planned: { days: -3, time: '09:30' },
    started: { days: -3, time: '09:40' },
    ended: { days: -3, time: '15:20' },
    stayMinutes: 360,
    by: 'maker',
  }),
  toShop({
    pieces: ['193'],
    cover: 'lid-on',
    planned: { days: -2, time: '14:00' },
    isCalledOff: true,
    stayMinutes: 90,
    note: 'Too damp out there; done at the desk instead.',
    by: 'hand',
  }),
  toShop({
    pieces: ['203'],
    cover: 'lid-on',
    planned: { minutes: -outMinutes.overdue },
    started: { minutes: -outMinutes.overdue },
    stayMinutes: 150,
    by: 'maker',
  }),
  toShop({
    pieces: ['224'],
    cover: 'open',
    planned: { minutes: -95 },
    started: { minutes: -95 },
    ended: { minutes: -3 },
    stayMinutes: 120,
    by: 'hand',
  }),
  toShop({
    pieces: ['207'],
    cover: 'open',
    planned: { minutes: -outMinutes.nearlyDue },
    started: { minutes: -outMinutes.nearlyDue },
    stayMinutes: 120,
    by: 'maker',
  }),
  toShop({
    pieces: ['221'],
    cover: 'open',
    planned: { minutes: -outMinutes.fine },
    started: { minutes: -outMinutes.fine },
    stayMinutes: 180,
    by: 'maker',
  }),
  toShop({
    pieces: ['219', '214'],
    cover: 'open',
    planned: { minutes: 50 },
    stayMinutes: 180,
    note: 'Feet and finials.',
    by: 'maker',
  }),
  toShop({
    pieces: ['205'],
    cover: 'bagged',
    planned: { days: 1, time: '10:00' },
    stayMinutes: 120,
    by: 'maker',
  }),
]
