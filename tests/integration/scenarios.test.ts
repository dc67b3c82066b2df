import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createInstruments, instruments, type InstrumentName } from '@/fake-sensors/climates/instruments'
import { HOUR_MS } from '@/fake-sensors/climates/outdoor'
import { scenarioOf } from '@/fake-sensors/scenarios/all'
import { listNoticeSites } from '@/db/queries/notice-state'
import { dayOfInstant, daysAfter, startOfDayAt } from '@/lib/climate/days'
import { decideNotices } from '@/lib/notices/decide'
import type { NoticeInputs } from '@/lib/notices/inputs'
import type { Rule } from '@/lib/notices/notice'
import type { NoticeRoom, RoomDay, RoomHour } from '@/lib/notices/surroundings'
import type { RoomKind } from '@/lib/rooms/room'
import { type ScenarioName, scenarioNames } from '@/lib/sensors/scenarios'
import { emcOfReadingPct } from '@/lib/wood/emc'
import { makeDemo } from '@/workers/demo/make-demo'
import { placeSeed, placeTimeZone } from '@/workers/demo/place'
import { evaluateSite } from '@/workers/notices/evaluate'
import { createTestDatabase, type TestDatabase } from '../support/database'

const now = new Date('2026-11-17T10:05:00Z')

interface OfRoom {
  rule: Rule & ScenarioName
  instrument: InstrumentName
  kind: RoomKind
}

/** Rules about a room's air, and the instrument in whose room the scenario makes it so. */
const ofRooms: readonly OfRoom[] = [
  { rule: 'keep-room-band', instrument: 'cupboard-upper', kind: 'cupboard' },
  { rule: 'damper-than-normal', instrument: 'study', kind: 'house' },
  { rule: 'mould-risk', instrument: 'study', kind: 'house' },
  { rule: 'too-dry', instrument: 'cupboard-upper', kind: 'cupboard' },
  { rule: 'cold-iron', instrument: 'shop-bench', kind: 'shop' },
]

const mean = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / Math.max(1, values.length)

/** Fourteen months of a room's figures, as the scenario has them. */
function roomOf({ instrument, kind }: OfRoom, scenario: ScenarioName): NoticeRoom {
  const { airOf } = scenarioOf(scenario)
  const measure = createInstruments(
    placeSeed,
    undefined,
    (room, atMs, air) => airOf?.(room, (atMs - now.getTime()) / HOUR_MS, air) ?? air,
  )
  const today = dayOfInstant(now, placeTimeZone)
  const hourOf = (at: number): RoomHour => ({ at, ...measure(instrument, at + HOUR_MS / 2) })
  const days = Array.from({ length: 425 }, (_, n): RoomDay => {
    const dayOn = daysAfter(today, n - 425)
    const at = startOfDayAt(dayOn, placeTimeZone).getTime()
    const endsAt = startOfDayAt(daysAfter(dayOn, 1), placeTimeZone).getTime()
    const hours = Array.from({ length: 12 }, (_hour, index) => hourOf(at + index * 2 * HOUR_MS))
    return {
      ...{ dayOn, at, endsAt },
      temperatureC: mean(hours.map((hour) => hour.temperatureC)),
      humidityPct: mean(hours.map((hour) => hour.humidityPct)),
      emcPct: mean(hours.map((hour) => emcOfReadingPct(hour.temperatureC, hour.humidityPct))),
    }
  })
  const thisHour = Math.floor(now.getTime() / HOUR_MS) * HOUR_MS
  return {
    ...{ code: 'room', name: instruments[instrument].room, kind },
    ...{ keepsDryWork: kind !== 'shop', isKeepRoom: kind === 'cupboard', hasRestingWood: kind !== 'shop' },
    days,
    hours: Array.from({ length: 72 }, (_, n) => hourOf(thisHour - (72 - n) * HOUR_MS)),
  }
}

const inputsWith = (room: NoticeRoom): NoticeInputs => ({
  site: { timeZone: placeTimeZone, quietFrom: '22:00', quietTo: '07:00', lockUpAt: '18:00' },
  carries: [],
  sensors: [],
  people: [],
  surroundings: {
    ...{ rooms: [room], boxes: [], blanks: [], strips: [], refused: [], tubs: [] },
    evening: { shopUse: null, isAnswered: false },
  },
})

const toldRules = (room: NoticeRoom): Rule[] =>
  decideNotices(now.getTime(), { told: new Set(), holds: new Map() }, inputsWith(room)).notices.map(
    (notice) => notice.rule,
  )

describe('a scenario of a room', () => {
  it.each(ofRooms)('makes $rule be told, which is not told on a day like any other', (asked) => {
    expect(toldRules(roomOf(asked, asked.rule))).toContain(asked.rule)
    expect(toldRules(roomOf(asked, 'normal-day'))).not.toContain(asked.rule)
  })
})

describe('a demo in a scenario', () => {
  let database: TestDatabase
  const rules = async () =>
    (await database.db.selectFrom('notice').where('episode_id', 'is not', null).select('rule').execute()).map(
      ({ rule }) => rule,
    )
  const evaluate = async (at: Date) => {
    for (const site of await listNoticeSites(database.db))
      await evaluateSite(database.db, site, at, 'https://lidfast.example.org')
  }

  beforeAll(async () => {
    database = await createTestDatabase()
    await makeDemo(database.db, {
      ...{ now, days: 125, everyS: 1200, scenario: 'last-call' },
      say: () => undefined,
      keepRoster: () => Promise.resolve(),
    })
  })
  afterAll(() => database.drop())

  it('tells what holds at once, each once, and last call when its minute comes', async () => {
    await evaluate(now)
    const first = await rules()
    for (const rule of [
      'planned-carry',
      'time-out',
      'sensor-silent',
      'battery-low',
      'blank-ready',
      'losing-fit',
    ])
      expect(first).toContain(rule)
    expect(first).not.toContain('last-call')
    await evaluate(new Date(now.getTime() + 3 * 60_000))
    expect(await rules()).toContain('last-call')
    const counted = (await rules()).length
    await evaluate(new Date(now.getTime() + 4 * 60_000))
    expect((await rules()).length).toBe(counted)
  })
})

it('has a scenario for each rule', () => {
  for (const { rule } of ofRooms) expect(scenarioNames).toContain(rule)
  expect(new Set(scenarioNames).size).toBe(scenarioNames.length)
})
