import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { feltWoods, getRoomFelt } from '@/app/_server/felt'
import { getRoomForecast } from '@/app/_server/forecast'
import { getRoom } from '@/app/_server/rooms'
import { getRoomSeries } from '@/app/_server/series'
import { requireMember } from '@/app/_server/session'
import { feltQuerySchema } from '@/lib/rooms/felt'
import { may } from '@/lib/sites/permissions'
import { readerOf } from '@/lib/sites/reader'
import { feltAskedOf, feltQueryOf } from './_components/felt-asked'
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
  const search = await searchParams
  const span = spanOf(search.span, member.role)
  const asked = feltAskedOf(search.wood, search.thicknessMm)
  const db = database()
  const [room, series, felt, woods, forecast] = await Promise.all([
    getRoom(db, member, code, now),
    getRoomSeries(db, member, code, seriesQueryOf(span, now), now),
    getRoomFelt(db, member, code, feltQuerySchema.parse(feltQueryOf(asked)), now),
    feltWoods(db, member),
    may(member.role, 'rooms:forecast') ? getRoomForecast(db, member, code, now) : null,
  ])
  if (!room.ok || !series.ok) notFound()
  return (
    <RoomView
      reader={readerOf(member, now)}
      initial={room.value}
      initialSeries={{ span, series: series.value }}
      // A wood that was put away since, say: the sheet asks again, and says what is wrong.
      initialFelt={felt.ok ? { asked, felt: felt.value } : undefined}
      woods={woods}
      initialForecast={forecast?.ok === true ? forecast.value : null}
    />
  )
}
