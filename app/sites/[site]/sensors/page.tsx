import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listSensors } from '@/app/_server/sensors'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { SensorsView } from './_components/sensors-view'

export const metadata: Metadata = { title: 'Sensors' }

type Props = { params: Promise<{ site: string }> }

export default async function SensorsPage({ params }: Props) {
  const member = await requireMember((await params).site, 'sensors:see')
  const now = new Date()
  return (
    <SensorsView
      reader={readerOf(member, now)}
      initial={{ items: await listSensors(database(), member, now) }}
    />
  )
}
