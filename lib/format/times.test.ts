import { describe, expect, it } from 'vitest'
import {
  dayOn,
  formatAge,
  formatClock,
  formatDay,
  formatDuration,
  formatFullMoment,
  formatMoment,
  formatRelativeDay,
  formatShortMoment,
} from './times'

const LONDON = 'Europe/London'
const KOLKATA = 'Asia/Kolkata'
const now = new Date('2026-03-05T13:10:00Z')
const plain = (text: string) => text.replaceAll('\u00a0', ' ')

describe('times as a reader sees them', () => {
  it('tells the clock of the site, not of the machine', () => {
    expect(formatClock('2026-07-01T12:00:00Z', LONDON)).toBe('13:00')
    expect(formatClock('2026-07-01T12:00:00Z', KOLKATA)).toBe('17:30')
  })

  it('gives the calendar day in the zone, on both sides of midnight', () => {
    expect(dayOn('2026-03-05T19:00:00Z', KOLKATA)).toBe('2026-03-06')
    expect(dayOn('2026-03-05T19:00:00Z', LONDON)).toBe('2026-03-05')
  })

  it('says days the way people do', () => {
    expect(formatRelativeDay('2026-03-05T23:59:00Z', LONDON, now)).toBe('today')
    expect(formatRelativeDay('2026-03-06T00:01:00Z', LONDON, now)).toBe('tomorrow')
    expect(formatRelativeDay('2026-03-04T08:00:00Z', LONDON, now)).toBe('yesterday')
    expect(formatRelativeDay('2026-03-08T08:00:00Z', LONDON, now)).toBe('on Sunday')
    expect(formatRelativeDay('2026-03-20T08:00:00Z', LONDON, now)).toBe('on Fri 20 Mar')
  })

  it('names the year only when it is another one', () => {
    expect(formatDay('2026-01-11T08:00:00Z', LONDON, now)).toBe('Sun 11 Jan')
    expect(formatDay('2025-01-11T08:00:00Z', LONDON, now)).toBe('Sat 11 Jan 2025')
  })

  it('says a moment with only as much day as it needs', () => {
    expect(formatMoment('2026-03-05T14:00:00Z', LONDON, now)).toBe('14:00')
    expect(formatMoment('2026-03-06T10:00:00Z', LONDON, now)).toBe('tomorrow 10:00')
    expect(formatMoment('2026-03-07T11:00:00Z', LONDON, now)).toBe('Saturday 11:00')
    expect(formatMoment('2026-02-01T11:00:00Z', LONDON, now)).toBe('Sun 1 Feb, 11:00')
  })

  it('names the weekday in a figure only when it is another day in the zone', () => {
    expect(formatShortMoment('2026-03-05T14:00:00Z', LONDON, now)).toBe('14:00')
    expect(formatShortMoment('2026-03-05T19:00:00Z', KOLKATA, now)).toBe('Fri 00:30')
  })

  it('gives the zone with a full moment', () => {
    expect(formatFullMoment('2026-07-01T12:00:05Z', LONDON)).toBe('Wed 1 Jul 2026, 13:00:05 BST')
  })

  it('rounds a stay to the minute under an hour and to ten minutes above', () => {
    expect(plain(formatDuration(25.4))).toBe('25 min')
    expect(plain(formatDuration(59.6))).toBe('1 h')
    expect(plain(formatDuration(127))).toBe('2 h 10 min')
    expect(plain(formatDuration(180))).toBe('3 h')
    expect(plain(formatDuration(3 * 1440))).toBe('3 days')
  })

  it('tells an age and never a negative one', () => {
    expect(formatAge(-5000)).toBe('just now')
    expect(plain(formatAge(2 * 60_000 + 1))).toBe('2 min ago')
    expect(plain(formatAge(3 * 3_600_000))).toBe('3 h ago')
    expect(formatAge(5 * 86_400_000)).toBe('5 days ago')
  })
})
