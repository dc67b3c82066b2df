import { getAsks } from '@/app/_server/notice-deliveries'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute({ action: 'notices:see' }, async ({ db, member, now }) =>
  answer(await getAsks(db, member, now)),
)
