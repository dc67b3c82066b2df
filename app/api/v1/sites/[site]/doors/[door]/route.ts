import { removeDoor } from '@/app/_server/doors'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { codeSchema } from '@/lib/sites/site'

export const DELETE = siteRoute(
  { action: 'doors:change', params: { door: codeSchema } },
  async ({ db, member, params, now }) => {
    const removed = await removeDoor(db, member, params.door, now)
    return removed.ok ? answer(undefined) : removed
  },
)
