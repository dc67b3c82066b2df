import {
  formatEmc,
  formatFineLength,
  formatHumidity,
  formatLength,
  formatMass,
  formatPoints,
  formatTemperature,
} from '@/lib/format/figures'
import type { UnitSystem } from '@/lib/sites/site'

type UnitFigureProps = {
  kind: 'temperature' | 'humidity' | 'emc' | 'points' | 'length' | 'fine-length' | 'mass'
  value: number
  units?: UnitSystem
}

const formats: Record<UnitFigureProps['kind'], (value: number, units: UnitSystem) => string> = {
  temperature: formatTemperature,
  humidity: formatHumidity,
  emc: formatEmc,
  points: formatPoints,
  length: formatLength,
  'fine-length': formatFineLength,
  mass: formatMass,
}

/** A figure with its unit, in the reader's own system. */
export function UnitFigure({ kind, value, units = 'metric' }: UnitFigureProps) {
  return <span className="whitespace-nowrap">{formats[kind](value, units)}</span>
}
