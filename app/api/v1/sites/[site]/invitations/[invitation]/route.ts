import { withdrawInvitation } from '@/app/_server/invitations'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { textIdSchema } from '@/lib/sites/invitation-view'

export const DELETE = siteRoute(
  { action: 'invitations:change', params: { invitation: textIdSchema } },
  async ({ db, member, params }) => {
    const withdrawn = await withdrawInvitation(db, member, params.invitation)
    return withdrawn.ok ? answer(undefined) : withdrawn
  },
)
