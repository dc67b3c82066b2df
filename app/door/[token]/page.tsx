import type { Metadata } from 'next'
import { notFound } from 'next/navigation'
import { database } from '@/app/_server/database'
import { getDoorView } from '@/app/_server/door-view'
import { doorTokenSchema } from '@/lib/door/door'
import { DoorScreen } from './_components/door-screen'

/** The address is a key: it goes into no index and no other site's log. */
export const metadata: Metadata = { title: 'By the door', robots: { index: false }, referrer: 'no-referrer' }

type Props = { params: Promise<{ token: string }> }

export default async function DoorPage({ params }: Props) {
  const token = doorTokenSchema.safeParse((await params).token)
  const view = token.success ? await getDoorView(database(), token.data, new Date()) : undefined
  if (token.data === undefined || view?.ok !== true) notFound()
  return <DoorScreen token={token.data} initial={view.value} />
}
