import { describe, expect, it } from 'vitest'
import { instantOfLocalTime, quietUntil } from './local-time'

const at = (text: string) => new Date(text).getTime()
const london = { timeZone: 'Europe/London', quietFrom: '22:00', quietTo: '07:00' }

describe('local time', () => {
  it.each([
    ['2026-03-05', '14:00', 'Europe/London', '2026-03-05T14:00:00Z'],
    ['2026-07-05', '14:00', 'Europe/London', '2026-07-05T13:00:00Z'],
    ['2026-07-05', '00:30', 'Asia/Kathmandu', '2026-07-04T18:45:00Z'],
    ['2026-01-05', '12:00', 'Australia/Lord_Howe', '2026-01-05T01:00:00Z'],
  ])('finds the instant of %s %s in %s', (day, time, zone, instant) => {
    expect(new Date(instantOfLocalTime(day, time, zone)).toISOString()).toBe(new Date(instant).toISOString())
  })
})

describe('quiet hours', () => {
  it('run over midnight and end on the morning of the right day', () => {
    expect(quietUntil(at('2026-03-05T23:10:00Z'), london)).toBe(at('2026-03-06T07:00:00Z'))
    expect(quietUntil(at('2026-03-06T03:00:00Z'), london)).toBe(at('2026-03-06T07:00:00Z'))
    expect(quietUntil(at('2026-03-06T07:00:00Z'), london)).toBeNull()
    expect(quietUntil(at('2026-03-06T21:59:59Z'), london)).toBeNull()
  })

  it('last an hour less in the night that the clocks go forward', () => {
    // Clocks go forward at 01:00 UTC on 29 March 2026 in London.
    expect(quietUntil(at('2026-03-28T23:00:00Z'), london)).toBe(at('2026-03-29T06:00:00Z'))
  })

  it('may lie within one day, and may be none', () => {
    const siesta = { timeZone: 'UTC', quietFrom: '13:00', quietTo: '15:00' }
    expect(quietUntil(at('2026-03-05T14:00:00Z'), siesta)).toBe(at('2026-03-05T15:00:00Z'))
    expect(quietUntil(at('2026-03-05T16:00:00Z'), siesta)).toBeNull()
    expect(quietUntil(at('2026-03-05T14:00:00Z'), { ...siesta, quietTo: '13:00' })).toBeNull()
  })
})
