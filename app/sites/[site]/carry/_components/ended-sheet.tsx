import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { type Carry, type CarryPiece, hasLid } from '@/lib/carry/carry'
import { formatDuration, formatMoment } from '@/lib/format/times'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { TurnedAfterCarry } from '../../_components/turned-after-carry'

/** What came back, from where and after how long. */
export function EndedSheet({ carry, reader, now }: { carry: Carry; reader: Reader; now: Date }) {
  const shown = carry.pieces.filter((piece) => piece.outAt === null || piece.backAt !== null)
  return (
    <Sheet
      id="ended"
      title={carry.state === 'called-off' ? 'What did not go' : 'What is back'}
      aside={carry.againstAdvice ? 'went against the advice' : undefined}
    >
      <ul>
        {shown.map((piece) => (
          <li key={piece.id} className="flex items-center gap-4 border-b border-line py-3 last:border-b-0">
            <PieceOutline outline={piece.outline} />
            <div className="min-w-0 grow">
              <p>
                <TextLink href={`/sites/${reader.site}/pieces/${piece.id}`} className="font-semibold">
                  {piece.number}
                </TextLink>{' '}
                {piece.title}
                <span className="block text-label text-ink-soft">
                  {backWords(carry, piece, reader.timeZone, now)}
                </span>
              </p>
              {isAskedFor(piece, reader, now) ? (
                <TurnedAfterCarry
                  reader={reader}
                  pieceId={piece.id}
                  number={piece.number}
                  carryId={carry.id}
                  isAskSkipped={piece.isAskSkipped}
                  className="mt-2"
                />
              ) : null}
            </div>
          </li>
        ))}
      </ul>
      {carry.note ? <p className="mt-3 max-w-words">{carry.note}</p> : null}
    </Sheet>
  )
}

/** A lid remembers what it has gone through for some days; later, its page takes what is told. */
const ASKED_FOR_MS = 3 * 86_400_000

const isAskedFor = (piece: CarryPiece, reader: Reader, now: Date): boolean =>
  may(reader.role, 'pieces:record') &&
  hasLid(piece) &&
  piece.backAt !== null &&
  now.getTime() - new Date(piece.backAt).getTime() < ASKED_FOR_MS

function backWords(carry: Carry, piece: CarryPiece, timeZone: string, now: Date): string {
  if (piece.outAt === null || piece.backAt === null) return `was down to go to ${carry.toRoom.name}`
  const minutes = (new Date(piece.backAt).getTime() - new Date(piece.outAt).getTime()) / 60_000
  return `${carry.toRoom.name}, ${formatMoment(piece.outAt, timeZone, now)}; back after ${formatDuration(minutes)}`
}
