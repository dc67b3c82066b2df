import { describe, expect, it } from 'vitest'
import { instantOfLocalField, localFieldValue, nextFullHour } from './local-time'

const LONDON = 'Europe/London'

describe('a date and time typed in the zone of the site', () => {
  it('goes there and back, in winter and in summer', () => {
    for (const at of ['2026-01-05T14:00:00.000Z', '2026-07-05T13:00:00.000Z']) {
      expect(instantOfLocalField(localFieldValue(at, LONDON), LONDON)?.toISOString()).toBe(at)
    }
    expect(localFieldValue('2026-07-05T13:00:00Z', LONDON)).toBe('2026-07-05T14:00')
  })

  it('is not taken for the time of the machine', () => {
    expect(instantOfLocalField('2026-03-05T17:30', 'Asia/Kolkata')?.toISOString()).toBe(
      '2026-03-05T12:00:00.000Z',
    )
  })

  it('refuses what is no time at all', () => {
    expect(instantOfLocalField('', LONDON)).toBeUndefined()
    expect(instantOfLocalField('2026-02-31T10:00', LONDON)).toBeUndefined()
  })
})

describe('the next full hour', () => {
  it('lies half an hour off at least', () => {
    expect(nextFullHour(new Date('2026-03-05T13:10:00Z'), LONDON).toISOString()).toBe(
      '2026-03-05T14:00:00.000Z',
    )
    expect(nextFullHour(new Date('2026-03-05T13:40:00Z'), LONDON).toISOString()).toBe(
      '2026-03-05T15:00:00.000Z',
    )
    expect(nextFullHour(new Date('2026-03-05T13:30:00Z'), LONDON).toISOString()).toBe(
      '2026-03-05T14:00:00.000Z',
    )
  })

  it('is full in a zone with half hours', () => {
    expect(nextFullHour(new Date('2026-03-05T13:10:00Z'), 'Asia/Kolkata').toISOString()).toBe(
      '2026-03-05T14:30:00.000Z',
    )
  })
})
