import { retryDeliveries } from '@/app/_server/notice-deliveries'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'notices:acknowledge', params: { notice: codeSchema } },
  async ({ db, member, params, now }) => {
    const notice = await retryDeliveries(db, member, params.notice, now)
    return notice.ok ? answer(notice.value) : notice
  },
)
