import type { ReactNode } from 'react'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'

/** The one column that every account page has: a sentence, a form, and where else to go. */
export function AccountPage({
  sentence,
  children,
  after,
}: {
  sentence: ReactNode
  children: ReactNode
  after?: ReactNode
}) {
  return (
    <>
      <PageSentence>{sentence}</PageSentence>
      <Sheet>{children}</Sheet>
      {after ? <div className="px-4 text-ink-soft sm:px-0">{after}</div> : null}
    </>
  )
}
