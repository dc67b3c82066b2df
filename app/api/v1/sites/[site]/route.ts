import { z } from 'zod'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { changeSite, removeSite } from '@/app/_server/sites'
import { siteChangeSchema } from '@/lib/sites/site'

export const GET = siteRoute({ action: 'site:see' }, ({ member }) =>
  answer(member.site, { etag: member.site.version }),
)

export const PATCH = siteRoute(
  { action: 'site:change', body: siteChangeSchema, ifMatch: true },
  async ({ db, member, body, ifMatch }) => {
    const changed = await changeSite(db, member, body, ifMatch)
    return changed.ok ? answer(changed.value, { etag: changed.value.version }) : changed
  },
)

export const DELETE = siteRoute(
  { action: 'site:delete', body: z.strictObject({ name: z.string().max(200).optional() }) },
  async ({ db, member, body, now }) => {
    const removed = await removeSite(db, member, body.name, now)
    return removed.ok ? answer(undefined) : removed
  },
)
