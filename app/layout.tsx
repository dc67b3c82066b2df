import type { Metadata, Viewport } from 'next'
import { headers } from 'next/headers'
import type { ReactNode } from 'react'
// The wider set first: the browser asks it only for letters that the plain one lacks.
import '@fontsource/source-sans-3/latin-ext-400.css'
import '@fontsource/source-sans-3/latin-ext-600.css'
import '@fontsource/source-sans-3/latin-400.css'
import '@fontsource/source-sans-3/latin-600.css'
import './globals.css'
import { Providers } from './_components/layout/providers'

export const metadata: Metadata = {
  title: { default: 'Lidfast', template: '%s · Lidfast' },
  description: 'Know what the air will do to a lid before you carry the box through the door.',
}

export const viewport: Viewport = {
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f3f5f4' },
    { media: '(prefers-color-scheme: dark)', color: '#111716' },
  ],
}

export default async function RootLayout({ children }: { children: ReactNode }) {
  const nonce = (await headers()).get('x-nonce') ?? undefined
  return (
    <html lang="en-GB" suppressHydrationWarning>
      <body className="bg-chalk font-sans text-body text-ink">
        <Providers nonce={nonce}>{children}</Providers>
      </body>
    </html>
  )
}
