import { lookAtInvitation } from '@/app/_server/invitations'
import { answer } from '@/app/_server/respond'
import { signedInRoute } from '@/app/_server/route'
import { textIdSchema } from '@/lib/sites/invitation-view'

export const GET = signedInRoute(
  { params: { invitation: textIdSchema } },
  async ({ db, user, params, now }) => {
    const seen = await lookAtInvitation(db, user, params.invitation, now)
    return seen.ok ? answer(seen.value) : seen
  },
)
