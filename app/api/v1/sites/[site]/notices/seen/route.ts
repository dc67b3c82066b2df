import { seeAllNotices } from '@/app/_server/notices'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const POST = siteRoute({ action: 'notices:acknowledge' }, async ({ db, member, now }) => {
  await seeAllNotices(db, member, now)
  return answer(undefined)
})
