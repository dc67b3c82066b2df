import type { Metadata } from 'next'
import { SignInForm } from '@/app/(account)/_components/sign-in-form'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { database } from '@/app/_server/database'
import { findDemoSite } from '@/app/_server/demo'
import { findUser } from '@/app/_server/session'
import { LandingFigure } from './(public)/_components/landing-figure'
import { TryDemo } from './(public)/_components/try-demo'
import { WhatItDoes } from './(public)/_components/what-it-does'

export const dynamic = 'force-dynamic'
export const metadata: Metadata = {
  description: 'Know what the air will do to a lid before you carry the box through the door.',
}

export default async function LandingPage() {
  const user = await findUser()
  const hasDemo = (await findDemoSite(database())) !== undefined
  return (
    <PublicShell
      actions={
        <>
          <TextLink href="/bench" className="inline-flex min-h-11 items-center">
            The open bench
          </TextLink>
          <TextLink href="/method" prefetch={false} className="inline-flex min-h-11 items-center">
            How it works things out
          </TextLink>
          {user ? (
            <ButtonLink href="/sites">Your sites</ButtonLink>
          ) : (
            <>
              <TextLink href="/sign-in" className="inline-flex min-h-11 items-center">
                Sign in
              </TextLink>
              <ButtonLink href="/sign-up">Make an account</ButtonLink>
            </>
          )}
        </>
      }
    >
      <h1 className="px-4 text-[32px] leading-[40px] sm:px-0 sm:text-display sm:leading-[52px]">
        <strong className="block">Know what the air will do to a lid</strong>
        before you carry the box through the door.
      </h1>
      <LandingFigure />
      <div className="flex flex-wrap items-center gap-x-5 gap-y-3 px-4 sm:px-0">
        {hasDemo ? <TryDemo /> : null}
        <ButtonLink href="/bench/time-out" className="max-sm:w-full">
          Ask about your own box
        </ButtonLink>
        <p className="max-w-[34rem] text-label text-ink-soft">
          The open bench needs no account.{' '}
          {hasDemo ? (
            <>
              The demo is a made-up workshop, shared by whoever looks in. Nothing in it comes from a real
              person or place. <TextLink href="/demo-inbox">The mails that it sends</TextLink>
            </>
          ) : null}
        </p>
      </div>
      {user ? null : (
        <Sheet>
          <SignInForm next="/sites" isWide />
        </Sheet>
      )}
      <WhatItDoes />
    </PublicShell>
  )
}
