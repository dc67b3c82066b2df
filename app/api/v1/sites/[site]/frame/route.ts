import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { getSiteFrame } from '@/app/_server/site-frame'

export const GET = siteRoute({ action: 'site:see' }, async ({ db, member, user, now }) =>
  answer(await getSiteFrame(db, member, user, now)),
)
