import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { getRoom } from '@/app/_server/rooms'
import { getRoomSeries } from '@/app/_server/series'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { RoomView } from './_components/room-view'
import { seriesQueryOf, spanOf } from './_components/span'

export const metadata: Metadata = { title: 'Room' }

type Props = {
  params: Promise<{ site: string; room: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function RoomPage({ params, searchParams }: Props) {
  const { site, room: code } = await params
  const member = await requireMember(site, 'rooms:see')
  const now = new Date()
  const span = spanOf((await searchParams).span, member.role)
  const db = database()
  const [room, series] = await Promise.all([
    getRoom(db, member, code, now),
    getRoomSeries(db, member, code, seriesQueryOf(span, now), now),
  ])
  if (!room.ok || !series.ok) notFound()
  return (
    <RoomView
      reader={readerOf(member, now)}
      initial={room.value}
      initialSeries={{ span, series: series.value }}
    />
  )
}
