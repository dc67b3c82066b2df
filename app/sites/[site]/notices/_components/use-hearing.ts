'use client'

import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { useAction } from '@/app/_components/use-action'
import type { Hearing, OwnSettings, OwnSettingsChange } from '@/lib/notices/own-settings'

/** How the reader hears of things, and the one act by which they change it. */
export function useHearing(site: string, initial: Hearing) {
  const query = useSiteQuery<Hearing>({
    site,
    area: 'members',
    key: ['hearing'],
    path: '/members/me/hearing',
    initial,
  })
  const hearing = query.data ?? initial
  const change = useAction<OwnSettingsChange, OwnSettings>({
    run: (body) =>
      apiFetch(`/sites/${site}/members/me`, {
        method: 'PATCH',
        body,
        ifMatch: hearing.settings.version,
      }),
    invalidates: (['members', 'notices'] as const).map((area) => siteKey(site, area)),
    done: 'Kept',
  })
  return { hearing, change }
}
export type HearingChange = ReturnType<typeof useHearing>['change']
