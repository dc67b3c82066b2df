import { formatEmc, formatEmcFigure, formatPoints } from '@/lib/format/figures'
import { heldSpans, type Span } from '../hold'
import type { NoticeInputs, NoticeState, RulePart } from '../inputs'
import { ownMiddleDaysMin, roomHysteresisPct } from '../policy'
import { choiceOf, isInScope, type ValuesOf } from '../rule-settings'
import type { NoticeRoom } from '../surroundings'
import {
  backToNormal,
  daysBetween,
  type DaySample,
  daySamples,
  eachRoom,
  levelAbove,
  levelBelow,
  lookBackDays,
  oncePerRecord,
  quantileOf,
  roomPart,
} from './room-rule'

const yearDays = 365

const lately = oncePerRecord<DaySample[]>()

/** A keep room that stays out of its own band: told once, and once more when it is well inside again. */
export function keepRoomBand(now: number, state: NoticeState, inputs: NoticeInputs): RulePart {
  const { values } = choiceOf(inputs.rules, 'keep-room-band')
  return eachRoom(
    inputs,
    'keep-room-band',
    (room) => isInScope(values.rooms, room.code, room.isKeepRoom),
    (room) => {
      const samples = lately(room, values, () => bandSamples(room, values, lookBackDays))
      return roomPart(now, state, inputs, {
        rule: 'keep-room-band',
        room,
        spans: heldSpans(samples, bandHold(values)),
        told: (span) => words(room, samples, span),
        over: backToNormal(room, 'inside its band again'),
      })
    },
  )
}

type Values = ValuesOf<'keep-room-band'>
const bandHold = (values: Values) => ({ over: Math.ceil(values.days), clear: 1 })

export const bandSpans = (room: NoticeRoom, values: Values, lookBack: number): Span[] =>
  heldSpans(bandSamples(room, values, lookBack), bandHold(values))

/** Each day against the band of the twelve months before it, or the common band where those hold too few days. */
function bandSamples(room: NoticeRoom, values: Values, lookBack: number): DaySample[] {
  const { days } = room
  return daySamples(room, lookBack, (index) => {
    const day = days[index]
    if (day === undefined) return undefined
    const band = bandOf(room, index, values)
    const above = levelAbove(day.emcPct, band.high, roomHysteresisPct)
    const below = levelBelow(day.emcPct, band.low, roomHysteresisPct)
    const isOver = above === 'over' || below === 'over'
    const level = isOver ? 'over' : above === 'clear' && below === 'clear' ? 'clear' : 'between'
    return { level, figure: day.emcPct > band.high ? band.high : band.low }
  })
}

function bandOf(room: NoticeRoom, index: number, values: Values): { low: number; high: number } {
  const today = room.days[index]
  const year = room.days
    .slice(0, index)
    .filter((day) => today !== undefined && daysBetween(day, today) <= yearDays)
  if (year.length < ownMiddleDaysMin) return { low: values.lowPct, high: values.highPct }
  const middle = quantileOf(
    year.map(({ emcPct }) => emcPct),
    0.5,
  )
  return { low: middle - values.halfPoints, high: middle + values.halfPoints }
}

function words(room: NoticeRoom, samples: readonly DaySample[], span: Span) {
  const last = samples.findLast((sample) => sample.endsAt <= span.seenUntil)
  const isDamp = last !== undefined && last.day.emcPct > last.figure
  const by = last === undefined ? '' : formatPoints(last.day.emcPct - last.figure)
  return {
    mark: 'keep-short' as const,
    title: `${room.name} is ${isDamp ? 'damper' : 'drier'} than it keeps its pieces: ${formatEmc(last?.day.emcPct ?? 0)}.`,
    body: `That is ${by} ${isDamp ? 'above' : 'below'} its band, which ${isDamp ? 'ends' : 'begins'} at ${formatEmcFigure(last?.figure ?? 0)} % MC. Boxes kept there drift with it. ${isDamp ? 'Let it dry' : 'Let some damp in'}, or move them to a room that holds.`,
  }
}
