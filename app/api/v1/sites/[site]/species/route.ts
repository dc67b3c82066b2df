import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { createWood } from '@/app/_server/wood-changes'
import { listWoods, woodsQuerySchema } from '@/app/_server/woods'
import { newSiteWoodSchema } from '@/lib/wood/site-wood'

export const GET = siteRoute(
  { action: 'woods:see', query: woodsQuerySchema },
  async ({ db, member, query }) => {
    const woods = await listWoods(db, member, query)
    return woods.ok ? answer(woods.value) : woods
  },
)

export const POST = siteRoute(
  { action: 'woods:change', body: newSiteWoodSchema, creates: true },
  async ({ db, member, body, now }) => {
    const wood = await createWood(db, member, body, now)
    if (!wood.ok) return wood
    return answer(wood.value, {
      status: 201,
      etag: wood.value.version,
      location: `/api/v1/sites/${member.siteCode}/species/${wood.value.slug}`,
    })
  },
)
