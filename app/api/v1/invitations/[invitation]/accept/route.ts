import { acceptInvitation } from '@/app/_server/invitations'
import { answer } from '@/app/_server/respond'
import { signedInRoute } from '@/app/_server/route'
import { textIdSchema } from '@/lib/sites/invitation-view'

export const POST = signedInRoute(
  { params: { invitation: textIdSchema }, creates: true },
  async ({ db, user, params, now }) => {
    const accepted = await acceptInvitation(db, user, params.invitation, now)
    return accepted.ok ? answer(accepted.value) : accepted
  },
)
