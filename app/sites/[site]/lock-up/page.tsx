import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { getLockUp } from '@/app/_server/lock-up'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { LockUpView } from './_components/lock-up-view'

export const metadata: Metadata = { title: 'Lock-up' }

type Props = { params: Promise<{ site: string }> }

export default async function LockUpPage({ params }: Props) {
  const member = await requireMember((await params).site, 'carries:see')
  const now = new Date()
  return <LockUpView reader={readerOf(member, now)} initial={await getLockUp(database(), member, now)} />
}
