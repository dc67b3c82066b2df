import { describe, expect, it } from 'vitest'
import { dayOfInstant, daysAfter, daysFrom, monthOf, monthsBefore, startOfDayAt } from './days'

describe('calendar days in a zone', () => {
  it.each([
    ['Europe/London', '2026-03-29', '2026-03-29T00:00:00.000Z'],
    ['Europe/London', '2026-03-30', '2026-03-29T23:00:00.000Z'],
    ['Asia/Kolkata', '2026-01-01', '2025-12-31T18:30:00.000Z'],
    ['Asia/Kathmandu', '2026-01-01', '2025-12-31T18:15:00.000Z'],
    // Lord Howe goes by half an hour: +11 in summer, +10:30 in winter.
    ['Australia/Lord_Howe', '2026-04-05', '2026-04-04T13:00:00.000Z'],
    ['Australia/Lord_Howe', '2026-04-06', '2026-04-05T13:30:00.000Z'],
  ])('in %s the %s begins at %s', (zone, day, begins) => {
    expect(startOfDayAt(day, zone).toISOString()).toBe(begins)
    expect(dayOfInstant(startOfDayAt(day, zone), zone)).toBe(day)
    expect(dayOfInstant(new Date(startOfDayAt(day, zone).getTime() - 1), zone)).toBe(daysAfter(day, -1))
  })

  it('counts over leap days, the turn of the year and the change of the clocks', () => {
    expect(daysAfter('2028-02-28', 1)).toBe('2028-02-29')
    expect(daysAfter('2026-12-31', 1)).toBe('2027-01-01')
    expect(daysFrom('2026-03-28', '2026-03-31')).toBe(3)
    expect(monthsBefore('2026-03-31', 1)).toBe('2026-02-28')
    expect(monthOf('2026-12-09')).toEqual({ firstOn: '2026-12-01', nextFirstOn: '2027-01-01' })
  })
})
