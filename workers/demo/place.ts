import type { NewRoom } from '@/lib/rooms/room'
import type { DemoSensor } from '@/lib/sensors/demo-roster'
import { demoAccounts } from '@/lib/sites/demo'

/** The invented place. Nothing in it comes from a real person, firm or recording. */

export const placeName = 'Saltmarsh Yard'
export const placeTimeZone = 'Europe/London'
/** Which of all possible weathers this place has. */
export const placeSeed = 7
export const historyDays = 425

/** People go by what they are here, so that no name can be taken for somebody's. */
const accountNames: Record<(typeof demoAccounts)[number]['role'], string> = {
  owner: 'The owner',
  maker: 'The maker',
  hand: 'The house',
  onlooker: 'The gallery',
}

export const placeAccounts = demoAccounts.map(({ email, role }) => ({
  email,
  role,
  name: accountNames[role],
  onHouseList: role === 'hand',
}))

export type RoomKey = 'cupboard' | 'study' | 'kitchen' | 'shop' | 'store' | 'tub'

/** In the order of the room marks: square, circle, triangle, diamond, cross, open square. */
export const placeRooms: readonly (NewRoom & { key: RoomKey })[] = [
  {
    key: 'cupboard',
    name: 'Landing cupboard',
    kind: 'cupboard',
    isShared: true,
    keepsDryWork: true,
    note: 'Finished boxes and pairs at rest. The hot pipe runs behind the left-hand wall.',
  },
  { key: 'study', name: 'Study', kind: 'house', isShared: true, keepsDryWork: true, note: '' },
  { key: 'kitchen', name: 'Kitchen', kind: 'house', isShared: false, keepsDryWork: false, note: '' },
  {
    key: 'shop',
    name: 'Shop',
    kind: 'shop',
    isShared: false,
    keepsDryWork: false,
    note: 'Brick, across the yard. The stove is lit on working days when it is cold.',
  },
  { key: 'store', name: 'Timber store', kind: 'store', isShared: false, keepsDryWork: false, note: '' },
  {
    key: 'tub',
    name: 'Lidded tub',
    kind: 'tub',
    isShared: false,
    keepsDryWork: true,
    note: 'Stands in the shop with a kilo of offcuts that were dried in the house.',
  },
]

export interface PlaceSensor {
  model: string
  name: string
  room: RoomKey
  spot: string
  everyS: number
  habit: DemoSensor['habit']
  /** How long before now the history of this sensor ends. */
  endsMinutesAgo: number
  batteryPct: number
  /** Days before now on which it came, when that was after the beginning. */
  cameDaysAgo?: number
  /** It hung elsewhere before, and the simulated instrument that stood in for it there. */
  before?: { untilDaysAgo: number; room: RoomKey; spot: string; model: string }
  /** Stretches without readings, in days before now. */
  gaps?: readonly { fromDaysAgo: number; toDaysAgo: number }[]
}

const minutesADay = 24 * 60

export const placeSensors: readonly PlaceSensor[] = [
  sensor('cupboard-upper', 'Cupboard, upper shelf', 'cupboard', 'upper shelf, at the back', {
    batteryPct: 78,
  }),
  sensor('cupboard-lower', 'Cupboard, lower shelf', 'cupboard', 'lower shelf, away from the pipe', {
    batteryPct: 52,
    gaps: [{ fromDaysAgo: 131.3, toDaysAgo: 128.9 }],
  }),
  sensor('study', 'Study', 'study', 'on the bookcase', {
    batteryPct: 31,
    habit: 'drops-out',
    // The rest comes in from the sensor itself, late, as soon as it is switched on.
    endsMinutesAgo: 80,
  }),
  sensor('kitchen', 'Kitchen', 'kitchen', 'beside the door to the hall', { batteryPct: 88 }),
  sensor('shop-bench', 'Shop, bench', 'shop', 'over the bench, out of the dust', { batteryPct: 64 }),
  sensor('shop-door', 'Shop, by the door', 'shop', 'by the door, at shoulder height', {
    batteryPct: 93,
    gaps: [{ fromDaysAgo: 21.3, toDaysAgo: 19.5 }],
  }),
  sensor('shop-shelf', 'Shop, finishing shelf', 'shop', 'over the finishing shelf', {
    batteryPct: 47,
    everyS: 300,
    before: { untilDaysAgo: 150.4, room: 'study', spot: 'window sill', model: 'study' },
  }),
  sensor('store', 'Timber store', 'store', 'between the racks', {
    batteryPct: 4,
    habit: 'silent',
    endsMinutesAgo: 9.5 * 60,
  }),
  sensor('tub', 'Lidded tub', 'tub', 'under the lid', { batteryPct: 71, everyS: 300, cameDaysAgo: 340.2 }),
]

function sensor(
  model: string,
  name: string,
  room: RoomKey,
  spot: string,
  rest: Partial<PlaceSensor> & { batteryPct: number },
): PlaceSensor {
  return { model, name, room, spot, everyS: 60, habit: 'steady', endsMinutesAgo: 0, ...rest }
}

/** Whether a sensor was there and working at an instant so many minutes before now. */
export function wasWorking(of: PlaceSensor, minutesAgo: number): boolean {
  const daysAgo = minutesAgo / minutesADay
  if (minutesAgo < of.endsMinutesAgo) return false
  if (of.cameDaysAgo !== undefined && daysAgo > of.cameDaysAgo) return false
  return !(of.gaps ?? []).some((gap) => daysAgo <= gap.fromDaysAgo && daysAgo >= gap.toDaysAgo)
}
