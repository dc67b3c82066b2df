import { createInvitation, listInvitations, mailInvitation } from '@/app/_server/invitations'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newInvitationSchema } from '@/lib/sites/site'

export const GET = siteRoute({ action: 'invitations:see' }, async ({ db, member, now }) =>
  answer({ items: await listInvitations(db, member.siteId, now), nextCursor: null }),
)

export const POST = siteRoute(
  { action: 'invitations:change', body: newInvitationSchema, creates: true },
  async ({ db, member, user, body, now, afterwards }) => {
    const made = await createInvitation(db, member, body, now)
    if (!made.ok) return made
    afterwards(() => mailInvitation(member, user, made.value))
    return answer(made.value, { status: 201 })
  },
)
