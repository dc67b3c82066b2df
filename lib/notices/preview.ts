import { daysFrom } from '@/lib/climate/days'
import type { NoticeCarry, NoticeInputs } from './inputs'
import { silentAfterMs } from './policy'
import { coldIronSpans } from './rules/cold-iron'
import { damperSpans, isUsual } from './rules/damper-than-normal'
import { evening, eveningHours } from './rules/evening'
import { bandSpans } from './rules/keep-room-band'
import { mouldSpans } from './rules/mould-risk'
import { drySpans } from './rules/too-dry'
import type { Span } from './hold'
import { isInScope, type RuleBook, ruleForms, type ToldRule, valuesOf } from './rule-settings'
import type { EveningFacts, NoticeRoom } from './surroundings'

/** How far back a preview looks. */
export const previewDays = 90

/** What a rule is run over again: the record of the last 90 days, and what was told in them. */
export interface PreviewHistory {
  now: number
  site: NoticeInputs['site']
  rooms: readonly NoticeRoom[]
  silences: readonly {
    sensorName: string
    usualGapS: number | null
    fromAt: number
    untilAt: number | null
  }[]
  outings: readonly { number: string; outAt: number; backAt: number | null }[]
  /** Evenings of the last 90 days on which the shop had been used, by their day; others: not. */
  shopUse: ReadonlyMap<string, EveningFacts['shopUse']>
  /** Notices of this rule on record. */
  told: readonly { at: number; title: string }[]
}

export interface PreviewMoment {
  at: number
  /** Of what: a room, a sensor, or the words that were told. */
  of: string
}

export interface Preview {
  /** `record`: the rule as it would stand, run over the record. `told`: what it has told, whatever its settings. */
  by: 'record' | 'told'
  moments: PreviewMoment[]
}

/**
 * When a rule would have told something in the last 90 days, with other settings than it has: the same functions that
 * decide, run over the past. What can't be run again (verdicts, charges, forecasts) is counted from what was told.
 * @param settings SI, as stored; what is absent is as it comes
 */
export function previewRule(
  rule: ToldRule,
  settings: Readonly<Record<string, unknown>>,
  history: PreviewHistory,
): Preview {
  if (ruleForms[rule].replay === 'told')
    return { by: 'told', moments: history.told.map(({ at, title }) => ({ at, of: title })) }
  const from = history.now - previewDays * dayMs
  const moments = replayed(rule, settings, history)
    .filter(({ at }) => at >= from && at <= history.now)
    .toSorted((a, b) => a.at - b.at)
  return { by: 'record', moments }
}

const dayMs = 24 * 3_600_000

function replayed(
  rule: ToldRule,
  settings: Readonly<Record<string, unknown>>,
  history: PreviewHistory,
): PreviewMoment[] {
  const { rooms } = history
  const lookBack = previewDays + 1
  switch (rule) {
    case 'keep-room-band': {
      const values = valuesOf(rule, settings)
      return ofRooms(
        rooms,
        (room) => isInScope(values.rooms, room.code, room.isKeepRoom),
        (room) => bandSpans(room, values, lookBack),
      )
    }
    case 'damper-than-normal': {
      const values = valuesOf(rule, settings)
      return ofRooms(
        rooms,
        (room) => isInScope(values.rooms, room.code, isUsual(room)),
        (room) => damperSpans(room, values, lookBack),
      )
    }
    case 'too-dry': {
      const values = valuesOf(rule, settings)
      return ofRooms(
        rooms,
        (room) => isInScope(values.rooms, room.code, room.hasRestingWood),
        (room) => drySpans(room, values, lookBack),
      )
    }
    case 'mould-risk': {
      const values = valuesOf(rule, settings)
      const isWatched = (room: NoticeRoom) => isInScope(values.rooms, room.code, room.keepsDryWork)
      const spansOf = (room: NoticeRoom) => mouldSpans(room, values, lookBack, rooms)
      const indoors = (room: NoticeRoom) => room.kind !== 'outdoor'
      return [
        ...ofRooms(rooms, (room) => indoors(room) && isWatched(room), spansOf),
        ...ofRooms(rooms, (room) => indoors(room) && !isWatched(room), spansOf, values.elsewhereDays * dayMs),
      ]
    }
    case 'cold-iron': {
      const values = valuesOf(rule, settings)
      return ofRooms(
        rooms,
        (room) => isInScope(values.rooms, room.code, room.kind === 'shop'),
        (room) => coldIronSpans(room, values, rooms),
        values.everyDays * dayMs,
      )
    }
    case 'sensor-silent': {
      const { gaps, leastH } = valuesOf(rule, settings)
      return history.silences.flatMap(({ sensorName, usualGapS, fromAt, untilAt }) => {
        const at = fromAt + silentAfterMs(usualGapS, gaps, leastH * 3_600_000)
        return at < (untilAt ?? history.now) ? [{ at, of: sensorName }] : []
      })
    }
    default:
      return evenings(rule, settings, history)
  }
}

