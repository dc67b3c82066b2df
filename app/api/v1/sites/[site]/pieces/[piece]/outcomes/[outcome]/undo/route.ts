import { setOutcomeUndone } from '@/app/_server/outcomes'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'pieces:record', params: { piece: codeSchema, outcome: codeSchema } },
  async ({ db, member, params, now }) => {
    const outcome = await setOutcomeUndone(db, member, params, true, now)
    return outcome.ok ? answer(outcome.value) : outcome
  },
)
