import type { Metadata } from 'next'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { database } from '@/app/_server/database'
import { lookAtAnswerLink } from '@/app/_server/notice-answers'
import { AnswerLinkView } from './_components/answer-link-view'

export const dynamic = 'force-dynamic'
// The address is what the link is worth: it must not travel on in the referrer.
export const metadata: Metadata = { title: 'An answer', referrer: 'no-referrer', robots: { index: false } }

type Props = { params: Promise<{ token: string }> }

/** Says what a press would do. Opening it does nothing, as mail scanners open every link. */
export default async function AnswerPage({ params }: Props) {
  const { token } = await params
  const view = await lookAtAnswerLink(database(), token, new Date())
  return (
    <PublicShell narrow>
      {view === undefined ? (
        <PageSentence>This link leads nowhere. Sign in and answer on the page Notices.</PageSentence>
      ) : (
        <AnswerLinkView token={token} initial={view} />
      )}
    </PublicShell>
  )
}
