import { listMembers } from '@/app/_server/members'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute({ action: 'members:see' }, async ({ db, member }) =>
  answer({ items: await listMembers(db, member), nextCursor: null }),
)
