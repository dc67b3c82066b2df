'use client'

import { ButtonLink } from '@/app/_components/ui/button-link'
import type { PieceDetail } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import type { WeighingsPage } from '@/lib/seasoning/rest-view'
import type { Reader } from '@/lib/sites/reader'
import { ReTrue } from '../[piece]/_components/re-true'
import { WeighIt } from '../[piece]/_components/weigh-it'
import type { RoomChoice } from './first-piece'
import { MovePiece } from './move-piece'
import { PutAway } from './put-away'

type PieceActionsProps = {
  reader: Reader
  piece: PieceDetail
  weighings: WeighingsPage | null
  rooms: readonly RoomChoice[]
}

/** What this reader may do with the piece as it stands; nothing that would be refused. */
export function PieceActions({ reader, piece, weighings, rooms }: PieceActionsProps) {
  const base = `/sites/${reader.site}`
  const isAround = piece.isArchived !== true
  const mayCarry = may(reader.role, 'carries:do') && isAround
  const mayMove = may(reader.role, 'pieces:move') && isAround && !piece.isOut
  const mayChange = may(reader.role, 'pieces:change') && piece.isHidden !== true
  // A piece that rests waits to be weighed; the carry stands behind that, unless it is out.
  const weighsFirst = piece.stage !== 'box' && weighings !== null && isAround && !piece.isOut
  if (!mayCarry && !mayMove && !mayChange) return null
  return (
    <div className="flex flex-wrap gap-3 px-4 sm:px-0">
      {weighsFirst ? <WeighIt reader={reader} piece={piece} initial={weighings} isFilled /> : null}
      {mayCarry ? (
        <ButtonLink
          href={piece.isOut ? `${base}/carry` : `${base}/carry?pieces=${piece.id}`}
          variant={weighsFirst ? undefined : 'filled'}
          className={weighsFirst ? 'max-sm:grow' : 'max-sm:w-full'}
        >
          {piece.isOut ? 'Bring it back' : 'Check a carry'}
        </ButtonLink>
      ) : null}
      {mayMove ? <MovePiece reader={reader} piece={piece} rooms={rooms} /> : null}
      {mayChange && isAround && piece.stage === 'box' ? <ReTrue reader={reader} piece={piece} /> : null}
      {mayChange && isAround ? (
        <ButtonLink href={`${base}/pieces/${piece.id}/edit`} className="max-sm:grow">
          Put facts right
        </ButtonLink>
      ) : null}
      {mayChange ? <PutAway reader={reader} piece={piece} /> : null}
    </div>
  )
}
