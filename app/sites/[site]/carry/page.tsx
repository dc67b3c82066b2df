import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { listCarries } from '@/app/_server/carries'
import { database } from '@/app/_server/database'
import { listPieces } from '@/app/_server/pieces'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { CarryPageView } from './_components/carry-page-view'

export const metadata: Metadata = { title: 'Carry' }

type Props = { params: Promise<{ site: string }> }

export default async function CarryPage({ params }: Props) {
  const member = await requireMember((await params).site, 'carries:see')
  const now = new Date()
  const db = database()
  const [pieces, rooms, open, ended] = await Promise.all([
    listPieces(db, member, { sort: 'number', limit: 200 }),
    listRooms(db, member, now),
    listCarries(db, member, { state: 'open', sort: 'planned', limit: 50 }, now),
    listCarries(db, member, { state: 'ended', sort: '-planned', limit: 10 }, now),
  ])
  if (!pieces.ok || !open.ok || !ended.ok) notFound()
  return (
    <CarryPageView
      reader={readerOf(member, now)}
      pieces={pieces.value}
      rooms={{ items: rooms, nextCursor: null }}
      open={open.value}
      ended={ended.value}
    />
  )
}
