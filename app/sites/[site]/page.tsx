import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { getAsks } from '@/app/_server/notice-deliveries'
import { getNow } from '@/app/_server/now'
import { requireMember } from '@/app/_server/session'
import { may } from '@/lib/sites/permissions'
import { readerOf } from '@/lib/sites/reader'
import { NowPageView } from './_components/now-page-view'

export const metadata: Metadata = { title: 'Now' }

type Props = { params: Promise<{ site: string }> }

export default async function NowPage({ params }: Props) {
  const member = await requireMember((await params).site, 'now:see')
  const now = new Date()
  const db = database()
  const [view, asks] = await Promise.all([
    getNow(db, member, now),
    may(member.role, 'notices:see') ? getAsks(db, member, now) : null,
  ])
  return <NowPageView reader={readerOf(member, now)} initial={view} asks={asks} />
}
