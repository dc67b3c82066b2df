import type { ReactNode } from 'react'
import { SiteShell } from '@/app/_components/layout/site-shell'
import { database } from '@/app/_server/database'
import { requireMember, requireUser } from '@/app/_server/session'
import { getSiteFrame } from '@/app/_server/site-frame'

type Props = { params: Promise<{ site: string }>; children: ReactNode }

/** The frame. It is no guard: every page below asks for itself. */
export default async function SiteLayout({ params, children }: Props) {
  const member = await requireMember((await params).site, 'site:see')
  const user = await requireUser()
  const frame = await getSiteFrame(database(), member, user, new Date())
  return <SiteShell frame={frame}>{children}</SiteShell>
}
