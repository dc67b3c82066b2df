import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listRooms } from '@/app/_server/rooms'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { AddSensor } from '../_components/add-sensor'

export const metadata: Metadata = { title: 'Add a sensor' }

type Props = {
  params: Promise<{ site: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function AddSensorPage({ params, searchParams }: Props) {
  const member = await requireMember((await params).site, 'sensors:change')
  const now = new Date()
  const rooms = await listRooms(database(), member, now)
  const { room } = await searchParams
  return (
    <AddSensor
      reader={readerOf(member, now)}
      rooms={rooms.map(({ id, name }) => ({ id, name }))}
      roomId={rooms.find(({ id }) => id === room)?.id}
    />
  )
}
