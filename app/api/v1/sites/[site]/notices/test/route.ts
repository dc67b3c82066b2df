import { sendTest } from '@/app/_server/notice-deliveries'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'

export const POST = siteRoute(
  { action: 'notices:acknowledge', creates: true },
  async ({ db, member, now }) => {
    const notice = await sendTest(db, member, now)
    return notice.ok ? answer(notice.value, { status: 201 }) : notice
  },
)
