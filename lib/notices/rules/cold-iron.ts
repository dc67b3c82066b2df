import { dewPointC } from '@/lib/air/dew-point'
import { vapourPressurePa } from '@/lib/air/humidity'
import { formatTemperature } from '@/lib/format/figures'
import { heldSpans, type Sample, type Span } from '../hold'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import { coldIronClearK, wallTemperatureFactor } from '../policy'
import { choiceOf, isInScope, type ValuesOf } from '../rule-settings'
import type { NoticeRoom } from '../surroundings'
import { backToNormal, eachRoom, roomPart } from './room-rule'

type Values = ValuesOf<'cold-iron'>
const hourMs = 3_600_000

/** Cold iron in a shop that is about to be wet by its own air: tools rust, and wood on them takes it up. */
export function coldIron(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values } = choiceOf(inputs.rules, 'cold-iron')
  const rooms = inputs.surroundings?.rooms ?? []
  return eachRoom(
    inputs,
    'cold-iron',
    (room) => isInScope(values.rooms, room.code, room.kind === 'shop'),
    (room) =>
      roomPart(now, state, inputs, {
        rule: 'cold-iron',
        room,
        spans: coldIronSpans(room, values, rooms),
        atMostEveryMs: values.everyDays * 24 * hourMs,
        told: () => words(room),
        over: backToNormal(room, 'its iron is well above the dew point'),
      }),
  )
}

/** Two hours to begin; a whole clear day to be over, or every morning would be told anew. */
const hold = { over: 2, clear: 24 }

/** @param rooms the others, for the air outdoors */
export function coldIronSpans(room: NoticeRoom, values: Values, rooms: readonly NoticeRoom[]): Span[] {
  const outdoors = new Map(
    (rooms.find(({ kind }) => kind === 'outdoor')?.hours ?? []).map((hour) => [hour.at, hour.temperatureC]),
  )
  const nights = nightLows(room.hours)
  const samples = room.hours.flatMap((hour, index): Sample[] => {
    const dew = dewPointC(vapourPressurePa(hour.temperatureC, hour.humidityPct))
    if (!dew.ok) return []
    const outsideC = outdoors.get(hour.at)
    const surfaceC =
      outsideC === undefined
        ? nights[index]
        : Math.min(
            hour.temperatureC,
            hour.temperatureC - (1 - wallTemperatureFactor) * (hour.temperatureC - outsideC),
          )
    if (surfaceC === undefined) return []
    const above = surfaceC - dew.value
    const level =
      above <= values.marginK ? 'over' : above >= values.marginK + coldIronClearK ? 'clear' : 'between'
    return [{ at: hour.at, endsAt: hour.at + hourMs, level }]
  })
  return heldSpans(samples, hold)
}

/** Iron keeps the cold of the night: the least of the twelve hours before. Half a day of record, or nothing is said. */
function nightLows(hours: NoticeRoom['hours']): (number | undefined)[] {
  return hours.map((hour, index) => {
    const before = hours
      .slice(Math.max(0, index - 12), index + 1)
      .filter(({ at }) => at >= hour.at - 12 * hourMs)
    return before.length < 6 ? undefined : Math.min(...before.map(({ temperatureC }) => temperatureC))
  })
}

function words(room: NoticeRoom) {
  const last = room.hours.at(-1)
  const dew = last && dewPointC(vapourPressurePa(last.temperatureC, last.humidityPct))
  const at = dew?.ok === true ? ` The dew point there is ${formatTemperature(dew.value)}.` : ''
  return {
    mark: 'keep-short' as const,
    urgency: 'soon' as const,
    title: `Cold iron in ${room.name} may be getting wet.`,
    body: `Its surfaces are near the dew point of the air.${at} Wipe and oil the bed and the tools, and lay no wood on them. Warm slowly and let the damp out; a heater without a flue wets the air and gives off carbon monoxide.`,
  }
}
