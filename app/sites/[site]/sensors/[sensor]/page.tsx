import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { listRefusedMessages } from '@/app/_server/readings'
import { listRooms } from '@/app/_server/rooms'
import { getSensor } from '@/app/_server/sensors'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { SensorView } from '../_components/sensor-view'

export const metadata: Metadata = { title: 'Sensor' }

type Props = { params: Promise<{ site: string; sensor: string }> }

export default async function SensorPage({ params }: Props) {
  const { site, sensor: code } = await params
  const member = await requireMember(site, 'sensors:see')
  const now = new Date()
  const db = database()
  const sensor = await getSensor(db, member, code, now)
  if (!sensor.ok) notFound()
  const [rooms, refused] = await Promise.all([
    listRooms(db, member, now),
    listRefusedMessages(db, member, { sensor: sensor.value.id, sort: '-at', limit: 20 }),
  ])
  return (
    <SensorView
      reader={readerOf(member, now)}
      initial={sensor.value}
      rooms={rooms.map(({ id, name }) => ({ id, name }))}
      refused={refused.ok ? refused.value : { items: [], nextCursor: null }}
    />
  )
}
