import { formatEmc, formatPoints } from '@/lib/format/figures'
import { heldSpans, type Span } from '../hold'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import { normalQuantile, roomHysteresisPct, sameWeeksDays, sameWeeksDaysMin } from '../policy'
import { choiceOf, isInScope, type ValuesOf } from '../rule-settings'
import type { NoticeRoom, RoomDay } from '../surroundings'
import {
  backToNormal,
  daysBetween,
  type DaySample,
  daySamples,
  eachRoom,
  levelAbove,
  lookBackDays,
  oncePerRecord,
  quantileOf,
  roomPart,
} from './room-rule'

type Values = ValuesOf<'damper-than-normal'>

const lately = oncePerRecord<DaySample[]>()

/** A room that is damper than it was in the same weeks of earlier years. */
export function damperThanNormal(
  now: number,
  state: NoticeState,
  inputs: NoticeInputs,
  alreadyTold: ReadonlySet<string>,
): RulePart {
  const { values } = choiceOf(inputs.rules, 'damper-than-normal')
  return eachRoom(
    inputs,
    'damper-than-normal',
    // A keep room out of its band says the same thing already.
    (room) => isInScope(values.rooms, room.code, isUsual(room)) && !alreadyTold.has(room.code),
    (room) => {
      const samples = lately(room, values, () => damperSamples(room, values, lookBackDays))
      return roomPart(now, state, inputs, {
        rule: 'damper-than-normal',
        room,
        spans: heldSpans(samples, damperHold(values)),
        told: (span) => words(room, samples, span),
        over: backToNormal(room, 'no longer damper than its own normal'),
      })
    },
  )
}

export const isUsual = (room: NoticeRoom): boolean => room.isKeepRoom || room.hasRestingWood

const damperHold = (values: Values) => ({ over: Math.ceil(values.days), clear: 2 })

export const damperSpans = (room: NoticeRoom, values: Values, lookBack: number): Span[] =>
  heldSpans(damperSamples(room, values, lookBack), damperHold(values))

function damperSamples(room: NoticeRoom, values: Values, lookBack: number): DaySample[] {
  return daySamples(room, lookBack, (index) => {
    const day = room.days[index]
    const normal = day && normalOf(room, day)
    if (day === undefined || normal === undefined) return undefined
    return {
      level: levelAbove(day.emcPct, normal + values.points, roomHysteresisPct),
      figure: normal,
    }
  })
}

/** Nine in ten days of the same weeks of earlier years, by the record alone: no season has a name here. */
function normalOf(room: NoticeRoom, today: RoomDay): number | undefined {
  const same = room.days.filter((day) => {
    const back = daysBetween(day, today)
    const years = Math.round(back / 365.25)
    return years >= 1 && Math.abs(back - years * 365.25) <= sameWeeksDays
  })
  return same.length < sameWeeksDaysMin
    ? undefined
    : quantileOf(
        same.map(({ emcPct }) => emcPct),
        normalQuantile,
      )
}

function words(room: NoticeRoom, samples: readonly DaySample[], span: Span) {
  const last = samples.findLast((sample) => sample.endsAt <= span.seenUntil)
  const over = last === undefined ? '' : formatPoints(last.day.emcPct - last.figure)
  return {
    mark: 'keep-short' as const,
    title: `${room.name} is damper than its own normal: ${formatEmc(last?.day.emcPct ?? 0)}.`,
    body: `That is ${over} above nine in ten days of the same weeks of earlier years. Something has changed: a window, a leak, washing, or a heater that is off.`,
  }
}
