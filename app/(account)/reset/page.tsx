import type { Metadata } from 'next'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { AccountPage } from '../_components/account-page'
import { ResetForm } from '../_components/reset-form'

// The address holds the token: it must not travel on to another page in the referrer.
export const metadata: Metadata = { title: 'Set a new password', referrer: 'no-referrer' }

type Props = { searchParams: Promise<Record<string, string | string[] | undefined>> }

export default async function ResetPage({ searchParams }: Props) {
  const { token, error } = await searchParams
  if (typeof token !== 'string' || token === '' || error !== undefined) {
    return (
      <AccountPage sentence="That link has been used or is too old.">
        <div className="flex flex-col items-start gap-4">
          <p>Links for a new password work once, and for an hour. Your password is unchanged.</p>
          <ButtonLink href="/forgotten" variant="filled">
            Ask for a new link
          </ButtonLink>
        </div>
      </AccountPage>
    )
  }
  return (
    <AccountPage sentence="Set a new password.">
      <ResetForm token={token} />
    </AccountPage>
  )
}
