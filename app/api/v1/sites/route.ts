import { answer } from '@/app/_server/respond'
import { signedInRoute } from '@/app/_server/route'
import { createSite, listSites } from '@/app/_server/sites'
import { newSiteSchema } from '@/lib/sites/site'

export const GET = signedInRoute({}, async ({ db, user }) =>
  answer({ items: await listSites(db, user.id), nextCursor: null }),
)

export const POST = signedInRoute({ body: newSiteSchema, creates: true }, async ({ db, user, body, now }) => {
  const made = await createSite(db, user.id, body, now)
  if (!made.ok) return made
  const { id, version } = made.value
  return answer(made.value, { status: 201, etag: version, location: `/api/v1/sites/${id}` })
})
