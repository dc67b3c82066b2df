import { leaveSite } from '@/app/_server/members'
import { changeOwnSettings, getOwnSettings } from '@/app/_server/own-settings'
import { answer } from '@/app/_server/respond'
import { siteRoute } from '@/app/_server/route'
import { ownSettingsChangeSchema } from '@/lib/notices/own-settings'

export const GET = siteRoute({ action: 'settings:own' }, async ({ db, member, now }) => {
  const settings = await getOwnSettings(db, member, now)
  return answer(settings, { etag: settings.version })
})

export const PATCH = siteRoute(
  { action: 'settings:own', body: ownSettingsChangeSchema, ifMatch: true },
  async ({ db, member, body, ifMatch, now }) => {
    const settings = await changeOwnSettings(db, member, ifMatch, body, now)
    return settings.ok ? answer(settings.value, { etag: settings.value.version }) : settings
  },
)

export const DELETE = siteRoute({ action: 'settings:own' }, async ({ db, member }) => {
  const left = await leaveSite(db, member)
  return left.ok ? answer(undefined) : left
})
