import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listPieces } from '@/app/_server/pieces'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { woodChoices } from '@/app/_server/woods'
import { nextNumber } from '@/lib/pieces/next-number'
import type { RoomAir } from '@/lib/rooms/room'
import { readerOf } from '@/lib/sites/reader'
import { EMC_TEMPERATURE_MAX_C, EMC_TEMPERATURE_MIN_C } from '@/lib/wood/emc'
import { FirstPiece } from '../_components/first-piece'

export const metadata: Metadata = { title: 'A new piece' }

type Props = {
  params: Promise<{ site: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function NewPiecePage({ params, searchParams }: Props) {
  const member = await requireMember((await params).site, 'pieces:change')
  const now = new Date()
  const db = database()
  const [rooms, woods, latest] = await Promise.all([
    listRooms(db, member, now),
    woodChoices(db, member.siteId),
    listPieces(db, member, { sort: '-number', limit: 1 }),
  ])
  const { room } = await searchParams
  return (
    <FirstPiece
      reader={readerOf(member, now)}
      rooms={rooms.map(({ id, name, mark, kind, air }) => ({ id, name, mark, kind, air: freshAir(air) }))}
      woods={woods}
      number={nextNumber(latest.ok ? latest.value.items[0]?.number : undefined)}
      roomId={rooms.find(({ id }) => id === room)?.id}
    />
  )
}

/** Only fresh air is reckoned with, and only as far as the equation reaches. */
function freshAir(air: RoomAir): { temperatureC: number; humidityPct: number } | null {
  if (
    air.kind !== 'fresh' ||
    air.temperatureC < EMC_TEMPERATURE_MIN_C ||
    air.temperatureC > EMC_TEMPERATURE_MAX_C
  )
    return null
  return { temperatureC: air.temperatureC, humidityPct: air.humidityPct }
}
