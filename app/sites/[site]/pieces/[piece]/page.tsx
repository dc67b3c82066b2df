import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { findPieceRecordPart } from '@/app/_server/piece-page'
import { getPiece } from '@/app/_server/pieces'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { getWeighings, weighingsQuerySchema } from '@/app/_server/weighings'
import { may } from '@/lib/sites/permissions'
import { readerOf } from '@/lib/sites/reader'
import { PieceView } from '../_components/piece-view'

export const metadata: Metadata = { title: 'Piece' }

type Props = { params: Promise<{ site: string; piece: string }> }

export default async function PiecePage({ params }: Props) {
  const { site, piece: code } = await params
  const member = await requireMember(site, 'pieces:see')
  const now = new Date()
  const db = database()
  const [piece, rooms, record] = await Promise.all([
    getPiece(db, member, code, now),
    listRooms(db, member, now),
    findPieceRecordPart(db, member, code, now),
  ])
  if (!piece.ok) notFound()
  const seesWeights = may(member.role, 'pieces:weigh') && piece.value.isHidden !== true
  const weighings = seesWeights
    ? await getWeighings(db, member, code, weighingsQuerySchema.parse({}), now)
    : null
  return (
    <PieceView
      reader={readerOf(member, now)}
      initial={piece.value}
      weighings={weighings?.ok === true ? weighings.value : null}
      record={record}
      rooms={rooms.map(({ id, name, mark }) => ({ id, name, mark }))}
    />
  )
}
