import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatClock } from '@/lib/format/times'
import { comingOccurrences, isTooFarAhead, newRepeatSchema, nextOccurrence, repeatWords } from './repeat'

const weekly = (weekdays: number[], atTime = '09:00') => ({ weekdays, atTime })
const iso = (list: readonly { at: Date }[]) => list.map(({ at }) => at.toISOString())

describe('the days of a repeated plan', () => {
  it('keeps its clock time over the night on which the clocks go forward', () => {
    // Saturday 28 March 2026; British clocks go forward on Sunday the 29th.
    const from = new Date('2026-03-28T12:00:00Z')
    expect(iso(comingOccurrences(weekly([6, 7, 1]), 'Europe/London', from))).toEqual([
      '2026-03-29T08:00:00.000Z',
      '2026-03-30T08:00:00.000Z',
      '2026-04-04T08:00:00.000Z',
    ])
  })

  it('goes once on a night that has its hour twice, and later on one that leaves it out', () => {
    const twice = comingOccurrences(
      weekly([7], '01:30'),
      'Europe/London',
      new Date('2026-10-24T12:00:00Z'),
      3,
    )
    expect(twice).toHaveLength(1)
    expect(twice[0]?.on).toBe('2026-10-25')
    const none = comingOccurrences(weekly([7], '01:30'), 'Europe/London', new Date('2026-03-28T12:00:00Z'), 3)
    expect(none).toHaveLength(1)
    expect(none[0]?.on).toBe('2026-03-29')
  })

  it('goes by the site’s own day, not by that of UTC', () => {
    // Monday 09:00 in Auckland is Sunday evening in UTC.
    const next = nextOccurrence(weekly([1]), 'Pacific/Auckland', new Date('2026-06-13T00:00:00Z'))
    expect(next).toEqual({ on: '2026-06-15', at: new Date('2026-06-14T21:00:00Z') })
  })

  it('leaves out what is past today and has the same day of the next week', () => {
    const at = comingOccurrences(weekly([2]), 'Europe/London', new Date('2026-02-10T09:00:00Z'))
    expect(at.map(({ on }) => on)).toEqual(['2026-02-17'])
  })

  it('never misses a day and never gives one twice, in any zone', () => {
    const zones = ['Europe/London', 'America/St_Johns', 'Pacific/Auckland', 'Australia/Lord_Howe', 'UTC']
    fc.assert(
      fc.property(
        fc.constantFrom(...zones),
        fc.date({ min: new Date('2026-01-01'), max: new Date('2027-01-01'), noInvalidDate: true }),
        (zone, from) => {
          const days = comingOccurrences(weekly([1, 2, 3, 4, 5, 6, 7], '06:30'), zone, from)
          expect(days.length).toBeGreaterThanOrEqual(7)
          expect(new Set(days.map(({ on }) => on)).size).toBe(days.length)
          expect(days.every(({ at }) => at > from && formatClock(at, zone) === '06:30')).toBe(true)
        },
      ),
      { numRuns: 60, endOnFailure: true },
    )
  })
})

describe('a repeated plan', () => {
  it('is told by its days', () => {
    expect(repeatWords(weekly([5, 2]))).toBe('every Tuesday and Friday at 09:00')
    expect(repeatWords(weekly([1]))).toBe('every Monday at 09:00')
    expect(repeatWords(weekly([1, 2, 3, 4, 5]))).toBe('every day from Monday to Friday at 09:00')
    expect(repeatWords(weekly([1, 2, 3, 4, 5, 6, 7], '06:30'))).toBe('every day at 06:30')
  })

  it('names its pieces or takes whatever is taken, never both and never neither', () => {
    const base = { toRoomId: 'shop', cover: 'open', weekdays: [2], atTime: '09:00', stayMinutes: 60 }
    expect(newRepeatSchema.safeParse(base).success).toBe(false)
    expect(newRepeatSchema.safeParse({ ...base, takesWhatever: true }).success).toBe(true)
    expect(newRepeatSchema.safeParse({ ...base, pieceIds: ['a'] }).success).toBe(true)
    expect(newRepeatSchema.safeParse({ ...base, pieceIds: ['a'], takesWhatever: true }).success).toBe(false)
    expect(newRepeatSchema.safeParse({ ...base, takesWhatever: true, atTime: '25:00' }).success).toBe(false)
  })

  it('is judged once it is within two days, a single plan always', () => {
    const now = new Date('2026-02-10T10:00:00Z')
    const plannedAt = new Date('2026-02-12T11:00:00Z')
    const planned = { state: 'planned', plannedAt }
    expect(isTooFarAhead({ ...planned, isRepeated: true }, now)).toBe(true)
    expect(isTooFarAhead({ ...planned, isRepeated: false }, now)).toBe(false)
    expect(isTooFarAhead({ ...planned, isRepeated: true }, new Date('2026-02-10T12:00:00Z'))).toBe(false)
  })
})
