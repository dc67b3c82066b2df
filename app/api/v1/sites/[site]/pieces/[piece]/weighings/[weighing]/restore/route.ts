import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { restoreWeighing } from '@/app/_server/weighings'
import { codeSchema } from '@/lib/sites/site'

export const POST = siteRoute(
  { action: 'pieces:weigh', params: { piece: codeSchema, weighing: codeSchema } },
  async ({ db, member, params, now }) => {
    const weighing = await restoreWeighing(db, member, params.piece, params.weighing, now)
    return weighing.ok ? answer(weighing.value) : weighing
  },
)
