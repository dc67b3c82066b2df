'use client'

import { ErrorState } from '@/app/_components/ui/states'

export default function SiteError({ reset }: { error: Error; reset: () => void }) {
  return (
    <div className="max-sm:px-4">
      <h1 className="sr-only">Something went wrong</h1>
      <ErrorState title="This page could not be made." onRetry={reset} />
    </div>
  )
}
