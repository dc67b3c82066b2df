import { changeNotice } from '@/app/_server/notices'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { noticeChangeSchema } from '@/lib/notices/notice'
import { codeSchema } from '@/lib/sites/site'

// Without If-Match: a notice is only ever seen or acknowledged, and the second to do so changes nothing.
export const PATCH = siteRoute(
  { action: 'notices:acknowledge', params: { notice: codeSchema }, body: noticeChangeSchema },
  async ({ db, member, params, body, now }) => {
    const notice = await changeNotice(db, member, params.notice, body, now)
    return notice.ok ? answer(notice.value) : notice
  },
)
