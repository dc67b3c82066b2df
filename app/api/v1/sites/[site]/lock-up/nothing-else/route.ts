import { answerNothingElse } from '@/app/_server/lock-up'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { nothingElseSchema } from '@/lib/lock-up/lock-up'

// Answered twice, the first answer stands.
export const POST = siteRoute(
  { action: 'carries:do', body: nothingElseSchema },
  async ({ db, member, body, now }) => answer(await answerNothingElse(db, member, body.isNothing, now)),
)
