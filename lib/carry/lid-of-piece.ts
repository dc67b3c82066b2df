import { startDoubtPct } from '@/lib/follow/doubt'
import type { WoodState } from '@/lib/follow/wood-state'
import { cutClearance, type LidJoint, type LidPlace, paceDoubtPct } from '@/lib/fit/lid-place'
import { movementOfKind } from '@/lib/fit/wood-kind'
import type { CarryCheckInput, CutMc, PieceFacts } from './carry-check'
import { jointOfPiece } from './joint-defaults'
import { PACE_NODE, stayRun } from './stay-run'

/** A piece's lid as it can be drawn; or the words that stand in its place. */
export type LidOfPiece =
  | {
      readonly kind: 'words'
      readonly reason: 'not-a-box' | 'wild-grain' | 'stabilised' | 'threaded' | 'no-joint' | 'no-history'
      readonly words: string
    }
  | {
      readonly kind: 'joint'
      readonly joint: LidJoint
      readonly now: LidPlace
      /** Of the moisture content at the cut, ± % MC; 0 where the joint counts from what it is now. */
      readonly cutDoubtPct: number
      /** Nobody has said when or where it was cut: it counts from now. */
      readonly isCutAssumed: boolean
      /** What to know about the kind of wood; empty for plain wood. */
      readonly words: string
      readonly assumed: readonly string[]
    }

const words = (reason: (LidOfPiece & { kind: 'words' })['reason'], text: string): LidOfPiece => ({
  kind: 'words',
  reason,
  words: text,
})

/**
 * The lid of a piece, from when its joint was cut to now.
 * @param wood as followed to now; null where nothing is known of the air that it was in
 * @param cut moisture content at the cut; null: taken as its present one
 */
export function lidOfPiece(facts: PieceFacts, wood: WoodState | null, cut: CutMc | null): LidOfPiece {
  if (facts.stage !== 'box') return words('not-a-box', 'Its joint is still to be cut.')
  if (facts.fitGrade === 'threaded')
    return words(
      'threaded',
      'Threads aren’t worked out: leave them easy, try the lid after each carry, and tell how it turned.',
    )
  const joint = jointOfPiece(facts)
  if (facts.woodKind !== 'wild' && facts.woodKind !== 'stabilised' && joint === undefined)
    return words('no-joint', 'Tell how wide the joint is, and the lid is drawn here.')
  const moves = movementOfKind(facts.woodKind, joint?.inPlane ?? { tangentialPerPct: 0, radialPerPct: 0 })
  if (moves.kind === 'not-worked-out')
    return words(facts.woodKind === 'wild' ? 'wild-grain' : 'stabilised', moves.words)
  if (joint === undefined) return words('no-joint', 'Tell how wide the joint is, and the lid is drawn here.')
  if (wood === null)
    return words('no-history', 'Nothing is known yet of the air that it has been in. A reading begins it.')
  return {
    kind: 'joint',
    joint: {
      diameterMm: joint.diameterMm,
      ...cutClearance(facts, joint.allowance),
      movement: moves.movement,
      movementDoubt: joint.movement.movementDoubt,
      spigotOn: facts.spigotOn,
      cut: {
        ringMcPct: cut?.ringMcPct ?? wood.ringPct,
        lidMcPct: cut?.lidMcPct ?? wood.lidPct,
      },
    },
    now: {
      ringMcPct: wood.ringPct,
      lidMcPct: wood.lidPct,
      doubtPct: cut === null ? 0 : Math.hypot(cut.doubtPct, startDoubtPct(wood)),
    },
    cutDoubtPct: cut?.doubtPct ?? 0,
    isCutAssumed: cut === null,
    words: moves.words,
    assumed: joint.assumed,
  }
}

/**
 * Where a lid's wood stands at the end of a stay, with its doubt: pace, the air there, the start, the cut.
 * @param input as for `carryCheck`; its air there must be fresh
 * @returns undefined where the piece has no joint, or nothing is known of its air
 *
 * What errs apart goes together as a root of the sum of squares (JCGM 100:2008). Status: derived.
 */
export function placeAfterStay(input: CarryCheckInput): LidPlace | undefined {
  const joint = jointOfPiece(input.piece)
  const { start, airs, startsAt } = input
  if (joint === undefined || start === null || airs.length === 0) return undefined
  const { slow, middle, fast, perPoint } = stayRun(
    joint.filter,
    start,
    airs,
    startsAt,
    input.stayMinutes / 60,
    input.pace,
  )
  const ringMcPct = middle.ring.at(-1) ?? start.ringPct
  const lidMcPct = middle.lid.at(-1) ?? start.lidPct
  const pace = Math.max(
    paceDoubtPct(slow.ring.at(-1) ?? ringMcPct, fast.ring.at(-1) ?? ringMcPct, PACE_NODE),
    paceDoubtPct(slow.lid.at(-1) ?? lidMcPct, fast.lid.at(-1) ?? lidMcPct, PACE_NODE),
  )
  const followed = Math.max(perPoint.ring.at(-1) ?? 0, perPoint.lid.at(-1) ?? 0)
  const before = input.cut === null ? 0 : Math.hypot(input.cut.doubtPct, startDoubtPct(start))
  return {
    ringMcPct,
    lidMcPct,
    doubtPct: Math.hypot(pace, followed * input.airDoubtPct, before),
  }
}
