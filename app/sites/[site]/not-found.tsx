import { PageSentence } from '@/app/_components/ui/page-sentence'

export default function SiteNotFound() {
  return (
    <>
      <PageSentence>There is nothing at this address, or it is not yours to see.</PageSentence>
      <p className="max-w-words px-4 text-ink-soft sm:px-0">
        It may have been put away, or your role here may not show it. Nothing was lost.
      </p>
    </>
  )
}
