'use client'

import type { OwnSettings } from '@/lib/notices/own-settings'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import type { Site } from '@/lib/sites/site'
import { OwnSettingsForm } from './own-settings-form'
import { PlaceFacts } from './place-facts'
import { PlaceForm } from './place-form'

type SettingsPartProps = {
  reader: Reader
  site: Site
  settings: OwnSettings
  timeZones: readonly string[]
}

export function SettingsPart({ reader, site, settings, timeZones }: SettingsPartProps) {
  return (
    <>
      {may(reader.role, 'site:change') ? (
        // A new version begins the form anew, so that it never shows what somebody else has changed since.
        <PlaceForm key={site.version} reader={reader} site={site} timeZones={timeZones} />
      ) : (
        <PlaceFacts site={site} units={reader.units} />
      )}
      <OwnSettingsForm reader={reader} site={site} initial={settings} />
    </>
  )
}
