import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listPieces } from '@/app/_server/pieces'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { pieceFiltersOf, pieceQuery, piecesPerPage } from '@/lib/pieces/list-address'
import { readerOf } from '@/lib/sites/reader'
import { PiecesView } from './_components/pieces-view'

export const metadata: Metadata = { title: 'Pieces' }

type Props = {
  params: Promise<{ site: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

const none = { items: [], nextCursor: null }

export default async function PiecesPage({ params, searchParams }: Props) {
  const member = await requireMember((await params).site, 'pieces:see')
  const now = new Date()
  const db = database()
  const filters = pieceFiltersOf(await searchParams)
  const { q, stage, room, out, sort } = filters
  const [listed, outNow, any, rooms] = await Promise.all([
    listPieces(db, member, {
      q: q.trim().slice(0, 60) || undefined,
      stage: stage ?? undefined,
      room: room ?? undefined,
      out: out ?? undefined,
      sort,
      limit: piecesPerPage,
    }),
    listPieces(db, member, { out: 'yes', sort: 'number', limit: 20 }),
    listPieces(db, member, { sort: 'number', limit: 1 }),
    listRooms(db, member, now),
  ])
  return (
    <PiecesView
      reader={readerOf(member, now)}
      initial={listed.ok ? listed.value : none}
      initialQuery={pieceQuery(filters)}
      out={outNow.ok ? outNow.value : none}
      rooms={rooms.map(({ id, name }) => ({ id, name }))}
      hasAny={any.ok && any.value.items.length > 0}
    />
  )
}
