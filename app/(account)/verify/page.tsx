import type { Metadata } from 'next'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { findUser } from '@/app/_server/session'

import { AccountPage } from '../_components/account-page'
import { nextOf } from '../_components/next-of'

export const metadata: Metadata = { title: 'Your address' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

/** Where the link in the confirming mail ends: signed in, or told why not. */
export default async function VerifyPage({ searchParams }: Props) {
  const query = await searchParams
  const next = nextOf(query.next)
  if (query.error !== undefined) {
    return (
      <AccountPage sentence="That link has been used or is too old.">
        <div className="flex flex-col items-start gap-4">
          <p>
            If you have confirmed your address already, just sign in. If not, try to sign in all the same: you
            can ask for another mail there.
          </p>
          <ButtonLink href="/sign-in" variant="filled">
            Sign in
          </ButtonLink>
        </div>
      </AccountPage>
    )
  }
  const isSignedIn = (await findUser()) !== undefined
  return (
    <AccountPage sentence="Your address is confirmed.">
      <ButtonLink href={isSignedIn ? next : `/sign-in?next=${encodeURIComponent(next)}`} variant="filled">
        {isSignedIn ? 'Go on' : 'Sign in'}
      </ButtonLink>
    </AccountPage>
  )
}
