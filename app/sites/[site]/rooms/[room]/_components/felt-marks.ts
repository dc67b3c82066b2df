import type { RuleShelfItem } from '@/app/_components/charts/rule-model'
import { formatEmcFigure, formatLength } from '@/lib/format/figures'
import { FELT_THICKNESSES_MM, type RoomFelt } from '@/lib/rooms/felt'
import type { UnitSystem } from '@/lib/sites/site'

/** What wood of that thickness is part of, by its outline. */
const OUTLINES = ['tall', 'low', 'pair'] as const

/** The three thicknesses below the rule; none where the room was never read. */
export function feltMarks(felt: RoomFelt | undefined, units: UnitSystem): RuleShelfItem[] {
  return FELT_THICKNESSES_MM.flatMap((thicknessMm, n) => {
    const one = felt?.felt.find((own) => own.thicknessMm === thicknessMm)
    if (one === undefined) return []
    return {
      id: `felt-${String(thicknessMm)}`,
      mcPct: one.mcPct,
      label: `${formatLength(thicknessMm, units)} wall`,
      sub: `felt ${formatEmcFigure(one.mcPct)}`,
      outline: OUTLINES[n] ?? 'pair',
      isOut: false,
      count: 1,
    }
  })
}
