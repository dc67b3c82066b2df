'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { Choice } from '@/app/_components/ui/choice'
import { Sheet } from '@/app/_components/ui/sheet'
import { Switch } from '@/app/_components/ui/switch'
import { TextLink } from '@/app/_components/ui/text-link'
import { useAction } from '@/app/_components/use-action'
import type { OwnSettings, OwnSettingsChange } from '@/lib/notices/own-settings'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import type { Site } from '@/lib/sites/site'

type OwnSettingsFormProps = { reader: Reader; site: Site; initial: OwnSettings }

/** What one member chooses for themselves. Each choice is kept as it is made. */
export function OwnSettingsForm({ reader, site, initial }: OwnSettingsFormProps) {
  const router = useRouter()
  const [kept, setKept] = useState(initial)
  const change = useAction<OwnSettingsChange, OwnSettings>({
    run: (body) =>
      apiFetch(`/sites/${reader.site}/members/me`, { method: 'PATCH', body, ifMatch: kept.version }),
    invalidates: [['site', reader.site]],
    done: 'Kept',
    onDone: (settings) => {
      setKept(settings)
      // The units stand in every figure that the server drew.
      router.refresh()
    },
  })
  const siteWords = site.unitSystem === 'metric' ? 'metric' : 'imperial'
  return (
    <Sheet title="Yours alone" id="own">
      <div className="flex max-w-[40rem] flex-col gap-5">
        <Choice
          label="Units that you read"
          columns={3}
          options={[
            { value: 'site', label: 'As the site', detail: siteWords },
            { value: 'metric', label: 'Metric', detail: '°C, mm, g' },
            { value: 'imperial', label: 'Imperial', detail: '°F, in, oz' },
          ]}
          value={kept.unitSystem ?? 'site'}
          onChange={(unitSystem) => {
            change.act({ unitSystem: unitSystem === 'site' ? null : unitSystem })
          }}
        />
        {may(reader.role, 'notices:see') ? (
          <>
            <Line words="I am on the house list: tell me when a piece must come in">
              <Switch
                label="House list"
                checked={kept.onHouseList}
                disabled={change.pending}
                onCheckedChange={(onHouseList) => {
                  change.act({ onHouseList })
                }}
              />
            </Line>
            <p className="border-t border-line pt-3 text-ink-soft">
              By what you hear of it, when to be left alone and who covers while you are away:{' '}
              <TextLink href={`/sites/${reader.site}/notices#hearing`}>under Notices</TextLink>.
            </p>
          </>
        ) : null}
      </div>
    </Sheet>
  )
}

function Line({ words, children }: { words: string; children: React.ReactNode }) {
  return (
    <div className="flex items-center justify-between gap-4 border-t border-line pt-3">
      <span>{words}</span>
      {children}
    </div>
  )
}
