import { CLASS_MOVEMENT_FACTOR, SPECIES_MOVEMENT_FACTOR, TOLD_ALLOWANCE_FACTOR } from '@/lib/doubt/causes'
import { EDGE_OF_EIGHT_IN_TEN, logSpreadEightInTen, logSpreadNineInTen } from '@/lib/doubt/spread'
import type { Allowance } from '@/lib/fit/grades'
import type { WoodMovement } from '@/lib/wood/movement-class'
import type { Spreads } from './used-doubt'

/** How far the movement of a wood may be out: within a species, or within its class where no more is known. */
export const movementLogSpread = ({ assumed }: Pick<WoodMovement, 'assumed'>): number =>
  logSpreadNineInTen(assumed.includes('movement') ? CLASS_MOVEMENT_FACTOR : SPECIES_MOVEMENT_FACTOR)

/** How far an allowance may be out: ±30 % of one told or measured, half either way of a grade's, else 0.08 to 0.27 mm. */
export function allowanceLogSpread({ basis, lowMm, highMm }: Allowance): number {
  return basis === 'told' || basis === 'measured'
    ? logSpreadNineInTen(TOLD_ALLOWANCE_FACTOR)
    : logSpreadEightInTen(lowMm, highMm)
}

/** What is known of a piece's moisture, ± % MC, 8 in 10. */
export type MoistureDoubt = {
  /** Of the moisture content at the cut, against what was followed since. */
  readonly cutPct: number
  /** Of the wood as followed so far, for what it did not hear of. */
  readonly startPct: number
  /** Of the air there against the air that it was followed by. */
  readonly airPct: number
}

/** Every spread of a joint in one place. */
export function spreadsOfJoint(
  joint: { readonly movement: WoodMovement; readonly allowance: Allowance },
  doubt: MoistureDoubt,
): Spreads {
  return {
    movementLog: movementLogSpread(joint.movement),
    allowanceLog: allowanceLogSpread(joint.allowance),
    airPct: doubt.airPct / EDGE_OF_EIGHT_IN_TEN,
    startPct: Math.hypot(doubt.cutPct, doubt.startPct) / EDGE_OF_EIGHT_IN_TEN,
  }
}
