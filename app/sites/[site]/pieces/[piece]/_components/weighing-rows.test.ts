import { describe, expect, it } from 'vitest'
import type { Weighing } from '@/lib/pieces/event'
import type { RestView } from '@/lib/seasoning/rest-view'
import { seriesWords, weighingRows } from './weighing-rows'

const now = new Date('2026-03-05T13:10:00Z')
const reader = { units: 'metric', timeZone: 'Europe/London' } as const
const item = (id: string, on: string, grams: number, isUndone = false): Weighing => ({
  ...{ id, at: `${on}T12:00:00.000Z`, grams, stepG: null, note: '', by: null, isUndone },
})
const items = [
  item('e', '2026-03-01', 412.6),
  item('d', '2026-02-20', 4126, true),
  item('c', '2026-02-01', 414.8),
  item('b', '2026-01-10', 430),
  item('a', '2025-12-01', 440.5),
]
const rest = {
  dryMass: { grams: 371.7, doubtG: 1.5, from: 'oven-dry' },
  series: { openedBy: { kind: 'cut', at: '2026-01-20T12:00:00.000Z' }, weights: 2, earlierWeights: 2 },
} as RestView

describe('lines of weighings', () => {
  it('tell each weight, its change and its moisture, and pass over what was undone', () => {
    const rows = weighingRows(items, rest, reader, now)
    expect(rows.map(({ when, mass, change, mc }) => [when, mass, change, mc])).toEqual([
      ['1 March', '412.6\u00a0g', '−2.2\u00a0g in 4 weeks', '11.0'],
      ['20 February', '4126\u00a0g', '', ''],
      ['1 February', '414.8\u00a0g', '', '11.6'],
      ['10 January', '430\u00a0g', '−10.5\u00a0g in 6 weeks', ''],
      ['1 December 2025', '440.5\u00a0g', '', ''],
    ])
    expect(rows.map(({ isEarlier }) => isEarlier)).toEqual([false, false, false, true, true])
  })

  it('tell no moisture that only the model knows', () => {
    const modelled = { ...rest, dryMass: { grams: 371.7, doubtG: 4, from: 'model' } } as RestView
    expect(weighingRows(items, modelled, reader, now).every(({ mc }) => mc === '')).toBe(true)
  })

  it('say what began the series', () => {
    expect(seriesWords(rest, reader, now)).toBe(
      'A new series began on 20 January (cut). 2 earlier weights can’t be compared with those since.',
    )
    expect(seriesWords({ ...rest, series: { ...rest.series, openedBy: null } }, reader, now)).toBeNull()
  })
})
