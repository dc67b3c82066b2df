import { mailInvitation, renewInvitation } from '@/app/_server/invitations'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { textIdSchema } from '@/lib/sites/invitation-view'

export const POST = siteRoute(
  { action: 'invitations:change', params: { invitation: textIdSchema } },
  async ({ db, member, user, params, now, afterwards }) => {
    const renewed = await renewInvitation(db, member, params.invitation, now)
    if (!renewed.ok) return renewed
    afterwards(() => mailInvitation(member, user, renewed.value))
    return answer(renewed.value)
  },
)
