import type { UnitSystem } from '@/lib/sites/site'
import { celsiusFromFahrenheit, fahrenheitFromCelsius } from '@/lib/units'
import type { RuleUnit } from './rule-form'

/** One kelvin of difference in °F. */
const FAHRENHEIT_PER_KELVIN = 1.8

const isFahrenheit = (unit: RuleUnit, units: UnitSystem): boolean =>
  units === 'imperial' && (unit === 'kelvin' || unit === 'celsius')

/** The word behind a number: "min", "points", "% RH". A count has none. */
export function unitWord(unit: RuleUnit, units: UnitSystem, value?: number): string {
  if (unit === 'kelvin' || unit === 'celsius') return units === 'imperial' ? '°F' : '°C'
  if (unit === 'points') return value === 1 ? 'point' : 'points'
  if (unit === 'days') return value === 1 ? 'day' : 'days'
  return {
    min: 'min',
    h: 'h',
    'emc-pct': '% MC',
    'rh-pct': '% RH',
    'used-pct': '% used',
    'charge-pct': '% of its charge',
    count: '',
  }[unit]
}

/** A stored value as its field shows it in the reader's units, to 0.1 and without an idle nought. */
export function shownValue(value: number, unit: RuleUnit, units: UnitSystem): string {
  return String(Math.round(inUnits(value, unit, units) * 10) / 10)
}

function inUnits(value: number, unit: RuleUnit, units: UnitSystem): number {
  if (!isFahrenheit(unit, units)) return value
  return unit === 'kelvin' ? value * FAHRENHEIT_PER_KELVIN : fahrenheitFromCelsius(value)
}

/**
 * What a field's text means in SI. Text that still says what was shown means the stored value itself, to the last
 * digit: looking at a rule in other units changes nothing.
 * @returns NaN for anything that is no number
 */
export function enteredValue(text: string, unit: RuleUnit, units: UnitSystem, stored: number): number {
  const bare = text.trim().replace(',', '.').replace('−', '-')
  if (bare === shownValue(stored, unit, units)) return stored
  if (!/^-?\d{1,6}(\.\d{1,4})?$/.test(bare)) return Number.NaN
  const value = Number(bare)
  if (!isFahrenheit(unit, units)) return value
  const si = unit === 'kelvin' ? value / FAHRENHEIT_PER_KELVIN : celsiusFromFahrenheit(value)
  // Six places are far finer than anything shown, and keep the stored figure short.
  return Math.round(si * 1e6) / 1e6
}