/** When each room's spans would have been told, no more often than asked. */
function ofRooms(
  rooms: readonly NoticeRoom[],
  isMeant: (room: NoticeRoom) => boolean,
  spansOf: (room: NoticeRoom) => Span[],
  atMostEveryMs = 0,
): PreviewMoment[] {
  return rooms.filter(isMeant).flatMap((room) => {
    let lastAt = -Infinity
    return spansOf(room).flatMap(({ heldAt, endedAt }) => {
      if (heldAt === null) return []
      // Told when it may be told again, if it lasts that long.
      const at = Math.max(heldAt, lastAt + atMostEveryMs)
      if (endedAt !== null && at >= endedAt) return []
      lastAt = at
      return [{ at, of: room.name }]
    })
  })
}

/** The evening rule itself, asked at each lock-up or last call of the last 90 days. */
function evenings(
  rule: ToldRule,
  settings: Readonly<Record<string, unknown>>,
  history: PreviewHistory,
): PreviewMoment[] {
  const rules: RuleBook = new Map([
    [
      'lock-up',
      { isOn: rule === 'lock-up', settings: rule === 'lock-up' ? valuesOf('lock-up', settings) : {} },
    ],
    [
      'last-call',
      { isOn: rule === 'last-call', settings: rule === 'last-call' ? valuesOf('last-call', settings) : {} },
    ],
  ])
  const seen = new Map<string, PreviewMoment>()
  for (let back = previewDays; back >= 0; back -= 1) {
    const hours = eveningHours(history.now - back * dayMs, { site: history.site, rules })
    const at = rule === 'lock-up' ? hours.lockUp : hours.lastCall
    if (at === null || at > history.now) continue
    const out = history.outings.filter(({ outAt, backAt }) => outAt <= at && (backAt === null || backAt > at))
    const inputs: NoticeInputs = {
      site: history.site,
      carries: out.length === 0 ? [] : [carryOf(out, at)],
      sensors: [],
      people: [],
      rules,
      surroundings: {
        ...nowhere,
        evening: { shopUse: history.shopUse.get(hours.today) ?? null, isAnswered: false },
      },
    }
    const notice = evening(at, { told: new Set(), holds: new Map() }, inputs).notices.find(
      (one) => one.rule === rule,
    )
    if (notice !== undefined) seen.set(hours.today, { at, of: notice.title })
  }
  return [...seen.values()]
}

const nowhere = { rooms: [], boxes: [], blanks: [], strips: [], refused: [], tubs: [] }

const carryOf = (out: PreviewHistory['outings'], at: number): NoticeCarry => ({
  code: '',
  state: 'out',
  plannedAt: at,
  stayMinutes: 0,
  roomName: '',
  madeBy: null,
  airAt: null,
  pieces: out.map(({ number, outAt }) => ({ code: number, number, stage: 'box', outAt, check: null })),
})

/** Whether the record reaches back over the whole preview; else the page says how far it does. */
export const recordDays = (rooms: readonly NoticeRoom[], todayOn: string): number =>
  Math.max(0, ...rooms.map(({ days }) => (days[0] === undefined ? 0 : daysFrom(days[0].dayOn, todayOn))))
