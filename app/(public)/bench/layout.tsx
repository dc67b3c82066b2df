import type { ReactNode } from 'react'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { TextLink } from '@/app/_components/ui/text-link'
import { BenchBar } from './_components/bench-bar'

/** The open bench: every calculator of the product, without an account. */
export default function BenchLayout({ children }: { children: ReactNode }) {
  return (
    <PublicShell
      actions={
        <>
          <TextLink href="/method" prefetch={false} className="no-print inline-flex min-h-11 items-center">
            How it works things out
          </TextLink>
          <TextLink href="/sign-in" className="no-print inline-flex min-h-11 items-center">
            Sign in
          </TextLink>
        </>
      }
    >
      <div className="bench flex flex-col gap-7">
        <BenchBar />
        {children}
      </div>
    </PublicShell>
  )
}
