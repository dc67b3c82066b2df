'use client'

import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { EmptyState } from '@/app/_components/ui/states'
import type { Piece } from '@/lib/pieces/piece'
import { piecesHeadline } from '@/lib/pieces/wording'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { PieceList, type PiecePage } from './piece-list'

type PiecesViewProps = {
  reader: Reader
  /** The first page by the address's own filters, and those filters as the API takes them. */
  initial: PiecePage
  initialQuery: string
  out: { items: Piece[] }
  rooms: readonly { id: string; name: string }[]
  /** Whether any piece is known at all, whatever the filters. */
  hasAny: boolean
}

export function PiecesView({ reader, initial, initialQuery, out, rooms, hasAny }: PiecesViewProps) {
  const { data: outNow = out } = useSiteQuery<{ items: Piece[] }>({
    site: reader.site,
    area: 'pieces',
    key: ['out'],
    path: '/pieces?out=yes&limit=20',
    initial: out,
  })
  const add = may(reader.role, 'pieces:change') ? (
    <ButtonLink href={`/sites/${reader.site}/pieces/new`} variant="filled">
      Add a piece
    </ButtonLink>
  ) : null
  return (
    <>
      <PageSentence parts={piecesHeadline(outNow.items, hasAny)} />
      {hasAny ? (
        <Sheet title="Pieces" id="pieces" action={add}>
          <PieceList reader={reader} initial={initial} initialQuery={initialQuery} rooms={rooms} />
        </Sheet>
      ) : (
        <Sheet>
          <EmptyState title="No piece yet" actions={add}>
            A piece is a blank, a roughed pair or a finished box, followed under one number from the log to
            the buyer. With its first five answers it can be asked about: may it go to the shop, and for how
            long?
          </EmptyState>
        </Sheet>
      )}
    </>
  )
}
