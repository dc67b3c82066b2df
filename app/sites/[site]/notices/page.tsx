import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listNotices } from '@/app/_server/notices'
import { getHearing } from '@/app/_server/own-settings'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { knownTimeZones } from '@/lib/sites/time-zones'
import { NoticesView } from './_components/notices-view'

export const metadata: Metadata = { title: 'Notices' }

type Props = {
  params: Promise<{ site: string }>
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

export default async function NoticesPage({ params, searchParams }: Props) {
  const member = await requireMember((await params).site, 'notices:see')
  const now = new Date()
  const show = (await searchParams).show === 'unseen' ? 'unseen' : 'all'
  const db = database()
  const [notices, hearing] = await Promise.all([
    listNotices(db, member, { unseen: show === 'unseen' ? 'yes' : undefined, sort: '-at', limit: 30 }, now),
    getHearing(db, member, now),
  ])
  return (
    <NoticesView
      reader={readerOf(member, now)}
      site={member.site}
      initial={notices.ok ? notices.value : { items: [], nextCursor: null }}
      initialShow={show}
      hearing={hearing}
      timeZones={knownTimeZones()}
    />
  )
}
