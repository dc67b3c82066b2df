'use client'

import { Sheet } from '@/app/_components/ui/sheet'
import type { Carry, CarryPiece } from '@/lib/carry/carry'
import { formatCount } from '@/lib/format/figures'
import type { Reader } from '@/lib/sites/reader'
import { OutPiece } from './out-piece'

export type PieceOut = { carry: Carry; piece: CarryPiece }

type OutSheetProps = {
  title: string
  pieces: readonly PieceOut[]
  reader: Reader
  now: Date
  isUrgent?: boolean
}

/** Pieces that are out, the most urgent first. */
export function OutSheet({ title, pieces, reader, now, isUrgent = false }: OutSheetProps) {
  const rooms = [...new Set(pieces.map(({ carry }) => carry.toRoom.name))]
  return (
    <Sheet
      id={isUrgent ? 'out-urgent' : 'out'}
      title={title}
      aside={`${formatCount(pieces.length, 'piece')}, in ${rooms.join(' and ')}`}
      edge={isUrgent ? 'warn' : undefined}
    >
      <ul>
        {pieces.map(({ carry, piece }, index) => (
          <OutPiece
            key={`${carry.id} ${piece.id}`}
            carry={carry}
            piece={piece}
            reader={reader}
            now={now}
            isFirst={isUrgent && index === 0}
          />
        ))}
      </ul>
      <p className="mt-4 text-label text-ink-soft">If the lathe is running, wait where you can be seen.</p>
    </Sheet>
  )
}

/** Each piece of the carries that is still out. */
export const piecesOut = (carries: readonly Carry[]): PieceOut[] =>
  carries.flatMap((carry) =>
    carry.pieces
      .filter((piece) => piece.outAt !== null && piece.backAt === null)
      .map((piece) => ({ carry, piece })),
  )

/** Whether a piece is overdue, or due in within the hour. */
export function isDueSoon({ piece }: PieceOut, now: Date): boolean {
  if (piece.isOverdue) return true
  if (piece.check?.kind !== 'verdict' || piece.check.earlyAt === null) return false
  return new Date(piece.check.earlyAt).getTime() - now.getTime() <= 3_600_000
}
