import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { requireMember } from '@/app/_server/session'
import { awayWoods, offeredWoods } from '@/app/_server/woods'
import { readerOf } from '@/lib/sites/reader'
import { WoodsView } from './_components/woods-view'

export const metadata: Metadata = { title: 'Woods' }

export default async function WoodsPage({ params }: { params: Promise<{ site: string }> }) {
  const member = await requireMember((await params).site, 'woods:see')
  const db = database()
  const [woods, away] = await Promise.all([offeredWoods(db, member.siteId), awayWoods(db, member.siteId)])
  return <WoodsView reader={readerOf(member, new Date())} woods={woods} away={away} />
}
