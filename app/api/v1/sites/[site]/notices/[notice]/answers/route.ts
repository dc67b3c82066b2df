import { answerNotice } from '@/app/_server/notice-answers'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newAnswerSchema } from '@/lib/notices/answers'
import { codeSchema } from '@/lib/sites/site'

// Without Idempotency-Key: answered twice, the newest counts, and what is in stays in.
export const POST = siteRoute(
  { action: 'notices:acknowledge', params: { notice: codeSchema }, body: newAnswerSchema },
  async ({ db, member, params, body, now }) => {
    const notice = await answerNotice(db, member, params.notice, body, 'page', now)
    return notice.ok ? answer(notice.value) : notice
  },
)
