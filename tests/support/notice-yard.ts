import { dayOfInstant, daysAfter, startOfDayAt } from '@/lib/climate/days'
import { emcOfReadingPct } from '@/lib/wood/emc'
import { decideNotices } from '@/lib/notices/decide'
import type { KnownEpisode, NoticeAnswer, NoticeInputs, NoticeState, VerdictHold } from '@/lib/notices/inputs'
import type { NoticeRoom, RoomDay, Surroundings } from '@/lib/notices/surroundings'

/** A yard for the tests of the rules, and a worker that keeps what it told as the database does. */

const hourMs = 3_600_000

export const yardSite = {
  timeZone: 'Europe/London',
  quietFrom: '22:00',
  quietTo: '07:00',
  lockUpAt: '18:00',
}

export const yardPeople: NoticeInputs['people'] = [
  { userId: 'maker', role: 'maker', mailOn: true, onHouseList: false },
  { userId: 'house', role: 'hand', mailOn: true, onHouseList: true },
  { userId: 'aunt', role: 'hand', mailOn: true, onHouseList: true },
  { userId: 'uncle', role: 'hand', mailOn: true, onHouseList: true },
]

export const emptyYard: Surroundings = {
  rooms: [],
  boxes: [],
  blanks: [],
  strips: [],
  refused: [],
  tubs: [],
  evening: { shopUse: null, isAnswered: false },
}

export const yard = (
  surroundings: Partial<Surroundings>,
  more: Partial<NoticeInputs> = {},
): NoticeInputs => ({
  site: yardSite,
  carries: [],
  sensors: [],
  people: yardPeople,
  surroundings: { ...emptyYard, ...surroundings },
  ...more,
})

export const at = (text: string): number => new Date(text).getTime()

export const room = (more: Partial<NoticeRoom>): NoticeRoom => ({
  code: 'cupboard',
  name: 'Cupboard',
  kind: 'cupboard',
  keepsDryWork: false,
  isKeepRoom: false,
  hasRestingWood: false,
  days: [],
  hours: [],
  ...more,
})

const starts = new Map<string, number>()
function startOf(dayOn: string, timeZone: string): number {
  const key = `${timeZone} ${dayOn}`
  const start = starts.get(key) ?? startOfDayAt(dayOn, timeZone).getTime()
  starts.set(key, start)
  return start
}

/** Days up to and with the day before `now`, the last of `airs` being that one. */
export function daysBefore(
  now: number,
  airs: readonly { temperatureC: number; humidityPct: number }[],
  timeZone = yardSite.timeZone,
): RoomDay[] {
  const today = dayOfInstant(new Date(now), timeZone)
  return airs.map((air, n) => {
    const dayOn = daysAfter(today, n - airs.length)
    return {
      dayOn,
      at: startOf(dayOn, timeZone),
      endsAt: startOf(daysAfter(dayOn, 1), timeZone),
      ...air,
      emcPct: emcOfReadingPct(air.temperatureC, air.humidityPct),
    }
  })
}

/** Hours up to the one before `now`. */
export const hoursBefore = (now: number, airs: readonly { temperatureC: number; humidityPct: number }[]) =>
  airs.map((air, n) => ({ ...air, at: (Math.floor(now / hourMs) + n - airs.length) * hourMs }))

export const morningOf = (dayOn: string, timeZone = yardSite.timeZone): number =>
  startOfDayAt(dayOn, timeZone).getTime() + 9 * hourMs

/** One worker after another, with what was stored in between. */
export class Ledger {
  readonly told = new Set<string>()
  known: KnownEpisode[] = []
  holds = new Map<string, VerdictHold>()
  answers: NoticeAnswer[] = []

  get state(): NoticeState {
    return { told: this.told, holds: this.holds, known: this.known, answers: this.answers }
  }

  /** Decides and stores; says what was told, as "rule to somebody: title". */
  look(now: number, inputs: NoticeInputs) {
    const decision = decideNotices(now, this.state, inputs)
    this.holds = new Map(
      decision.episodes.flatMap(({ subject, key, hold }) =>
        hold === undefined ? [] : [[`${subject} ${key}`, hold] as const],
      ),
    )
    const nameOf = (of: { rule: string; subject: string; key: string }) =>
      `${of.rule} ${of.subject} ${of.key}`
    const holding = new Set(decision.episodes.filter(({ state }) => state !== 'over').map(nameOf))
    this.known = this.known.map((one) =>
      one.isOpen && !holding.has(nameOf(one)) ? { ...one, isOpen: false, endedAt: now } : one,
    )
    for (const episode of decision.episodes) this.store(episode, now)
    for (const notice of decision.notices) this.told.add(notice.key)
    return decision.notices
  }

  private store(episode: ReturnType<typeof decideNotices>['episodes'][number], now: number): void {
    const isOver = episode.state === 'over'
    const index = this.known.findIndex(
      (one) => one.rule === episode.rule && one.subject === episode.subject && one.key === episode.key,
    )
    const before = this.known[index]
    if (before === undefined)
      this.known.push({
        rule: episode.rule,
        subject: episode.subject,
        key: episode.key,
        isOpen: !isOver,
        beganAt: episode.beganAt,
        toldAt: episode.state === 'telling' ? now : null,
        endedAt: isOver ? (episode.endedAt ?? now) : null,
      })
    else if (isOver) this.known[index] = { ...before, isOpen: false, endedAt: episode.endedAt ?? now }
    else
      this.known[index] = {
        ...before,
        isOpen: true,
        endedAt: null,
        toldAt: before.toldAt ?? (episode.state === 'telling' ? now : null),
      }
  }
}

/** What was told, as short text. */
export const rulesOf = (notices: readonly { rule: string; key: string }[]): string[] =>
  notices.map(({ rule, key }) => (key.endsWith('/over') ? `${rule} over` : rule))
