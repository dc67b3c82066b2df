import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { undoWeighing } from '@/app/_server/weighings'
import { codeSchema } from '@/lib/sites/site'

/** A weighing is marked as undone, and stays in the list. */
export const DELETE = siteRoute(
  { action: 'pieces:weigh', params: { piece: codeSchema, weighing: codeSchema } },
  async ({ db, member, params, now }) => {
    const undone = await undoWeighing(db, member, params.piece, params.weighing, now)
    return undone.ok ? answer(undefined) : undone
  },
)
