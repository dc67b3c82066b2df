import { formatHumidity } from '@/lib/format/figures'
import { heldSpans, type Span } from '../hold'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import { humidityHysteresisPct } from '../policy'
import { choiceOf, isInScope, type ValuesOf } from '../rule-settings'
import type { NoticeRoom } from '../surroundings'
import { backToNormal, daySamples, eachRoom, levelBelow, lookBackDays, roomPart } from './room-rule'

type Values = ValuesOf<'too-dry'>

/** Air so dry that green or resting wood may check in it. */
export function tooDry(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values } = choiceOf(inputs.rules, 'too-dry')
  return eachRoom(
    inputs,
    'too-dry',
    (room) => isInScope(values.rooms, room.code, room.hasRestingWood),
    (room) =>
      roomPart(now, state, inputs, {
        rule: 'too-dry',
        room,
        spans: drySpans(room, values, lookBackDays),
        told: () => ({
          mark: 'keep-short',
          title: `${room.name} is very dry: ${formatHumidity(room.days.at(-1)?.humidityPct ?? 0)}.`,
          body: 'Green and resting wood may check in such air. Seal the ends, shut it in a bag or a box with its own damp, or move it to a cooler room.',
        }),
        over: backToNormal(room, 'no longer so dry'),
      }),
  )
}

export const drySpans = (room: NoticeRoom, values: Values, lookBack: number): Span[] =>
  heldSpans(
    daySamples(room, lookBack, (index) => {
      const day = room.days[index]
      return (
        day && {
          level: levelBelow(day.humidityPct, values.rh, humidityHysteresisPct),
          figure: day.humidityPct,
        }
      )
    }),
    { over: Math.ceil(values.days), clear: 1 },
  )
