import { formatHumidity } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { mouldCautionHumidityPct } from '@/lib/notices/policy'
import type { Room } from '@/lib/rooms/room'
import type { SensorStateWord } from '@/lib/sensors/sensor'
import type { NowView } from './now-view'

type Need = NowView['needs'][number]

export interface SensorForNeeds {
  id: string
  name: string
  roomName: string | null
  state: SensorStateWord
  heardAt: Date | null
  createdAt: Date
  clock: 'right' | 'not-set' | 'ahead'
}

/** A sensor that was set up this long ago and never spoke has a wrong setting. A guess. */
const firstWordMs = 30 * 60_000

/** What wants somebody's hand, besides what is out or planned. */
export function needs(
  input: { sensors: readonly SensorForNeeds[]; rooms: readonly Room[] },
  clock: { timeZone: string; now: Date },
): Need[] {
  return [
    ...input.sensors.flatMap((sensor) => sensorNeed(sensor, clock) ?? []),
    ...input.rooms.flatMap((room) => dampNeed(room) ?? []),
  ]
}

function sensorNeed(sensor: SensorForNeeds, clock: { timeZone: string; now: Date }): Need | undefined {
  const head = { id: `sensor-${sensor.id}`, link: `/sensors/${sensor.id}`, linkWords: 'Look at it' }
  const isNamedForRoom = sensor.roomName?.toLowerCase() === sensor.name.toLowerCase()
  const where = sensor.roomName === null || isNamedForRoom ? '' : ` in ${sensor.roomName}`
  if (sensor.state === 'silent' && sensor.heardAt !== null) {
    const since = formatMoment(sensor.heardAt, clock.timeZone, clock.now)
    return {
      ...head,
      mark: 'silent',
      title: `${sensor.name}${where} is silent`,
      body: `Last heard ${since}. Look at its power and its network. Coin cells: keep them from children.`,
    }
  }
  if (sensor.state === 'never-heard' && clock.now.getTime() - sensor.createdAt.getTime() > firstWordMs)
    return {
      ...head,
      mark: 'silent',
      title: `${sensor.name}${where} has not been heard yet`,
      body: 'Look at its address, its name and its secret.',
    }
  if (sensor.clock !== 'right' && sensor.state !== 'retired')
    return {
      ...head,
      mark: 'unknown',
      title: `The clock of ${sensor.name} is wrong`,
      body:
        sensor.clock === 'ahead'
          ? 'It is ahead by more than five minutes, so its readings can not be used. Set it.'
          : 'It was not set, so its readings can not be used. Set it.',
    }
  return undefined
}

function dampNeed(room: Room): Need | undefined {
  if (room.air.kind !== 'fresh' || room.air.humidityPct <= mouldCautionHumidityPct) return undefined
  if (room.pieces === 0 && !room.keepsDryWork) return undefined
  return {
    id: `room-${room.id}`,
    mark: 'unknown',
    title: `${room.name} is at ${formatHumidity(room.air.humidityPct)}`,
    body: 'Over about 80 % RH for long, mould can grow: let air through, or move wood out.',
    link: `/rooms/${room.id}`,
    linkWords: 'Look at the room',
  }
}
