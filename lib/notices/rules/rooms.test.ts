import { describe, expect, it } from 'vitest'
import { daysAfter } from '@/lib/climate/days'
import type { NoticeRoom } from '../surroundings'
import {
  daysBefore,
  hoursBefore,
  Ledger,
  morningOf,
  room,
  rulesOf,
  yard,
  yardSite,
} from '@/tests/support/notice-yard'

const firstOn = '2026-03-05'
const house = { temperatureC: 20, humidityPct: 45 }
const damp = { temperatureC: 20, humidityPct: 68 }
const dry = { temperatureC: 22, humidityPct: 30 }
const wet = { temperatureC: 15, humidityPct: 82 }
const times = <T>(count: number, value: T): T[] => Array.from({ length: count }, () => value)

type Air = { temperatureC: number; humidityPct: number }

/** Lets a room's days pass one by one, a look each morning (and a second one, which must add nothing). */
function course(
  facts: Partial<NoticeRoom>,
  before: Air[],
  days: Air[],
  rules?: Map<string, { isOn: boolean; settings: Record<string, number | string | string[]> }>,
) {
  const ledger = new Ledger()
  const airs = [...before]
  const told = days.map((air, n) => {
    airs.push(air)
    const now = morningOf(daysAfter(firstOn, n))
    const inputs = yard({ rooms: [room({ ...facts, days: daysBefore(now, airs) })] }, rules ? { rules } : {})
    const first = rulesOf(ledger.look(now, inputs))
    expect(ledger.look(now + 30_000, inputs)).toEqual([])
    return first.join(', ')
  })
  return told.map((text) => text || '-')
}

describe('a keep room out of its band', () => {
  const keeps = { isKeepRoom: true }
  const year = times(120, house)

  it('is told once after two days, and once more when it is back', () => {
    expect(course(keeps, year, [house, damp, damp, damp, damp, house, house])).toEqual([
      '-',
      '-',
      'keep-room-band',
      '-',
      '-',
      'keep-room-band over',
      '-',
    ])
  })

  it('is not told for one day, nor in a room that keeps nothing, nor with the rule off', () => {
    expect(course(keeps, year, [damp, house, damp, house])).toEqual(['-', '-', '-', '-'])
    expect(course({}, year, [damp, damp, damp])).toEqual(['-', '-', '-'])
    const off = new Map([['keep-room-band', { isOn: false, settings: {} }]])
    expect(course(keeps, year, [damp, damp, damp], off)).toEqual(['-', '-', '-'])
  })

  it('does not end until the room is well inside: to and fro at the limit is one notice', () => {
    // The limit lies at 8.5 + 1.5 = 10.0 % MC: about 54 % RH. 51 % RH is inside, but not by 0.7 points.
    const edge = { temperatureC: 20, humidityPct: 52 }
    const over = { temperatureC: 20, humidityPct: 56 }
    expect(course(keeps, year, [over, over, edge, over, edge, edge, over, house])).toEqual([
      '-',
      'keep-room-band',
      '-',
      '-',
      '-',
      '-',
      '-',
      'keep-room-band over',
    ])
  })

  it('goes by 7 to 12 % MC while there is little record', () => {
    expect(course(keeps, times(10, damp), [damp, damp, damp])[0]).toBe('keep-room-band')
    expect(
      course(
        keeps,
        times(10, { temperatureC: 20, humidityPct: 55 }),
        times(3, { temperatureC: 20, humidityPct: 55 }),
      ),
    ).toEqual(times(3, '-'))
  })

  it('looks at the rooms that were named, and at those alone', () => {
    const named = new Map([['keep-room-band', { isOn: true, settings: { rooms: ['cupboard'] } }]])
    expect(course({}, year, [damp, damp], named)).toEqual(['-', 'keep-room-band'])
    const other = new Map([['keep-room-band', { isOn: true, settings: { rooms: ['study'] } }]])
    expect(course(keeps, year, [damp, damp], other)).toEqual(['-', '-'])
  })
})

describe('air that is too dry', () => {
  const rests = { hasRestingWood: true }
  it('is told after three days, where green or resting wood is', () => {
    expect(course(rests, [house], [dry, dry, dry, dry, house])).toEqual([
      '-',
      '-',
      'too-dry',
      '-',
      'too-dry over',
    ])
    expect(course({}, [house], [dry, dry, dry, dry])).toEqual(times(4, '-'))
  })
})

describe('mould', () => {
  it('is told when a week was damp in a room that keeps dry work', () => {
    const told = course({ keepsDryWork: true }, times(7, house), times(10, wet))
    expect(told.filter((text) => text !== '-')).toEqual(['mould-risk'])
    // Seven days of 82 after seven of 45: the mean of a week passes 75 on the sixth.
    expect(told.indexOf('mould-risk')).toBe(5)
  })
  it('is told once a season elsewhere, although it comes again', () => {
    const spells = [...times(9, wet), ...times(14, house), ...times(9, wet)]
    expect(course({}, times(7, house), spells).filter((text) => text === 'mould-risk')).toHaveLength(1)
    expect(
      course({ keepsDryWork: true }, times(7, house), spells).filter((text) => text === 'mould-risk'),
    ).toHaveLength(2)
  })
})

