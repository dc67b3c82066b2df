import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { TextLink } from '@/app/_components/ui/text-link'
import { findUser } from '@/app/_server/session'

import { AccountPage } from '../_components/account-page'
import { nextOf } from '../_components/next-of'
import { SignInForm } from '../_components/sign-in-form'

export const metadata: Metadata = { title: 'Sign in' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function SignInPage({ searchParams }: Props) {
  const next = nextOf((await searchParams).next)
  if (await findUser()) redirect(next)
  const query = next === '/sites' ? '' : `?next=${encodeURIComponent(next)}`
  return (
    <AccountPage
      sentence="Sign in to see what is out, and until when."
      after={
        <p>
          No account yet? <TextLink href={`/sign-up${query}`}>Make an account</TextLink>
        </p>
      }
    >
      <SignInForm next={next} />
    </AccountPage>
  )
}
