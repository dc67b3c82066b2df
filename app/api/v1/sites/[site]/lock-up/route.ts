import { getLockUp } from '@/app/_server/lock-up'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute({ action: 'carries:see' }, async ({ db, member, now }) =>
  answer(await getLockUp(db, member, now)),
)
