import Link from 'next/link'
import type { ReactNode } from 'react'
import { Logo } from '../ui/icons'
import { TextLink } from '../ui/text-link'
import { ThemeChoice } from './theme-choice'

type PublicShellProps = {
  /** At the right end of the header: links, a button. */
  actions?: ReactNode
  /** Account pages are one narrow sheet. */
  narrow?: boolean
  children: ReactNode
}

/** The frame of every page that needs no account. */
export function PublicShell({ actions, narrow = false, children }: PublicShellProps) {
  return (
    <div className="mx-auto flex min-h-dvh max-w-[1184px] flex-col sm:px-8">
      <SkipLink />
      <header className="flex min-h-16 flex-wrap items-center justify-between gap-x-6 gap-y-2 px-4 py-3 sm:px-0">
        <Link href="/" className="flex min-h-11 items-center gap-3 text-[22px] font-semibold">
          <Logo />
          Lidfast
        </Link>
        {actions ? <div className="flex flex-wrap items-center gap-x-6 gap-y-2">{actions}</div> : null}
      </header>
      <main
        id="main"
        tabIndex={-1}
        className={`flex grow flex-col gap-7 py-6 outline-none ${narrow ? 'w-full max-w-[34rem]' : ''}`}
      >
        {children}
      </main>
      <footer className="flex flex-wrap items-center justify-between gap-4 px-4 py-6 text-label text-ink-soft sm:px-0">
        <p className="max-w-words">
          Readings stay on the machine that runs Lidfast. It advises; it switches nothing on or off.{' '}
          <TextLink href="/method" prefetch={false} className="inline-flex min-h-11 items-center sm:min-h-9">
            Where its figures come from
          </TextLink>
        </p>
        <ThemeChoice />
      </footer>
    </div>
  )
}

export function SkipLink() {
  return (
    <a
      href="#main"
      className="sr-only focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-50 focus:rounded focus:bg-heart focus:px-4 focus:py-3 focus:text-on-heart"
    >
      To the page itself
    </a>
  )
}
