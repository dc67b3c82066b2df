import { listNotices, noticesQuerySchema } from '@/app/_server/notices'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const GET = siteRoute(
  { action: 'notices:see', query: noticesQuerySchema },
  async ({ db, member, query, now }) => {
    const notices = await listNotices(db, member, query, now)
    return notices.ok ? answer(notices.value) : notices
  },
)
