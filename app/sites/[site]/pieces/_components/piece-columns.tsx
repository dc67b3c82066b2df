import { type Column } from '@/app/_components/ui/data-table'
import { RoomMark } from '@/app/_components/ui/room-mark'
import { TextLink } from '@/app/_components/ui/text-link'
import { formatLength } from '@/lib/format/figures'
import { formatMoment } from '@/lib/format/times'
import { coverWords, type Piece } from '@/lib/pieces/piece'
import { fitGradeWords } from '@/lib/pieces/wording'
import type { Reader } from '@/lib/sites/reader'

export function pieceColumns({ site, timeZone, units, at }: Reader): Column<Piece>[] {
  return [
    {
      id: 'number',
      header: 'Number',
      sort: 'number',
      phone: 'title',
      cell: (piece) => (
        <TextLink
          href={`/sites/${site}/pieces/${piece.id}`}
          className="inline-flex min-h-11 items-center gap-2 font-semibold"
        >
          {piece.number}
          <span className="sm:hidden">{piece.title}</span>
        </TextLink>
      ),
    },
    {
      id: 'title',
      header: 'Piece',
      sort: 'wood',
      phone: 'hidden',
      cell: (piece) => piece.title,
    },
    {
      id: 'room',
      header: 'Where',
      sort: 'room',
      phone: 'bare',
      cell: (piece) => <Where piece={piece} timeZone={timeZone} at={at} />,
    },
    {
      id: 'joint',
      header: 'Joint',
      align: 'right',
      phone: 'line',
      cell: (piece) =>
        piece.jointDiameterMm === null ? (
          <span className="text-ink-soft">not told</span>
        ) : (
          formatLength(piece.jointDiameterMm, units)
        ),
    },
    {
      id: 'fit',
      header: 'Fit',
      phone: 'line',
      cell: (piece) =>
        piece.fitGrade === null ? (
          <span className="text-ink-soft">{piece.stage === 'box' ? 'not told' : 'none yet'}</span>
        ) : (
          fitGradeWords[piece.fitGrade].label
        ),
    },
    {
      id: 'keep',
      header: 'Kept for',
      phone: 'line',
      cell: (piece) =>
        piece.keepRoom === null ? <span className="text-ink-soft">not told</span> : piece.keepRoom.name,
    },
  ]
}

function Where({ piece, timeZone, at }: { piece: Piece; timeZone: string; at: string }) {
  if (piece.room === null) return <span className="text-ink-soft">not told</span>
  return (
    <span className="inline-flex flex-wrap items-center gap-x-2">
      <RoomMark mark={piece.room.mark} />
      <span className={piece.isOut ? 'bg-wash px-1 font-semibold' : undefined}>{piece.room.name}</span>
      {piece.isOut && piece.since ? (
        <span className="text-ink-soft">
          out since {formatMoment(piece.since, timeZone, new Date(at))}, {coverWords[piece.cover]}
        </span>
      ) : null}
    </span>
  )
}
