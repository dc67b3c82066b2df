import type { Metadata } from 'next'
import { PublicShell } from '@/app/_components/layout/public-shell'
import { SignOut } from '@/app/_components/layout/sign-out'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { database } from '@/app/_server/database'
import { lookAtInvitation } from '@/app/_server/invitations'
import { findUser } from '@/app/_server/session'
import { textIdSchema } from '@/lib/sites/invitation-view'
import { roleWords } from '@/lib/sites/permissions'
import { AcceptInvitation } from './_components/accept-invitation'

export const dynamic = 'force-dynamic'
// The address is what the invitation is worth: it must not travel on in the referrer.
export const metadata: Metadata = { title: 'An invitation', referrer: 'no-referrer' }

type Props = { params: Promise<{ id: string }> }

export default async function InvitationPage({ params }: Props) {
  const { id } = await params
  const user = await findUser()
  if (user === undefined) {
    const next = encodeURIComponent(`/invitation/${encodeURIComponent(id)}`)
    return (
      <PublicShell narrow>
        <PageSentence>You are invited to share a site.</PageSentence>
        <Sheet>
          <div className="flex flex-col items-start gap-4">
            <p>Sign in, or make an account, with the address that the invitation came to.</p>
            <div className="flex flex-wrap gap-3">
              <ButtonLink href={`/sign-in?next=${next}`} variant="filled">
                Sign in
              </ButtonLink>
              <ButtonLink href={`/sign-up?next=${next}`}>Make an account</ButtonLink>
            </div>
          </div>
        </Sheet>
      </PublicShell>
    )
  }
  const seen = textIdSchema.safeParse(id).success
    ? await lookAtInvitation(database(), user, id, new Date())
    : undefined
  if (seen === undefined || !seen.ok) {
    return (
      <PublicShell narrow actions={<SignOut className="min-h-11" />}>
        <PageSentence>This invitation can’t be taken up.</PageSentence>
        <Sheet>
          <div className="flex flex-col items-start gap-4">
            <p>{seen?.error.detail ?? 'There is no such invitation. Look at the link in the mail again.'}</p>
            <p className="text-ink-soft">You are signed in as {user.email}.</p>
            <ButtonLink href="/sites">Your sites</ButtonLink>
          </div>
        </Sheet>
      </PublicShell>
    )
  }
  const invitation = seen.value
  return (
    <PublicShell narrow actions={<SignOut className="min-h-11" />}>
      <PageSentence>
        You are invited to <strong>{invitation.siteName}</strong>, as{' '}
        <strong>{roleWords[invitation.role].toLowerCase()}</strong>.
      </PageSentence>
      <Sheet>
        <AcceptInvitation id={invitation.id} role={invitation.role} />
      </Sheet>
    </PublicShell>
  )
}
