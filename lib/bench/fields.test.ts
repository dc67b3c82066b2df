import { describe, expect, it } from 'vitest'
import { addressText, fieldValue, rangeWords, shownText, type Field, type FieldKind } from './fields'

const field = (kind: FieldKind, min: number, max: number): Field => ({
  label: 'It',
  kind,
  min,
  max,
  start: '',
})

describe('what is typed and what stands in the address', () => {
  it.each([
    ['20', 'temperature', 'metric', '20'],
    [' 20,5 ', 'temperature', 'metric', '20.5'],
    ['−4', 'temperature', 'metric', '-4'],
    ['68', 'temperature', 'imperial', '20'],
    ['1', 'length', 'imperial', '25.4'],
    ['1', 'mass', 'imperial', '28.3495'],
    ['45', 'humidity', 'imperial', '45'],
    ['warm', 'temperature', 'imperial', 'warm'],
    ['', 'length', 'imperial', ''],
  ] as const)('%s as %s, %s, is kept as %s', (typed, kind, units, kept) => {
    expect(addressText(typed, kind, units)).toBe(kept)
  })

  it.each([
    ['70', 'temperature'],
    ['33.5', 'temperature'],
    ['2.441', 'length'],
    ['0.006', 'fine-length'],
    ['14.25', 'mass'],
    ['1413', 'volume'],
    ['440.5', 'weight'],
  ] as const)('%s of a %s comes back as it was typed', (typed, kind) => {
    expect(shownText(addressText(typed, kind, 'imperial'), kind, 'imperial')).toBe(typed)
  })

  it('leaves what is no number as it is', () => {
    expect(shownText('warm', 'temperature', 'imperial')).toBe('warm')
  })
})

describe('refusals', () => {
  it('name the field, its range and its unit, in the unit of the reader', () => {
    expect(fieldValue(field('temperature', -10, 50), '51', 'metric')).toEqual({
      ok: false,
      error: 'It: a number from −10 to 50 °C.',
    })
    expect(fieldValue(field('temperature', -10, 50), '51', 'imperial')).toEqual({
      ok: false,
      error: 'It: a number from 14 to 122 °F.',
    })
    expect(rangeWords(field('length', 0.5, 60), 'imperial')).toBe('a number from 0.02 to 2.362 in')
  })

  it.each(['', ' ', 'NaN', 'Infinity', '1e3', '0x10', '--5', '5 5'])('take "%s" for no number', (text) => {
    expect(fieldValue(field('humidity', 0, 100), text, 'metric').ok).toBe(false)
  })

  it('take both ends of a range', () => {
    expect(fieldValue(field('humidity', 0, 100), '0', 'metric')).toEqual({ ok: true, value: 0 })
    expect(fieldValue(field('humidity', 0, 100), '100', 'metric')).toEqual({ ok: true, value: 100 })
  })
})
