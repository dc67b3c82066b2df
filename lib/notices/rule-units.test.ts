import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { RuleUnit } from './rule-form'
import { enteredValue, shownValue, unitWord } from './rule-units'

const units: RuleUnit[] = ['min', 'points', 'rh-pct', 'kelvin', 'celsius', 'days']
const system = fc.constantFrom('metric' as const, 'imperial' as const)

describe('a threshold in the reader’s units', () => {
  it('is left as stored, to the last digit, by being shown', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -30, max: 400, noNaN: true }),
        fc.constantFrom(...units),
        system,
        (si, unit, as) => {
          expect(enteredValue(shownValue(si, unit, as), unit, as, si)).toBe(si)
        },
      ),
    )
  })

  it('comes back as typed, to 0.1, whatever the units', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -300, max: 4000 }),
        fc.constantFrom(...units),
        system,
        (tenths, unit, as) => {
          const typed = String(tenths / 10)
          expect(shownValue(enteredValue(typed, unit, as, 1e6), unit, as)).toBe(typed)
        },
      ),
    )
  })

  it('turns a difference and a temperature into °F each in its own way', () => {
    expect(shownValue(4, 'kelvin', 'imperial')).toBe('7.2')
    expect(shownValue(5, 'celsius', 'imperial')).toBe('41')
    expect(unitWord('kelvin', 'imperial')).toBe('°F')
    expect(enteredValue('9', 'kelvin', 'imperial', 4)).toBe(5)
  })

  it('takes a comma, and nothing that is no number', () => {
    expect(enteredValue('1,5', 'points', 'metric', 2)).toBe(1.5)
    for (const text of ['', 'two', '1.2.3', '1e9'])
      expect(enteredValue(text, 'points', 'metric', 2)).toBeNaN()
  })
})
