import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { archiveWood, changeWood } from '@/app/_server/wood-changes'
import { getWood } from '@/app/_server/woods'
import { siteWoodChangeSchema, woodIdSchema } from '@/lib/wood/site-wood'

const params = { wood: woodIdSchema }

export const GET = siteRoute({ action: 'woods:see', params }, async ({ db, member, params }) => {
  const wood = await getWood(db, member, params.wood)
  return wood.ok ? answer(wood.value, { etag: wood.value.version }) : wood
})

export const PATCH = siteRoute(
  { action: 'woods:change', params, body: siteWoodChangeSchema, ifMatch: true },
  async ({ db, member, params, body, ifMatch }) => {
    const wood = await changeWood(db, member, params.wood, ifMatch, body)
    return wood.ok ? answer(wood.value, { etag: wood.value.version }) : wood
  },
)

export const DELETE = siteRoute(
  { action: 'woods:change', params, ifMatch: true },
  async ({ db, member, params, ifMatch, now }) => {
    const gone = await archiveWood(db, member, params.wood, ifMatch, now)
    return gone.ok ? answer(undefined) : gone
  },
)
