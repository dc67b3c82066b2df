import { getDeliveryLog } from '@/app/_server/notice-deliveries'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const GET = siteRoute(
  { action: 'notices:see', params: { notice: codeSchema } },
  async ({ db, member, params }) => {
    const log = await getDeliveryLog(db, member, params.notice)
    return log.ok ? answer(log.value) : log
  },
)
