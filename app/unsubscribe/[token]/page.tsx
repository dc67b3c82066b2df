import type { Metadata } from 'next'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { database } from '@/app/_server/database'
import { lookAtUnsubscribe } from '@/app/_server/unsubscribe'
import { UnsubscribeView } from './_components/unsubscribe-view'

export const dynamic = 'force-dynamic'
export const metadata: Metadata = {
  title: 'No more mails',
  referrer: 'no-referrer',
  robots: { index: false },
}

type Props = { params: Promise<{ token: string }> }

export default async function UnsubscribePage({ params }: Props) {
  const { token } = await params
  const view = await lookAtUnsubscribe(database(), token)
  return (
    <PublicShell narrow>
      {view === undefined ? (
        <PageSentence>This link leads nowhere. Sign in and choose on the page Notices.</PageSentence>
      ) : (
        <UnsubscribeView token={token} initial={view} />
      )}
    </PublicShell>
  )
}
