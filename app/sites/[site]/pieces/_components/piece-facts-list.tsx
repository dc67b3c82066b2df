import { formatFineLength, formatLength } from '@/lib/format/figures'
import type { PieceDetail } from '@/lib/pieces/piece'
import { fitGradeWords, grainWords, stageWords, woodKindWords } from '@/lib/pieces/wording'
import type { Reader } from '@/lib/sites/reader'

type PieceFactsListProps = {
  piece: PieceDetail
  reader: Reader
  rooms: readonly { id: string; name: string }[]
}

/** What was told; what was not is listed below as assumed, never mixed in. */
export function PieceFactsList({ piece, reader, rooms }: PieceFactsListProps) {
  const length = (valueMm: number | null) => (valueMm === null ? null : formatLength(valueMm, reader.units))
  const fine = (valueMm: number | null) => (valueMm === null ? null : formatFineLength(valueMm, reader.units))
  const fittedRoom = rooms.find((room) => room.id === piece.fittedRoomId)?.name
  const facts: [string, string | null][] = [
    ['Wood', piece.woodName],
    ['It is', `${stageWords[piece.stage]}, ${woodKindWords[piece.woodKind]}`],
    ['Grain', grainWords[piece.grain]],
    ['Joint', length(piece.jointDiameterMm)],
    ['Wall at the spigot', length(piece.wallMm)],
    ['Spigot', spigotWords(piece, length(piece.spigotMm))],
    ['Lid', lidWords(piece, length(piece.lidMm))],
    ['Body wall', piece.stage === 'blank' ? null : length(piece.bodyWallMm)],
    ['Wall of the lid', piece.stage === 'box' ? length(piece.lidWallMm) : null],
    ['Thick', piece.stage === 'blank' ? length(piece.blankDiameterMm) : null],
    ['Ends', piece.stage !== 'box' && piece.endsSealed ? 'sealed' : null],
    ['Roughed out', piece.stage === 'box' || piece.roughedOn === null ? null : roughedWords(piece.roughedOn)],
    ['Ready', piece.stage !== 'box' && piece.isReadyByWeight ? 'by weight alone, as its maker set it' : null],
    ['Fit, by hand', piece.fitGrade === null ? null : fitGradeWords[piece.fitGrade].label.toLowerCase()],
    ['Clearance, measured', fine(piece.clearanceMm)],
    ['It may lose', fine(piece.allowanceMm)],
    ['Fitted', fittedWords(piece.fittedOn, fittedRoom)],
    ['Kept for', piece.keepRoom?.name ?? null],
    ['Finish', piece.finish || null],
  ]
  return (
    <>
      <dl className="grid grid-cols-[minmax(0,2fr)_minmax(0,3fr)] gap-x-4 gap-y-2">
        {facts.map(([name, value]) =>
          value === null ? null : (
            <div key={name} className="contents">
              <dt className="text-ink-soft">{name}</dt>
              <dd>{value}</dd>
            </div>
          ),
        )}
      </dl>
      {piece.assumed.length > 0 ? (
        <div className="mt-5 border-t border-line pt-4">
          <h3 className="font-semibold">Assumed, so the doubt is wider</h3>
          <ul className="mt-1 list-disc pl-5 text-ink-soft">
            {piece.assumed.map((phrase) => (
              <li key={phrase}>{phrase}</li>
            ))}
          </ul>
        </div>
      ) : null}
      {piece.isPrivate || piece.isShared ? (
        <p className="mt-4 text-label text-ink-soft">
          {piece.isPrivate ? 'Private: others see its number, room and time out. ' : ''}
          {piece.isShared ? 'Shared with onlookers.' : ''}
        </p>
      ) : null}
    </>
  )
}

function spigotWords(piece: PieceDetail, length: string | null): string | null {
  if (piece.stage !== 'box') return null
  const where = piece.spigotOn === 'base' ? 'on the base: the lid goes over' : 'on the lid: it drops in'
  return length === null ? where : `${length} long, ${where}`
}

function lidWords(piece: PieceDetail, length: string | null): string | null {
  if (piece.stage !== 'box') return null
  const form = piece.lidForm === 'plug' ? 'solid' : 'hollow'
  return length === null ? form : `${form}, ${length} thick`
}

/** A calendar day has no zone, so it is written as that of UTC. */
const roughedWords = (on: string): string =>
  new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: 'UTC' }).format(new Date(on))

/** "in March 2026, in the cupboard". The month counts, so the day is not shown. */
function fittedWords(fittedOn: string | null, room: string | undefined): string | null {
  if (fittedOn === null && room === undefined) return null
  const month =
    fittedOn === null
      ? ''
      : new Intl.DateTimeFormat('en-GB', { month: 'long', year: 'numeric', timeZone: 'UTC' }).format(
          new Date(fittedOn),
        )
  return [month, room === undefined ? '' : `in ${room}`].filter(Boolean).join(', ')
}
