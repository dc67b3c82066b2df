import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { RoomsView } from './_components/rooms-view'

export const metadata: Metadata = { title: 'Rooms' }

type Props = { params: Promise<{ site: string }> }

export default async function RoomsPage({ params }: Props) {
  const member = await requireMember((await params).site, 'rooms:see')
  const now = new Date()
  const items = await listRooms(database(), member, now)
  return <RoomsView reader={readerOf(member, now)} initial={{ items, nextCursor: null }} />
}
