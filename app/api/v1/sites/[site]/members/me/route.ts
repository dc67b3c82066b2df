import { changeOwnSettings, getOwnSettings, leaveSite } from '@/app/_server/members'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { ownSettingsSchema } from '@/lib/sites/site'

export const GET = siteRoute({ action: 'settings:own' }, async ({ db, member }) =>
  answer(await getOwnSettings(db, member)),
)

export const PATCH = siteRoute(
  { action: 'settings:own', body: ownSettingsSchema },
  async ({ db, member, body }) => answer(await changeOwnSettings(db, member, body)),
)

export const DELETE = siteRoute({ action: 'settings:own' }, async ({ db, member }) => {
  const left = await leaveSite(db, member)
  return left.ok ? answer(undefined) : left
})
