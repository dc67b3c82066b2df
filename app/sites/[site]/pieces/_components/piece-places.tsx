import { RoomMark } from '@/app/_components/ui/room-mark'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { coverWords, type PieceDetail } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'

/** Newest first, each with how long and how it sat there. */
export function PiecePlaces({ piece, reader }: { piece: PieceDetail; reader: Reader }) {
  if (piece.places.length === 0) return <p className="text-ink-soft">Nobody has said where it is.</p>
  const now = new Date(reader.at)
  return (
    <ol className="flex flex-col divide-y divide-line">
      {piece.places.map((place) => {
        const end = place.toAt === null ? now : new Date(place.toAt)
        const minutes = (end.getTime() - new Date(place.fromAt).getTime()) / 60_000
        return (
          <li key={place.fromAt} className="flex flex-col py-2">
            <span className="inline-flex items-center gap-2">
              <RoomMark mark={place.room.mark} />
              <span className={place.toAt === null ? 'font-semibold' : undefined}>{place.room.name}</span>
              <span className="text-ink-soft">
                {formatDuration(minutes)}
                {place.toAt === null ? ' so far' : ''}, {coverWords[place.cover]}
              </span>
            </span>
            <span className="text-label text-ink-soft">
              from {formatMoment(place.fromAt, reader.timeZone, now)}
              {place.by ? `, by ${place.by}` : ''}
            </span>
          </li>
        )
      })}
    </ol>
  )
}
