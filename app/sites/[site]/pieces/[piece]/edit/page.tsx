import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { getPiece } from '@/app/_server/pieces'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { woodChoices } from '@/app/_server/woods'
import { readerOf } from '@/lib/sites/reader'
import { EditPiece } from '../../_components/edit-piece'

export const metadata: Metadata = { title: 'Facts of a piece' }

type Props = { params: Promise<{ site: string; piece: string }> }

export default async function EditPiecePage({ params }: Props) {
  const { site, piece: code } = await params
  const member = await requireMember(site, 'pieces:change')
  const now = new Date()
  const db = database()
  const [piece, rooms] = await Promise.all([getPiece(db, member, code, now), listRooms(db, member, now)])
  if (!piece.ok || piece.value.isHidden === true || piece.value.isArchived === true) notFound()
  return (
    <EditPiece
      // A newer version begins the form anew.
      key={piece.value.version}
      reader={readerOf(member, now)}
      piece={piece.value}
      woods={await woodChoices(db, member.siteId, piece.value.wood)}
      rooms={rooms.map(({ id, name, mark }) => ({ id, name, mark }))}
    />
  )
}
