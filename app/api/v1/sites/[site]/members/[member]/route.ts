import { z } from 'zod'
import { changeRole, removeMember } from '@/app/_server/members'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { textIdSchema } from '@/lib/sites/invitation-view'
import { roleSchema } from '@/lib/sites/permissions'

const params = { member: textIdSchema }

export const PATCH = siteRoute(
  { action: 'members:change', params, body: z.strictObject({ role: roleSchema }) },
  async ({ db, member, params, body }) => {
    const changed = await changeRole(db, member, params.member, body.role)
    return changed.ok ? answer(changed.value) : changed
  },
)

export const DELETE = siteRoute({ action: 'members:change', params }, async ({ db, member, params }) => {
  const removed = await removeMember(db, member, params.member)
  return removed.ok ? answer(undefined) : removed
})
