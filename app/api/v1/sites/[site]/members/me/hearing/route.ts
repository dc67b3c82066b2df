import { getHearing } from '@/app/_server/own-settings'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute({ action: 'settings:own' }, async ({ db, member, now }) =>
  answer(await getHearing(db, member, now)),
)
