import { describe, expect, it } from 'vitest'
import { plainText } from '@/lib/format/sentence'
import type { HourState, StripCell } from './strip-view'
import { stripWords } from './strip-words'

const now = new Date('2026-03-05T13:10:00Z')
const clock = { timeZone: 'Europe/London', now }
const hourAt = (n: number) => new Date(Date.parse('2026-03-05T13:00:00Z') + n * 3_600_000).toISOString()

/** Unfit but where told otherwise; hours are counted from the one that has begun. */
function cells(own: Record<number, HourState>, lit: Record<number, HourState> = {}): StripCell[] {
  return Array.from({ length: 48 }, (_, n) => ({
    at: hourAt(n),
    state: own[n] ?? 'unfit',
    emcPct: 13,
    temperatureC: 8,
    ifLit: lit[n] === undefined ? null : { state: lit[n] ?? 'unfit', emcPct: 10, temperatureC: 14 },
  }))
}
const from = (first: number, last: number, state: HourState): Record<number, HourState> =>
  Object.fromEntries(Array.from({ length: last - first + 1 }, (_, n) => [first + n, state]))

const words = (kind: 'forecast' | 'repeated' | 'none', own: StripCell[], isLit = false) =>
  plainText(stripWords({ kind, cells: own, lit: isLit ? { atTime: '08:00', warmings: 14 } : null }, clock))

describe('what a strip of hours comes to in words', () => {
  it('tells the fit hours as they are, and those that a lighting would bring sooner', () => {
    const lit = from(21, 25, 'fit')
    expect(words('forecast', cells({}, lit), true)).toBe(
      'Fit if you light it at 08:00, from 10:00 to 15:00 tomorrow. As it is, not in the next 48 hours.',
    )
    expect(words('forecast', cells(from(46, 47, 'fit'), lit), true)).toBe(
      'Fit as it is from 11:00 on Saturday; if you light it at 08:00, from 10:00 to 15:00 tomorrow.',
    )
    expect(words('forecast', cells(from(0, 2, 'fit')))).toBe('Fit as it is now until 16:00.')
    expect(words('forecast', cells(from(0, 47, 'fit')))).toBe(
      'Fit as it is now and for the 48 hours to come.',
    )
  })

  it('says once how long a short stay is tolerable where that is all the time', () => {
    expect(words('forecast', cells(from(0, 47, 'tolerable')))).toBe(
      'Tolerable for a short stay now and for the 48 hours to come; none of them is fit.',
    )
    expect(words('forecast', cells(from(0, 2, 'tolerable')))).toBe(
      'Not fit in the next 48 hours; tolerable for a short stay now until 16:00.',
    )
  })

  it('promises nothing of a room whose warmings are not on record', () => {
    expect(words('forecast', cells({}, from(21, 25, 'fit')))).not.toContain('light it')
  })

  it('ends an hour before midnight on the day that is over', () => {
    expect(words('forecast', cells(from(8, 10, 'fit')))).toBe('Fit as it is from 21:00 to 00:00 today.')
    expect(words('forecast', cells(from(8, 12, 'fit')))).toBe(
      'Fit as it is from 21:00 today to 02:00 tomorrow.',
    )
  })

  it('calls no hour fit without a forecast, and says so', () => {
    const told = words('repeated', cells(from(20, 22, 'tolerable')))
    expect(told).toBe(
      'No forecast yet. If the last two days came again, it might do from 09:00 to 12:00 tomorrow.',
    )
    expect(words('none', [])).toContain('No reading there now')
  })
})
