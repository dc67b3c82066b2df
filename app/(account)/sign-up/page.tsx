import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { TextLink } from '@/app/_components/ui/text-link'
import { findUser } from '@/app/_server/session'

import { AccountPage } from '../_components/account-page'
import { nextOf } from '../_components/next-of'
import { SignUpForm } from '../_components/sign-up-form'

export const metadata: Metadata = { title: 'Make an account' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function SignUpPage({ searchParams }: Props) {
  const next = nextOf((await searchParams).next)
  if (await findUser()) redirect(next)
  return (
    <AccountPage
      sentence="Make an account, then tell us two rooms: where boxes are kept, and where you turn."
      after={
        <p>
          Have one already? <TextLink href={`/sign-in?next=${encodeURIComponent(next)}`}>Sign in</TextLink>
        </p>
      }
    >
      <SignUpForm next={next} />
    </AccountPage>
  )
}
