import type { ReactNode } from 'react'
import { PageSentence } from '@/app/_components/ui/page-sentence'

type BenchSentenceProps = {
  /** What the page is about, above the sentence. */
  above: string
  /** The figures still show what was typed before something was refused. */
  isOld?: boolean
  children: ReactNode
}

/** The sentence that a maker could act on. It is read out when it changes. */
export function BenchSentence({ above, isOld = false, children }: BenchSentenceProps) {
  return (
    <div aria-live="polite" aria-busy={isOld}>
      <PageSentence above={above}>{children}</PageSentence>
    </div>
  )
}
