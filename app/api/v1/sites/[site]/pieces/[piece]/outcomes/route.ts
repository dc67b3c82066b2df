import { createOutcome, getOutcomes } from '@/app/_server/outcomes'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { newOutcomeSchema } from '@/lib/pieces/outcome'
import { codeSchema } from '@/lib/sites/site'

const params = { piece: codeSchema }

export const GET = siteRoute({ action: 'pieces:record', params }, async ({ db, member, params }) => {
  const outcomes = await getOutcomes(db, member, params.piece)
  return outcomes.ok ? answer(outcomes.value) : outcomes
})

export const POST = siteRoute(
  { action: 'pieces:record', params, body: newOutcomeSchema, creates: true },
  async ({ db, member, params, body, now }) => {
    const outcome = await createOutcome(db, member, params.piece, body, now)
    return outcome.ok ? answer(outcome.value, { status: 201 }) : outcome
  },
)
