import { describe, expect, it } from 'vitest'
import { formatMassFigure, parseMassG } from './mass-entry'

describe('a mass as typed', () => {
  it.each([
    ['183', 183],
    [' 183,5 g ', 183.5],
    ['.5', 0.5],
    ['', null],
  ])('%j is %j g', (text, grams) => {
    expect(parseMassG(text, 'metric')).toBe(grams)
  })

  it.each(['abc', '1 8', '-3', '1.2.3'])('%j is no number', (text) => {
    expect(parseMassG(text, 'metric')).toBeNaN()
  })

  it('is read in the reader’s own unit, and comes back as it was', () => {
    expect(parseMassG('6.5 oz', 'imperial')).toBeCloseTo(184.27, 2)
    expect(formatMassFigure(parseMassG('6.125', 'imperial'), 'imperial')).toBe('6.125')
    expect(formatMassFigure(183.456, 'metric')).toBe('183.46')
    expect(formatMassFigure(null, 'metric')).toBe('')
  })
})
