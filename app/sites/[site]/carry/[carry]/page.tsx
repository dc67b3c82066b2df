import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { getCarry } from '@/app/_server/carries'
import { database } from '@/app/_server/database'
import { requireMember } from '@/app/_server/session'
import { readerOf } from '@/lib/sites/reader'
import { OneCarryView } from '../_components/one-carry-view'

export const metadata: Metadata = { title: 'A carry' }

type Props = { params: Promise<{ site: string; carry: string }> }

export default async function OneCarryPage({ params }: Props) {
  const { site, carry: code } = await params
  const member = await requireMember(site, 'carries:see')
  const now = new Date()
  const carry = await getCarry(database(), member, code, now)
  if (!carry.ok) notFound()
  return <OneCarryView reader={readerOf(member, now)} initial={carry.value} />
}
