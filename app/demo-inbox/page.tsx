import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { database } from '@/app/_server/database'
import { readDemoInbox } from '@/app/_server/demo'
import { DemoInbox } from './_components/demo-inbox'

export const dynamic = 'force-dynamic'
export const metadata: Metadata = { title: 'Demo inbox', robots: { index: false } }

/** The mails that the demo kept instead of sending. Not there when the demo is off. */
export default async function DemoInboxPage() {
  const inbox = await readDemoInbox(database(), { limit: 50 })
  if (!inbox.ok) notFound()
  return (
    <PublicShell>
      <DemoInbox initial={inbox.value} at={new Date().toISOString()} />
    </PublicShell>
  )
}
