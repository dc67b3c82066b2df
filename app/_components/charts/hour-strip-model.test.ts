import { describe, expect, it } from 'vitest'
import type { StripCell } from '@/lib/forecast/strip-view'
import { cellWords, litState, stripDays, stripKinds, stripTicks } from './hour-strip-model'

const cell = (hour: number, more: Partial<StripCell> = {}): StripCell => ({
  at: new Date(Date.UTC(2026, 2, 28, hour)).toISOString(),
  state: 'unfit',
  emcPct: 13.1,
  temperatureC: 8,
  ifLit: null,
  ...more,
})
const fitIfLit = { state: 'fit' as const, emcPct: 9, temperatureC: 14 }

describe('the strip of hours as drawn', () => {
  it('puts its ticks on hours of the local clock, over a day that loses one', () => {
    const cells = Array.from({ length: 48 }, (_, n) => cell(13 + n))
    expect(stripTicks(cells, 'Europe/London').map((tick) => tick.label)).toEqual([
      '18',
      '00',
      '06',
      '12',
      '18',
      '00',
      '06',
      '12',
    ])
    const days = stripDays(cells, 'Europe/London', (count) => count * 5, 7.5)
    expect(days.map((day) => day.label)).toEqual(['Sat', 'Sunday', 'Monday'])
    expect(days.map((day) => day.index)).toEqual([0, 11, 34])
  })

  it('outlines what a lighting betters, and explains only what it holds', () => {
    const cells = [cell(9, { ifLit: fitIfLit }), cell(10, { state: 'tolerable' })]
    expect(litState(cells[0] ?? cell(0))).toBe('fit')
    expect(litState(cell(9, { state: 'fit', ifLit: fitIfLit }))).toBeNull()
    expect(stripKinds(cells)).toEqual({ states: ['tolerable', 'unfit'], ifLit: ['fit'] })
  })

  it('reads an hour off in words', () => {
    const clock = {
      timeZone: 'Europe/London',
      now: new Date('2026-03-28T08:00:00Z'),
      units: 'metric' as const,
    }
    const words = cellWords(cell(9, { ifLit: fitIfLit }), { atTime: '08:00', warmings: 5 }, clock)
    expect(words.replaceAll('\u00a0', ' ')).toBe(
      '09:00: unfit, 13.1 % MC, 8.0 °C; if you light it at 08:00 fit, 9.0 % MC',
    )
  })
})
