import type { UnitSystem } from '@/lib/sites/site'
import type { RestingWeight } from './resting-curve'

export type ReadyQuestion = {
  readonly now: number
  /** The current series in order of time: grams as weighed, correctedG without the room's drift where that is known. */
  readonly weights: readonly RestingWeight[]
  readonly stepG: number
  /** MC of the piece now with its doubt, ± points (middle 8 in 10); undefined where neither model nor weight tells. */
  readonly mc: { readonly pct: number; readonly doubtPct: number } | undefined
  /** Middle of twelve months of EMC at the home, or in the keep room where no home is set. */
  readonly target: { readonly pct: number; readonly of: 'home' | 'keep-room' } | undefined
  /** Undefined: not known. */
  readonly roughedAt: number | undefined
  /** Undefined: it has not been turned to near its final size, and that rest does not apply. */
  readonly nearFinalAt?: number | undefined
  /** The maker has said that the weights alone are to decide. */
  readonly readyByWeight: boolean
  readonly units?: UnitSystem | undefined
}
