import { describe, expect, it } from 'vitest'
import type { BetterHour } from './better-hours'
import { hourToPutOffTo } from './put-off'

const hour = (
  startsAt: string,
  worst: BetterHour['worst'],
  usedAtEnd: number,
  ifLitAt: string | null = null,
) => ({
  startsAt,
  ifLitAt,
  verdicts: [],
  worst,
  usedAtEnd,
  emcPct: 12,
})
const planned = new Date('2026-02-10T14:30:00Z')

describe('the hour that a plan is put off to', () => {
  it('is the best one that keeps the fit', () => {
    const hours = [hour('2026-02-11T10:00:00Z', 'fine', 0.3), hour('2026-02-10T14:00:00Z', 'leave', 1.4)]
    expect(hourToPutOffTo(hours, planned)).toEqual(new Date('2026-02-11T10:00:00Z'))
  })

  it('is none where nothing betters the one planned', () => {
    const same = [
      hour('2026-02-11T10:00:00Z', 'keep-short', 0.58),
      hour('2026-02-10T14:00:00Z', 'keep-short', 0.6),
    ]
    expect(hourToPutOffTo(same, planned)).toBeUndefined()
    const bad = [hour('2026-02-11T10:00:00Z', 'leave', 1.1), hour('2026-02-10T14:00:00Z', 'leave', 2)]
    expect(hourToPutOffTo(bad, planned)).toBeUndefined()
    expect(hourToPutOffTo([], planned)).toBeUndefined()
  })

  it('never counts on a stove that somebody would have to light', () => {
    const hours = [
      hour('2026-02-11T10:00:00Z', 'fine', 0.2, '2026-02-11T08:00:00Z'),
      hour('2026-02-11T13:00:00Z', 'keep-short', 0.7),
      hour('2026-02-10T14:00:00Z', 'leave', 1.4),
    ]
    expect(hourToPutOffTo(hours, planned)).toEqual(new Date('2026-02-11T13:00:00Z'))
  })
})
