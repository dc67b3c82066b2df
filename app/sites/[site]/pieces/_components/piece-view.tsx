'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Caution, Cautions } from '@/app/_components/ui/caution'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { PieceOutline } from '@/app/_components/ui/piece-outline'
import { Sheet } from '@/app/_components/ui/sheet'
import { StaleState } from '@/app/_components/ui/states'
import { TextLink } from '@/app/_components/ui/text-link'
import { formatLength } from '@/lib/format/figures'
import type { PieceDetail } from '@/lib/pieces/piece'
import type { PieceFit } from '@/lib/pieces/piece-fit'
import { pieceOutline } from '@/lib/pieces/title'
import type { WeighingsPage } from '@/lib/seasoning/rest-view'
import type { Reader } from '@/lib/sites/reader'
import { FitSheets } from '../[piece]/_components/fit-sheets'
import { type PieceRecordView, RecordSheet } from '../[piece]/_components/record-sheet'
import { RestingSheets } from '../[piece]/_components/resting-sheets'
import type { RoomChoice } from './first-piece'
import { FitSoFar } from './fit-so-far'
import { PieceActions } from './piece-actions'
import { PieceFactsList } from './piece-facts-list'
import { PiecePlaces } from './piece-places'

type PieceViewProps = {
  reader: Reader
  initial: PieceDetail
  /** Null for those who don’t see them. */
  weighings: WeighingsPage | null
  /** Likewise, and null for a piece that is private to somebody else. */
  record: (PieceRecordView & { readonly fit: PieceFit }) | null
  rooms: readonly RoomChoice[]
}

export function PieceView({ reader, initial, weighings, record, rooms }: PieceViewProps) {
  const { data, isError } = useSiteQuery<PieceDetail>({
    site: reader.site,
    area: 'pieces',
    key: ['one', initial.id],
    path: `/pieces/${initial.id}`,
    initial,
  })
  const piece = data ?? initial
  const base = `/sites/${reader.site}`

  return (
    <>
      <div className="flex items-start gap-5 sm:gap-8">
        <span className="shrink-0 pl-4 sm:pl-2">
          <PieceOutline outline={pieceOutline(piece)} isOut={piece.isOut} size={84} />
        </span>
        <PageSentence
          above={
            <span>
              <TextLink href={`${base}/pieces`}>Pieces</TextLink> {shortWords(piece, reader)}
            </span>
          }
        >
          {piece.headline}
        </PageSentence>
      </div>
      {isError ? (
        <StaleState>
          This piece could not be fetched just now. Nothing is lost; these are the last known.
        </StaleState>
      ) : null}
      <PieceActions reader={reader} piece={piece} weighings={weighings} rooms={rooms} />
      {piece.isHidden === true ? (
        <Sheet>
          <p>This piece is private to its maker: others see its number, its room and its time out.</p>
        </Sheet>
      ) : (
        <PieceSheets reader={reader} piece={piece} weighings={weighings} record={record} rooms={rooms} />
      )}
    </>
  )
}

type PieceProps = Omit<PieceViewProps, 'initial'> & { piece: PieceDetail }

function PieceSheets({ reader, piece, weighings, record, rooms }: PieceProps) {
  const fit = record === null ? null : <FitSheets reader={reader} piece={piece} initial={record.fit} />
  return (
    <>
      {piece.stage === 'box' || weighings === null ? <FitSoFar piece={piece} units={reader.units} /> : null}
      {piece.stage === 'box' ? fit : null}
      <RestingSheets reader={reader} piece={piece} initial={weighings} />
      {piece.stage === 'box' ? null : fit}
      <div className="grid gap-7 xl:grid-cols-2">
        <Sheet title="What is known of it" id="facts">
          <PieceFactsList piece={piece} rooms={rooms} reader={reader} />
        </Sheet>
        <Sheet title="Where it has been" id="places">
          <PiecePlaces piece={piece} reader={reader} />
        </Sheet>
      </div>
      {record === null ? null : <RecordSheet reader={reader} piece={piece} initial={record} />}
      <Sheet title="Take care" id="care">
        <div className="flex flex-col gap-3">
          {piece.dust.map((note) => (
            <Caution key={note.text}>
              <strong>Dust:</strong> {note.text} {note.source ? `Source: ${note.source}.` : ''}
            </Caution>
          ))}
          <Cautions cautions={piece.cautions} />
        </div>
      </Sheet>
      {piece.note ? (
        <Sheet title="Note" id="note">
          <p className="max-w-words whitespace-pre-wrap">{piece.note}</p>
        </Sheet>
      ) : null}
    </>
  )
}

function shortWords(piece: PieceDetail, { units }: Reader): string {
  return [
    `Piece ${piece.number}, ${piece.title.toLowerCase()}`,
    piece.jointDiameterMm === null ? '' : `${formatLength(piece.jointDiameterMm, units)} joint`,
    piece.wallMm === null ? '' : `${formatLength(piece.wallMm, units)} wall at the spigot`,
    piece.grain === 'end-grain' ? 'end-grain' : 'side-grain',
  ]
    .filter(Boolean)
    .join(', ')
}
