import type { z } from 'zod'
import type { Carry } from '@/lib/carry/carry'
import { formatCount } from '@/lib/format/figures'
import type { ruleBracketSchema, ruleShelfSchema } from './now-view'

export type RuleBracket = z.infer<typeof ruleBracketSchema>
export type RuleShelf = z.infer<typeof ruleShelfSchema>

/** A plan this near is "about to go" and gets its bracket. */
const aboutToGoMs = 2 * 3_600_000
/** Pieces nearer than this would stand on one another on the rule. */
const overlapPct = 0.3

/** How far each joint that is out, or about to go, may move from where it was cut. */
export function ruleBrackets(carries: readonly Carry[], now: Date): RuleBracket[] {
  return carries
    .filter(
      (carry) => carry.state === 'out' || new Date(carry.plannedAt).getTime() - now.getTime() <= aboutToGoMs,
    )
    .flatMap((carry) =>
      carry.pieces.flatMap((piece) => {
        const { check } = piece
        if (check?.kind !== 'verdict') return []
        const { cutMcPct, ringMcPct, allowedMcPct } = check
        // Of a piece that is private to another, where its wood stands is not told.
        if (cutMcPct === null || ringMcPct === null || allowedMcPct === null) return []
        return {
          id: piece.id,
          number: piece.number,
          cutMcPct,
          mcPct: ringMcPct,
          lowMcPct: cutMcPct - allowedMcPct,
          highMcPct: cutMcPct + allowedMcPct,
          isOut: piece.outAt !== null && piece.backAt === null,
          earlyAt: check.earlyAt,
          leftPct: Math.max(0, allowedMcPct - Math.abs(ringMcPct - cutMcPct)),
        }
      }),
    )
}

export interface ShelfPiece {
  number: string
  title: string
  outline: RuleShelf['outline']
  isOut: boolean
  mcPct: number
}

/** Pieces from dry to damp; those that would overlap stand as one group. What is out stands by itself. */
export function ruleShelf(pieces: readonly ShelfPiece[]): RuleShelf[] {
  const groups: ShelfPiece[][] = []
  for (const piece of pieces.toSorted((a, b) => a.mcPct - b.mcPct)) {
    const group = groups.findLast((one) => one[0]?.isOut === piece.isOut)
    const first = group?.[0]
    if (group !== undefined && first !== undefined && piece.mcPct - first.mcPct < overlapPct)
      group.push(piece)
    else groups.push([piece])
  }
  return groups.map((group) => shelfOf(group)).toSorted((a, b) => a.mcPct - b.mcPct)
}

function shelfOf(group: readonly ShelfPiece[]): RuleShelf {
  const [first] = group
  const count = group.length
  const mcPct = group.reduce((sum, piece) => sum + piece.mcPct, 0) / Math.max(1, count)
  const numbers = group.map((piece) => piece.number)
  return {
    mcPct,
    label: count === 1 ? (first?.number ?? '') : formatCount(count, 'piece'),
    sub: count === 1 ? (first?.title ?? '') : numbers.slice(0, 4).join(', ') + (count > 4 ? ', …' : ''),
    outline: first?.outline ?? 'low',
    isOut: first?.isOut ?? false,
    count,
  }
}
