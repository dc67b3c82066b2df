import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { requireMember } from '@/app/_server/session'
import { getTrackRecord } from '@/app/_server/track-record'
import { readerOf } from '@/lib/sites/reader'
import { HowGoodView } from './_components/how-good-view'

export const metadata: Metadata = { title: 'How good the verdicts were' }

type Props = { params: Promise<{ site: string }> }

export default async function HowGoodPage({ params }: Props) {
  const member = await requireMember((await params).site, 'carries:see')
  const now = new Date()
  return <HowGoodView reader={readerOf(member, now)} initial={await getTrackRecord(database(), member)} />
}
