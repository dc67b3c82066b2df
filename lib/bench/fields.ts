import { err, ok, type Result } from '@/lib/result'
import type { UnitSystem } from '@/lib/sites/site'
import {
  celsiusFromFahrenheit,
  cubicFeetFromCubicMetres,
  cubicMetresFromCubicFeet,
  fahrenheitFromCelsius,
  gramsFromOunces,
  inchesFromMm,
  kilogramsFromPounds,
  mmFromInches,
  ouncesFromGrams,
  poundsFromKilograms,
} from '@/lib/units'

export type FieldKind =
  | 'temperature'
  | 'humidity'
  | 'moisture'
  | 'length'
  | 'fine-length'
  | 'mass'
  | 'volume'
  | 'weight'
  | 'heat-loss'
  | 'days'
  | 'per-hour'

/** One number of a bench page. Its range is that of the API's query, which a test holds it to. */
export type Field = {
  /** What is asked, for labels and refusals: "Temperature in the shop". */
  readonly label: string
  readonly kind: FieldKind
  /** In °C, % RH, % MC, mm, g, m³, kg, W/K or days. */
  readonly min: number
  readonly max: number
  /** What stands there to begin with, in the same unit. */
  readonly start: string
  /** May be left empty: not known. */
  readonly isOptional?: true
}

type Scale = {
  readonly unit: string
  /** Decimals that a figure of this unit is shown with at most. */
  readonly shown: number
  readonly fromSi: (value: number) => number
  readonly toSi: (value: number) => number
}

const itself = (value: number): number => value
const plain = (unit: string, shown: number): Scale => ({ unit, shown, fromSi: itself, toSi: itself })

const METRIC: Readonly<Record<FieldKind, Scale>> = {
  temperature: plain('°C', 2),
  humidity: plain('% RH', 1),
  moisture: plain('% MC', 2),
  length: plain('mm', 2),
  'fine-length': plain('mm', 3),
  mass: plain('g', 2),
  volume: plain('m³', 2),
  weight: plain('kg', 2),
  'heat-loss': plain('W/K', 1),
  days: plain('days', 2),
  'per-hour': plain('an hour', 2),
}

/** What has no other unit in the imperial system stays as it is: percent, days, and watts for a kelvin. */
const IMPERIAL: Readonly<Record<FieldKind, Scale>> = {
  ...METRIC,
  temperature: { unit: '°F', shown: 1, fromSi: fahrenheitFromCelsius, toSi: celsiusFromFahrenheit },
  length: { unit: 'in', shown: 3, fromSi: inchesFromMm, toSi: mmFromInches },
  'fine-length': { unit: 'in', shown: 4, fromSi: inchesFromMm, toSi: mmFromInches },
  mass: { unit: 'oz', shown: 3, fromSi: ouncesFromGrams, toSi: gramsFromOunces },
  volume: { unit: 'ft³', shown: 0, fromSi: cubicFeetFromCubicMetres, toSi: cubicMetresFromCubicFeet },
  weight: { unit: 'lb', shown: 1, fromSi: poundsFromKilograms, toSi: kilogramsFromPounds },
}

const scaleOf = (kind: FieldKind, units: UnitSystem): Scale => (units === 'metric' ? METRIC : IMPERIAL)[kind]

export const unitOf = (kind: FieldKind, units: UnitSystem): string => scaleOf(kind, units).unit

/** Decimals kept of what was typed in another unit, so that it comes back as it was typed. */
const KEPT_DECIMALS = 4
const NUMBER = /^-?(\d{1,7}(\.\d{0,6})?|\.\d{1,6})$/

const rounded = (value: number, decimals: number): number => {
  const factor = 10 ** decimals
  return Math.round(value * factor) / factor
}

/**
 * What was typed, as it stands in the address: a number in the metric unit, or the text itself where it is none, so
 * that a link shows the same refusal.
 * @param typed as typed; a comma counts as a point, a printed minus as a hyphen
 */
export function addressText(typed: string, kind: FieldKind, units: UnitSystem): string {
  const bare = typed.trim().replace(',', '.').replace('−', '-').slice(0, 20)
  if (units === 'metric' || !NUMBER.test(bare)) return bare
  const scale = scaleOf(kind, units)
  return scale.toSi === itself ? bare : String(rounded(scale.toSi(Number(bare)), KEPT_DECIMALS))
}

/** What stands in the field: the address's number in the reader's unit, or the text itself where it is none. */
export function shownText(text: string, kind: FieldKind, units: UnitSystem): string {
  if (!NUMBER.test(text)) return text
  const scale = scaleOf(kind, units)
  return scale.fromSi === itself ? text : String(rounded(scale.fromSi(Number(text)), scale.shown))
}

const printed = (value: number): string => String(value).replace('-', '−')

/** "a number from −10 to 50 °C", in the reader's unit. */
export function rangeWords(field: Pick<Field, 'kind' | 'min' | 'max'>, units: UnitSystem): string {
  const scale = scaleOf(field.kind, units)
  const end = (value: number) =>
    printed(rounded(scale.fromSi(value), scale.fromSi === itself ? 6 : scale.shown))
  return `a number from ${end(field.min)} to ${end(field.max)} ${scale.unit}`
}

/**
 * The number that stands in the address, within the field's range.
 * @param text as `addressText` gives it
 * @returns metric; or words that name the field, its range and its unit
 */
export function fieldValue(field: Field, text: string, units: UnitSystem): Result<number, string> {
  const refusal = err(`${field.label}: ${rangeWords(field, units)}.`)
  if (!NUMBER.test(text)) return refusal
  const value = Number(text)
  return value >= field.min && value <= field.max ? ok(value) : refusal
}
