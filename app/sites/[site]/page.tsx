import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { getNow } from '@/app/_server/now'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { NowPageView } from './_components/now-page-view'

export const metadata: Metadata = { title: 'Now' }

type Props = { params: Promise<{ site: string }> }

export default async function NowPage({ params }: Props) {
  const member = await requireMember((await params).site, 'now:see')
  const now = new Date()
  return <NowPageView reader={readerOf(member, now)} initial={await getNow(database(), member, now)} />
}
