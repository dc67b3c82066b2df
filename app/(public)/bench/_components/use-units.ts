'use client'

import { parseAsStringLiteral, useQueryState } from 'nuqs'
import type { UnitSystem } from '@/lib/sites/site'

const parser = parseAsStringLiteral(['metric', 'imperial'] as const).withDefault('metric')

/** The unit system that the address asks for. */
export function useUnits(): readonly [UnitSystem, (units: UnitSystem) => void] {
  const [units, setUnits] = useQueryState('units', parser)
  return [units, (wanted) => void setUnits(wanted)]
}

/** An address of the bench that keeps the unit system. */
export const withUnits = (path: string, units: UnitSystem): string =>
  units === 'metric' ? path : `${path}${path.includes('?') ? '&' : '?'}units=${units}`
