import { describe, expect, it } from 'vitest'
import { rangeWords } from './rest-words'

describe('a range of days', () => {
  const clock = { now: Date.parse('2026-12-01T10:00:00Z'), timeZone: 'Europe/London' }
  const at = (day: string) => Date.parse(`${day}T12:00:00Z`)

  it('names the year once, and only where it is another one', () => {
    expect(rangeWords({ fromAt: at('2026-12-10'), toAt: at('2026-12-20') }, clock)).toBe(
      'between 10 December and 20 December',
    )
    expect(rangeWords({ fromAt: at('2027-01-08'), toAt: at('2027-01-21') }, clock)).toBe(
      'between 8 January and 21 January 2027',
    )
    expect(rangeWords({ fromAt: at('2026-12-20'), toAt: at('2027-01-21') }, clock)).toBe(
      'between 20 December 2026 and 21 January 2027',
    )
  })
})
