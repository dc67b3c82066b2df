import { getNow } from '@/app/_server/now'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute({ action: 'now:see' }, async ({ db, member, now }) =>
  answer(await getNow(db, member, now)),
)
