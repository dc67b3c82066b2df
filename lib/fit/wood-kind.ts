import { assertInRange } from '@/lib/assert'
import type { WoodKind } from '@/lib/pieces/piece'
import { assertMovement, type InPlaneMovement } from './ovality'

/** What can be said of the movement of a part: figures, or that it isn't worked out and why. */
export type KindMovement =
  | { readonly kind: 'worked-out'; readonly movement: InPlaneMovement; readonly words: string }
  | { readonly kind: 'not-worked-out'; readonly words: string }

export const WILD_WORDS = 'It moves its own way: fit it easy, test it.'
export const STABILISED_WORDS = 'Stabilised wood is not worked out to move; its plain parts do.'
const HYBRID_WORDS = 'Only the plain part of it moves; the resin is taken to stay as it is.'

/**
 * How a part of that kind of wood moves, or that no ovals are drawn for it.
 * @param kind plain; stabilised: soaked with resin; hybrid: part wood, part cast resin; wild: burr, crotch, near the pith
 * @param movement of the plain wood, fractions per % MC, 0 to 0.01
 * @param plainShare share of the joint's diameter that is plain wood, 0 to 1; 1 (an upper figure) where it isn't known.
 *   Counts for a hybrid only
 * @returns the movement to work with, or the words that stand in its place
 * @throws RangeError for an input out of range or NaN
 *
 * Resin takes up next to no water beside wood: common practice, no source. That a hybrid's movement goes with its
 * share of wood: derived, for wood and resin side by side across the joint.
 */
export function movementOfKind(kind: WoodKind, movement: InPlaneMovement, plainShare = 1): KindMovement {
  assertMovement(movement, 0)
  assertInRange('plainShare', plainShare, 0, 1)
  if (kind === 'wild') return { kind: 'not-worked-out', words: WILD_WORDS }
  if (kind === 'stabilised') return { kind: 'not-worked-out', words: STABILISED_WORDS }
  if (kind === 'plain') return { kind: 'worked-out', movement, words: '' }
  return {
    kind: 'worked-out',
    movement: {
      tangentialPerPct: movement.tangentialPerPct * plainShare,
      radialPerPct: movement.radialPerPct * plainShare,
    },
    words: HYBRID_WORDS,
  }
}