describe('damper than its own normal', () => {
  const facts = { hasRestingWood: true }
  /** Fourteen months whose damp weeks are half a year off: the south's, or the north's. */
  const record = (dampFrom: number, dampTo: number) =>
    Array.from({ length: 425 }, (_, n) =>
      n >= dampFrom && n < dampTo
        ? { temperatureC: 18, humidityPct: 62 }
        : { temperatureC: 18, humidityPct: 45 },
    )

  it('is told against the same weeks of the year before', () => {
    const now = { temperatureC: 18, humidityPct: 62 }
    expect(course(facts, record(150, 250), [now, now, now])).toEqual(['-', 'damper-than-normal', '-'])
  })
  it('is not told where those weeks were as damp: the record is the season, whatever the hemisphere', () => {
    const now = { temperatureC: 18, humidityPct: 62 }
    expect(course(facts, record(20, 110), [now, now, now])).toEqual(['-', '-', '-'])
  })
  it('says nothing in its first year', () => {
    expect(course(facts, times(200, house), [damp, damp, damp])).toEqual(['-', '-', '-'])
  })
  it('says nothing beside a keep room that is told to be out of its band', () => {
    const now = { temperatureC: 18, humidityPct: 72 }
    const told = course({ ...facts, isKeepRoom: true }, record(150, 250), [now, now, now])
    expect(told).toEqual(['-', 'keep-room-band', '-'])
  })
})

describe('cold iron', () => {
  const now = morningOf(firstOn)
  const cold = times(20, { temperatureC: 3, humidityPct: 80 })
  const thaw = times(3, { temperatureC: 9, humidityPct: 90 })
  const look = (ledger: Ledger, airs: Air[]) =>
    rulesOf(
      ledger.look(
        now,
        yard({ rooms: [room({ code: 'shop', kind: 'shop', hours: hoursBefore(now, airs) })] }),
      ),
    )

  it('is told when warm damp air meets the cold of the night, once', () => {
    const ledger = new Ledger()
    expect(look(ledger, [...cold, ...thaw])).toEqual(['cold-iron'])
    expect(look(ledger, [...cold, ...thaw])).toEqual([])
  })
  it('is not told of cold dry air, nor of a warm room', () => {
    expect(look(new Ledger(), cold)).toEqual([])
    expect(look(new Ledger(), times(23, house))).toEqual([])
  })
})

describe('what nobody saw', () => {
  const now = morningOf(firstOn)
  const keeper = (airs: Air[]) => yard({ rooms: [room({ isKeepRoom: true, days: daysBefore(now, airs) })] })

  it('opens in the history without a word when it began and ended while nobody looked', () => {
    const ledger = new Ledger()
    expect(ledger.look(now, keeper([...times(100, house), ...times(4, damp), ...times(5, house)]))).toEqual(
      [],
    )
    const [episode, ...others] = ledger.known
    expect(others).toEqual([])
    expect(episode).toMatchObject({ rule: 'keep-room-band', isOpen: false, toldAt: null })
    expect(new Date(episode?.beganAt ?? 0).toISOString()).toBe('2026-02-24T00:00:00.000Z')
  })

  it('is told once on return with its true beginning when it still lasts', () => {
    const ledger = new Ledger()
    const lasting = keeper([...times(100, house), ...times(6, damp)])
    expect(rulesOf(ledger.look(now, lasting))).toEqual(['keep-room-band'])
    expect(new Date(ledger.known[0]?.beganAt ?? 0).toISOString()).toBe('2026-02-27T00:00:00.000Z')
  })

  it('stays the same episode when late readings move its beginning', () => {
    const ledger = new Ledger()
    ledger.look(now, keeper([...times(100, house), ...times(4, damp)]))
    expect(ledger.look(now + 60_000, keeper([...times(98, house), ...times(6, damp)]))).toEqual([])
    expect(ledger.known).toHaveLength(1)
  })

  it('is not told from readings that are days old', () => {
    const old = daysBefore(now - 5 * 86_400_000, [...times(100, house), ...times(4, damp)])
    const stale = yard({ rooms: [room({ isKeepRoom: true, days: old })] })
    expect(new Ledger().look(now, stale)).toEqual([])
  })
})

describe('days on which the clocks change', () => {
  it.each([
    ['Europe/London', '2026-03-30'],
    ['Europe/London', '2026-10-26'],
    ['America/New_York', '2026-11-02'],
    // Lord Howe moves its clocks by half an hour.
    ['Australia/Lord_Howe', '2026-04-06'],
    ['Australia/Lord_Howe', '2026-10-05'],
  ])('%s, the morning of %s: two days are two days, of 23 h or of 25', (timeZone, dayOn) => {
    const now = morningOf(dayOn, timeZone)
    const look = (airs: Air[]) =>
      rulesOf(
        new Ledger().look(
          now,
          yard(
            { rooms: [room({ isKeepRoom: true, days: daysBefore(now, airs, timeZone) })] },
            { site: { ...yardSite, timeZone } },
          ),
        ),
      )
    expect(look([...times(100, house), damp])).toEqual([])
    expect(look([...times(100, house), damp, damp])).toEqual(['keep-room-band'])
  })
})
