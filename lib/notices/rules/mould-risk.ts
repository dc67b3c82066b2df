import { humidityAfterTemperatureChangePct } from '@/lib/air/humidity'
import { formatHumidity } from '@/lib/format/figures'
import { heldSpans, type Sample, type Span } from '../hold'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import {
  humidityHysteresisPct,
  mouldTellDays,
  mouldWarnC,
  mouldWarnDays,
  wallTemperatureFactor,
} from '../policy'
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
  meanOf,
  oncePerRecord,
  roomPart,
} from './room-rule'

type Values = ValuesOf<'mould-risk'>
const dayMs = 24 * 3_600_000

/**
 * Air in which mould may grow: the mean RH of a week, or surfaces over 30 days (ASHRAE 160-2009). Rooms that
 * keep no dry work are spoken of once a season.
 */
export function mouldRisk(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values } = choiceOf(inputs.rules, 'mould-risk')
  const rooms = inputs.surroundings?.rooms ?? []
  const outside = rooms.find(({ kind }) => kind === 'outdoor')?.days
  return eachRoom(
    inputs,
    'mould-risk',
    (room) => room.kind !== 'outdoor',
    (room) => {
      const samples = lately(
        room,
        values,
        () => mouldSamples(room, values, lookBackDays, outdoorDays(rooms)),
        outside,
      )
      const isWatched = isInScope(values.rooms, room.code, room.keepsDryWork)
      return roomPart(now, state, inputs, {
        rule: 'mould-risk',
        room,
        spans: heldSpans(samples, mouldHold),
        ...(isWatched ? {} : { atMostEveryMs: values.elsewhereDays * dayMs }),
        told: () => words(room, samples.at(-1)),
        over: backToNormal(room, 'dry enough that mould hardly grows'),
      })
    },
  )
}

/** The means are long already. */
const mouldHold = { over: 1, clear: 1 }

export const mouldSpans = (
  room: NoticeRoom,
  values: Values,
  lookBack: number,
  rooms: readonly NoticeRoom[],
): Span[] => heldSpans(mouldSamples(room, values, lookBack, outdoorDays(rooms)), mouldHold)

const outdoorDays = (rooms: readonly NoticeRoom[]): ReadonlyMap<string, RoomDay> =>
  new Map((rooms.find(({ kind }) => kind === 'outdoor')?.days ?? []).map((day) => [day.dayOn, day]))

type MouldSample = DaySample & { isWarning: boolean }

const lately = oncePerRecord<MouldSample[]>()

function mouldSamples(
  room: NoticeRoom,
  values: Values,
  lookBack: number,
  outdoors: ReadonlyMap<string, RoomDay>,
): MouldSample[] {
  const warnings = new Set<string>()
  const samples = daySamples(room, lookBack, (index) => {
    const day = room.days[index]
    if (day === undefined) return undefined
    const week = daysBack(room, index, mouldTellDays)
    const month = daysBack(room, index, mouldWarnDays)
    const weekPct = week && meanOf(week.map(({ humidityPct }) => humidityPct))
    const surfacePct = month && meanOf(month.map((one) => surfaceHumidityPct(one, outdoors)))
    const isMild = month !== undefined && meanOf(month.map(({ temperatureC }) => temperatureC)) > mouldWarnC
    const levels: Sample['level'][] = [
      ...(weekPct === undefined ? [] : [levelAbove(weekPct, values.tellRh, humidityHysteresisPct)]),
      ...(surfacePct === undefined || !isMild
        ? []
        : [levelAbove(surfacePct, values.warnRh, humidityHysteresisPct)]),
    ]
    if (weekPct === undefined) return undefined
    if (surfacePct !== undefined && isMild && surfacePct > values.warnRh) warnings.add(day.dayOn)
    const level = levels.includes('over') ? 'over' : levels.includes('between') ? 'between' : 'clear'
    return { level, figure: weekPct }
  })
  return samples.map((sample) => ({ ...sample, isWarning: warnings.has(sample.day.dayOn) }))
}

/** The last days up to one of them, where nearly all are there. */
function daysBack(room: NoticeRoom, index: number, count: number): RoomDay[] | undefined {
  const last = room.days[index]
  const days = room.days
    .slice(Math.max(0, index - count + 1), index + 1)
    .filter((day) => last !== undefined && daysBetween(day, last) < count)
  return days.length < count * 0.8 ? undefined : days
}

/** RH at the inside of an outer wall; where no outdoor room is on record, the room's own. */
function surfaceHumidityPct(day: RoomDay, outdoors: ReadonlyMap<string, RoomDay>): number {
  const outside = outdoors.get(day.dayOn)
  if (outside === undefined || outside.temperatureC >= day.temperatureC) return day.humidityPct
  const surfaceC = day.temperatureC - (1 - wallTemperatureFactor) * (day.temperatureC - outside.temperatureC)
  return Math.min(100, humidityAfterTemperatureChangePct(day.humidityPct, day.temperatureC, surfaceC))
}

function words(room: NoticeRoom, last: MouldSample | undefined) {
  const isWarning = last?.isWarning ?? false
  return {
    mark: isWarning ? ('leave' as const) : ('keep-short' as const),
    ...(isWarning ? { urgency: 'soon' as const } : {}),
    title: `${room.name} stays damp enough for mould: ${formatHumidity(last?.figure ?? 0)} over a week.`,
    body: `${isWarning ? 'Its surfaces have been so for a month. ' : ''}Let air through, keep wood off the walls, or move it out. Look behind what stands there. Guidance on damp and mould: HSE, EPA and your own local body.`,
  }
}
