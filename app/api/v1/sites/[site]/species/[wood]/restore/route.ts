import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { restoreWood } from '@/app/_server/wood-changes'
import { woodIdSchema } from '@/lib/wood/site-wood'

export const POST = siteRoute(
  { action: 'woods:change', params: { wood: woodIdSchema } },
  async ({ db, member, params }) => {
    const wood = await restoreWood(db, member, params.wood)
    return wood.ok ? answer(wood.value, { etag: wood.value.version }) : wood
  },
)
