import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { createWeighing, getWeighings, weighingsQuerySchema } from '@/app/_server/weighings'
import { newWeighingSchema } from '@/lib/pieces/event'
import { codeSchema } from '@/lib/sites/site'

const params = { piece: codeSchema }

export const GET = siteRoute(
  { action: 'pieces:weigh', params, query: weighingsQuerySchema },
  async ({ db, member, params, query, now }) => {
    const weighings = await getWeighings(db, member, params.piece, query, now)
    return weighings.ok ? answer(weighings.value) : weighings
  },
)

export const POST = siteRoute(
  { action: 'pieces:weigh', params, body: newWeighingSchema, creates: true },
  async ({ db, member, params, body, now }) => {
    const weighing = await createWeighing(db, member, params.piece, body, now)
    return weighing.ok ? answer(weighing.value, { status: 201 }) : weighing
  },
)
