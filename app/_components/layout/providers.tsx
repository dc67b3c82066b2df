'use client'

import { QueryClient, QueryClientProvider } from '@tanstack/react-query'
import { ThemeProvider } from 'next-themes'
import { NuqsAdapter } from 'nuqs/adapters/next/app'
import { type ReactNode, useState } from 'react'
import { ApiProblem } from '../api'
import { Toaster } from '../ui/toaster'

const MINUTE_MS = 60_000

function newQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 30_000,
        // The stream only hints at changes; once a minute the figures are fetched whatever it said.
        refetchInterval: MINUTE_MS,
        // An answer that says "no" stays "no"; only a missing answer is asked for again.
        retry: (failures, error) => !(error instanceof ApiProblem && error.status < 500) && failures < 2,
      },
    },
  })
}

export function Providers({ nonce, children }: { nonce?: string; children: ReactNode }) {
  const [client] = useState(newQueryClient)
  return (
    <QueryClientProvider client={client}>
      <NuqsAdapter>
        <ThemeProvider
          attribute="class"
          defaultTheme="system"
          enableSystem
          nonce={nonce}
          disableTransitionOnChange
        >
          {children}
          <Toaster />
        </ThemeProvider>
      </NuqsAdapter>
    </QueryClientProvider>
  )
}
