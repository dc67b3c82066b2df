'use client'

import { ErrorState } from './_components/ui/states'

export default function ErrorPage({ reset }: { error: Error; reset: () => void }) {
  return (
    <main className="mx-auto max-w-column p-6">
      <h1 className="sr-only">Something went wrong</h1>
      <ErrorState title="This page could not be made." onRetry={reset}>
        Nothing was lost: readings are still being kept. Try again; if it stays like this, whoever runs
        Lidfast finds the reason in its log.
      </ErrorState>
    </main>
  )
}
