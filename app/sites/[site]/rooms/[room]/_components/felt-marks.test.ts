import { describe, expect, it } from 'vitest'
import { ruleDomain } from '@/app/_components/charts/rule-model'
import type { RoomFelt } from '@/lib/rooms/felt'
import { feltMarks } from './felt-marks'

const one = (thicknessMm: number, mcPct: number) => ({
  thicknessMm,
  mcPct,
  doubtPct: 0.6,
  unknownShare: 0,
  memoryDays: 30,
})
const felt: RoomFelt = {
  wood: { id: null, commonName: null, densityKgM3: 650, isDensityAssumed: true },
  at: '2026-03-05T13:00:00.000Z',
  recordFrom: '2025-01-05T00:00:00.000Z',
  felt: [one(4, 14.23), one(10, 14.1), one(18, 14), one(25, 6.9)],
  course: { at: [], emcPct: [], felt: [] },
  completeTo: '2026-03-05T13:00:00.000Z',
  age: 0,
}

describe('what wood has felt, below the rule', () => {
  it('is marked for the three thicknesses, whatever else is asked for', () => {
    expect(
      feltMarks(felt, 'metric').map(({ label, sub }) => `${label}, ${sub}`.replaceAll('\u00a0', ' ')),
    ).toEqual(['4 mm wall, felt 14.2', '10 mm wall, felt 14.1', '25 mm wall, felt 6.9'])
    expect(feltMarks(felt, 'imperial')[2]?.label.replaceAll('\u00a0', ' ')).toBe('0.98 in wall')
  })

  it('is on the scale of the rule, however far from the room’s air of now', () => {
    const [low] = ruleDomain({ flags: [], bands: [], brackets: [], shelf: feltMarks(felt, 'metric') })
    expect(low).toBeLessThan(6.9)
  })

  it('is not there before anything was read or fetched', () => {
    expect(feltMarks(undefined, 'metric')).toEqual([])
    expect(feltMarks({ ...felt, felt: [] }, 'metric')).toEqual([])
  })
})
