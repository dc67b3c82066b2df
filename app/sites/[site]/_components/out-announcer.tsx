'use client'

import { formatDuration } from '@/lib/format/times'
import type { PieceOut } from './out-sheet'

/** Minutes left at which a reader who can't see the bars is told, and nothing between. */
const TOLD_AT = [0, 10, 30] as const

/** Says aloud a changed verdict and 30, 10 and 0 minutes left: the text changes only then, so only then is it read out. */
export function OutAnnouncer({ pieces, now }: { pieces: readonly PieceOut[]; now: Date }) {
  const words = pieces.flatMap(({ piece }) => {
    const { check } = piece
    if (check?.kind === 'unknown') return [`${piece.number}: no fresh reading.`]
    if (check?.kind !== 'verdict' || check.earlyAt === null) return []
    const minutes = (new Date(check.earlyAt).getTime() - now.getTime()) / 60_000
    const step = TOLD_AT.find((told) => minutes <= told)
    if (step === undefined) return []
    return [
      step === 0 ? `${piece.number} is overdue.` : `${piece.number}: under ${formatDuration(step)} left.`,
    ]
  })
  return (
    <p role="status" className="sr-only">
      {words.join(' ')}
    </p>
  )
}
