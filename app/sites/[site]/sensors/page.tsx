import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listRefusedMessages } from '@/app/_server/readings'
import { listSensors } from '@/app/_server/sensors'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { SensorsView } from './_components/sensors-view'

export const metadata: Metadata = { title: 'Sensors' }

type Props = { params: Promise<{ site: string }> }

export default async function SensorsPage({ params }: Props) {
  const member = await requireMember((await params).site, 'sensors:see')
  const now = new Date()
  const db = database()
  const [sensors, refused] = await Promise.all([
    listSensors(db, member, now),
    listRefusedMessages(db, member, { sort: '-at', limit: 20 }),
  ])
  return (
    <SensorsView
      reader={readerOf(member, now)}
      initial={{ items: sensors }}
      refused={refused.ok ? refused.value : { items: [], nextCursor: null }}
    />
  )
}
