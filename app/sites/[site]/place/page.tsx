import type { Metadata } from 'next'
import { database } from '@/app/_server/database'
import { listInvitations } from '@/app/_server/invitations'
import { listMembers } from '@/app/_server/members'
import { getOwnSettings } from '@/app/_server/own-settings'
import { requireMember } from '@/app/_server/session'
import { may } from '@/lib/sites/permissions'
import { readerOf } from '@/lib/sites/reader'
import { knownTimeZones } from '@/lib/sites/time-zones'
import { PlaceView } from './_components/place-view'

export const metadata: Metadata = { title: 'People and place' }

type Props = { params: Promise<{ site: string }> }

export default async function PlacePage({ params }: Props) {
  const member = await requireMember((await params).site, 'site:see')
  const now = new Date()
  const db = database()
  const [members, invitations, settings] = await Promise.all([
    may(member.role, 'members:see') ? listMembers(db, member) : null,
    may(member.role, 'invitations:see') ? listInvitations(db, member.siteId, now) : null,
    getOwnSettings(db, member, now),
  ])
  return (
    <PlaceView
      reader={readerOf(member, now)}
      site={member.site}
      members={members && { items: members }}
      invitations={invitations && { items: invitations }}
      settings={settings}
      timeZones={knownTimeZones()}
    />
  )
}
