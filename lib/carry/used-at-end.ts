import type { AirFrom, WoodState } from '@/lib/follow/wood-state'
import type { CutMc } from './carry-check'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import type { ResolvedJoint } from './joint-defaults'
import { lossMm } from './joint-loss'
import { type MoistureRun, stayRun } from './stay-run'

const HOUR_MS = 3_600_000

/** Allowance used, as a fraction of it, for slow, middling and quick wood. */
export type UsedAtEnd = { readonly slow: number; readonly middle: number; readonly fast: number }

/**
 * What the model had used of a joint's allowance at the end of a stay that is over.
 * @param start the piece's wood when it began
 * @param airs that it met, from `startsAt` on, at least one
 * @param cut moisture content at the cut; null: counts from the start, as the carry check does
 * @returns fractions, 0 and up, may pass 1
 *
 * The pace is that of the formula with all of its doubt, not what was learned since: `learnedPace` counts from there.
 */
export function usedAtEnd(
  joint: ResolvedJoint,
  start: WoodState,
  airs: readonly AirFrom[],
  span: { readonly startsAt: number; readonly endsAt: number },
  cut: CutMc | null,
): UsedAtEnd {
  const hours = Math.max(0, (span.endsAt - span.startsAt) / HOUR_MS)
  const run = stayRun(joint.filter, start, airs, span.startsAt, hours, UNLEARNED_PACE)
  const used = ({ ring, lid }: MoistureRun): number => {
    const ringPct = ring.at(-1) ?? start.ringPct
    const lidPct = lid.at(-1) ?? start.lidPct
    return usedOf(joint, { ringPct, lidPct }, cut ?? { ringMcPct: start.ringPct, lidMcPct: start.lidPct })
  }
  return { slow: used(run.slow), middle: used(run.middle), fast: used(run.fast) }
}

/** Allowance used by a joint whose two parts stand where they do, as a fraction, 0 and up. */
export const usedOf = (
  joint: Pick<ResolvedJoint, 'loss' | 'allowance'>,
  wood: Pick<WoodState, 'ringPct' | 'lidPct'>,
  cut: Pick<CutMc, 'ringMcPct' | 'lidMcPct'>,
): number =>
  Math.max(0, lossMm(joint.loss, wood.ringPct - cut.ringMcPct, wood.lidPct - cut.lidMcPct)) /
  joint.allowance.allowanceMm
