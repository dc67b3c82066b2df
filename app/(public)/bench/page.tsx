import type { Metadata } from 'next'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { ToolList } from './_components/tool-list'

export const metadata: Metadata = {
  title: 'The open bench',
  description: 'What air does to wood, worked out for figures of your own. No account needed.',
}

export default function BenchPage() {
  return (
    <>
      <PageSentence above="The open bench">
        Type figures of your own; the sums are done <strong>here, in your browser</strong>, and the address
        keeps them.
      </PageSentence>
      <ToolList />
      <p className="max-w-words px-4 text-label text-ink-soft sm:px-0">
        No account is needed and nothing is stored. Each page prints on one sheet, and each answer can be had
        by API.
      </p>
    </>
  )
}
