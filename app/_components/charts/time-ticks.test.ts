import { describe, expect, it } from 'vitest'
import { timeTicks } from './time-ticks'

const ms = (text: string) => new Date(text).getTime()

describe('ticks along a time axis', () => {
  it('stand on round local times, whatever the start', () => {
    const ticks = timeTicks(ms('2026-03-05T11:58:00Z'), ms('2026-03-05T14:40:00Z'), 'Europe/London')
    expect(ticks[0]?.at).toBe(ms('2026-03-05T12:00:00Z'))
    expect(ticks.filter((tick) => tick.isLong).map((tick) => tick.label)).toEqual(['12:00', '13:00', '14:00'])
  })

  it('go by the clock of a zone with half hours', () => {
    const ticks = timeTicks(ms('2026-03-05T06:00:00Z'), ms('2026-03-05T08:00:00Z'), 'Asia/Kolkata')
    expect(ticks.filter((tick) => tick.isLong).map((tick) => tick.at)).toEqual([
      ms('2026-03-05T06:30:00Z'),
      ms('2026-03-05T07:30:00Z'),
    ])
  })

  it('name the day at midnight and keep the clock through a change to summer time', () => {
    const ticks = timeTicks(ms('2026-03-28T18:00:00Z'), ms('2026-03-29T18:00:00Z'), 'Europe/London')
    expect(ticks.filter((tick) => tick.isLong).map((tick) => tick.label)).toEqual([
      '18:00',
      'Sun 29 Mar',
      '06:00',
      '12:00',
      '18:00',
    ])
  })

  it('label whole days over a month, by date alone', () => {
    const labels = timeTicks(ms('2026-02-03T00:00:00Z'), ms('2026-03-05T00:00:00Z'), 'Europe/London')
      .filter((tick) => tick.isLong)
      .map((tick) => tick.label)
    expect(labels).toEqual(['3 Feb', '10 Feb', '17 Feb', '24 Feb', '3 Mar'])
  })

  it('give nothing for an empty stretch', () => {
    expect(timeTicks(5, 5, 'UTC')).toEqual([])
  })
})
