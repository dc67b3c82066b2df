import { describe, expect, it } from 'vitest'
import { formatLengthFigure, parseLengthMm } from './length-entry'

describe('a length as typed', () => {
  it.each([
    ['62', 62],
    [' 62,5 ', 62.5],
    ['62.5 mm', 62.5],
    ['.5', 0.5],
    ['', null],
    ['  ', null],
  ])('reads %j as millimetres', (text, valueMm) => {
    expect(parseLengthMm(text, 'metric')).toBe(valueMm)
  })

  it('reads inches', () => {
    expect(parseLengthMm('2.5 in', 'imperial')).toBeCloseTo(63.5, 10)
    expect(parseLengthMm('2.5"', 'imperial')).toBeCloseTo(63.5, 10)
  })

  it.each(['-3', '6e1', '1 2', 'about 60', '62.5.1', 'NaN'])('refuses %j', (text) => {
    expect(parseLengthMm(text, 'metric')).toBeNaN()
  })

  it('shows what it reads, both ways', () => {
    for (const units of ['metric', 'imperial'] as const) {
      for (const valueMm of [0.05, 2.5, 62, 123.45]) {
        const again = parseLengthMm(formatLengthFigure(valueMm, units), units)
        expect(Math.abs((again ?? Number.NaN) - valueMm)).toBeLessThan(0.013)
      }
    }
    expect(formatLengthFigure(null, 'metric')).toBe('')
  })
})
