import { describe, expect, it } from 'vitest'
import type { RoomFelt } from '@/lib/rooms/felt'
import { endLabels, feltFigure, focusOf } from './felt-figure'

const hour = (n: number) => new Date(Date.UTC(2026, 2, 1, n)).toISOString()
const at = (n: number) => Date.UTC(2026, 2, 1, n)
const felt = (course: Partial<RoomFelt['course']> = {}): RoomFelt => ({
  wood: { id: null, commonName: null, densityKgM3: 650, isDensityAssumed: true },
  at: hour(5),
  recordFrom: hour(0),
  felt: [],
  course: {
    at: [0, 1, 2, 3, 4, 5].map(hour),
    emcPct: [9, 9.2, null, null, 9.6, 9.8],
    felt: [
      { thicknessMm: 4, mcPct: [9, 9.1, 9.1, 9.2, 9.3, 9.4], doubtPct: [0.5, 0.5, 0.8, 1, 0.7, 0.6] },
      { thicknessMm: 10, mcPct: [8, 8, 8, 8, 8.1, 8.2], doubtPct: [0.5, 0.5, 0.6, 0.7, 0.7, 0.7] },
    ],
    ...course,
  },
  completeTo: hour(5),
  age: 0,
})

describe('the drawing of what wood has felt', () => {
  it('draws no line across a gap, and the doubt goes through it', () => {
    const figure = feltFigure(felt(), null)
    expect(figure?.gaps).toEqual([{ from: at(1), to: at(4) }])
    expect(figure?.air.map((stretch) => stretch.length)).toEqual([2, 2])
    expect(figure?.lines[0]?.stretches.map((stretch) => stretch.length)).toEqual([2, 2])
    expect(figure?.lines[0]?.high).toHaveLength(6)
    expect(figure?.lines[0]?.high[3]?.value).toBeCloseTo(10.2, 9)
  })

  it('a gap at the end reaches to the end, and one before the record begins with the chart', () => {
    expect(feltFigure(felt({ emcPct: [9, 9, 9, 9, null, null] }), null)?.gaps).toEqual([
      { from: at(3), to: at(5) },
    ])
    expect(feltFigure(felt({ emcPct: [null, 9, 9, 9, 9, 9] }), null)?.gaps).toEqual([
      { from: at(0), to: at(1) },
    ])
  })

  it('has its axis round everything that is drawn', () => {
    const axis = feltFigure(felt(), 10)?.axis
    expect(axis?.domain[0]).toBeLessThanOrEqual(7.5)
    expect(axis?.domain[1]).toBeGreaterThanOrEqual(9.8)
  })

  it('puts one’s own thickness in focus, else the middle one', () => {
    expect(focusOf([4, 10, 25], null)).toBe(10)
    expect(focusOf([4, 10, 18, 25], 18)).toBe(18)
    expect(feltFigure(felt(), 10)?.lines.map((line) => line.isFocus)).toEqual([false, true])
  })

  it('draws nothing where nothing was felt', () => {
    expect(feltFigure(felt({ felt: [] }), null)).toBeUndefined()
    expect(feltFigure(felt({ at: [], emcPct: [], felt: [] }), null)).toBeUndefined()
  })

  it('parts the words of lines that end together', () => {
    const placed = endLabels([50, 48, 120], 0, 200)
    expect(Math.abs((placed[0] ?? 0) - (placed[1] ?? 0))).toBeGreaterThanOrEqual(18)
    expect(placed[1]).toBeLessThan(placed[0] ?? 0)
    expect(placed[2]).toBe(120)
  })
})
