import type { Metadata } from 'next'
import { TextLink } from '@/app/_components/ui/text-link'
import { AccountPage } from '../_components/account-page'
import { ForgottenForm } from '../_components/forgotten-form'

export const metadata: Metadata = { title: 'A new password' }

export default function ForgottenPage() {
  return (
    <AccountPage
      sentence="Tell us your address, and we send a link for a new password."
      after={
        <p>
          Remembered it? <TextLink href="/sign-in">Sign in</TextLink>
        </p>
      }
    >
      <ForgottenForm />
    </AccountPage>
  )
}
