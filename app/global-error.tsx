'use client'

import './globals.css'
import { ErrorState } from './_components/ui/states'

export default function GlobalError({ reset }: { error: Error; reset: () => void }) {
  return (
    <html lang="en-GB">
      <body className="bg-chalk font-sans text-body text-ink">
        <main className="mx-auto max-w-column p-6">
          <h1 className="sr-only">Something went wrong</h1>
          <ErrorState title="Lidfast could not draw this page." onRetry={reset}>
            Nothing was lost: readings are still being kept. Try again in a moment.
          </ErrorState>
        </main>
      </body>
    </html>
  )
}
