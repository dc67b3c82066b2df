'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Switch } from '@/app/_components/ui/switch'
import { useAction } from '@/app/_components/use-action'
import { formatMoment } from '@/lib/format/times'
import type { Hearing } from '@/lib/notices/own-settings'
import type { Reader } from '@/lib/sites/reader'
import { browserName, signUpHere, usePhoneHere } from './phone-here'
import type { HearingChange } from './use-hearing'

type PhoneLineProps = { reader: Reader; hearing: Hearing; change: HearingChange }

/** Notices on this phone: signs this browser up and off, and says why where it can't. */
export function PhoneLine({ reader, hearing, change }: PhoneLineProps) {
  const here = usePhoneHere()
  const [refusal, setRefusal] = useState<string>()
  const isHere = hearing.phones.some((phone) => phone.endpoint === here.endpoint && !phone.isGone)
  const invalidates = [siteKey(reader.site, 'members')]
  const signUp = useAction<{ key: string }, unknown>({
    run: async ({ key }) => {
      const subscription = await signUpHere(key)
      if (subscription === undefined) return setRefusal('The browser was told not to show notices here.')
      setRefusal(undefined)
      here.setEndpoint(subscription.endpoint)
      return apiFetch('/push/subscriptions', {
        method: 'POST',
        body: { ...subscription, device: browserName(navigator.userAgent) },
      })
    },
    invalidates,
  })
  const signOff = useAction<{ endpoint: string }, unknown>({
    run: (body) => apiFetch('/push/subscriptions', { method: 'DELETE', body }),
    invalidates,
  })
  const why =
    hearing.pushKey === null ? 'Nothing can be sent to phones from here: its keys are not set.' : here.why
  const { pushKey } = hearing

  return (
    <div className="flex max-w-[40rem] flex-col gap-2 border-t border-line pt-3">
      <div className="flex items-center justify-between gap-4">
        <span>On the phones that are signed up, with buttons to answer</span>
        <Switch
          label="On the phone"
          checked={hearing.settings.pushOn}
          disabled={change.pending}
          onCheckedChange={(pushOn) => {
            change.act({ pushOn })
          }}
        />
      </div>
      <ul className="text-label text-ink-soft">
        {hearing.phones.map((phone) => (
          <li key={phone.endpoint} className="flex flex-wrap items-center gap-x-3">
            <span>
              {phone.device || 'A phone'}
              {phone.endpoint === here.endpoint ? ' (this one)' : ''}
              {phone.isGone
                ? ': signed off by its browser'
                : phone.lastSentAt === null
                  ? ': nothing shown yet'
                  : `: last shown ${formatMoment(phone.lastSentAt, reader.timeZone, new Date(reader.at))}`}
            </span>
            <Button
              variant="link"
              pending={signOff.pending}
              onClick={() => {
                signOff.act({ endpoint: phone.endpoint })
              }}
            >
              Take it off
            </Button>
          </li>
        ))}
      </ul>
      {isHere || pushKey === null ? null : (
        <Button
          className="self-start"
          pending={signUp.pending}
          notYet={why}
          onClick={() => {
            signUp.act({ key: pushKey })
          }}
        >
          Tell me on this phone
        </Button>
      )}
      {pushKey === null && why !== undefined ? <p className="text-label text-ink-soft">{why}</p> : null}
      {refusal === undefined ? null : (
        <p role="alert" className="text-label text-warn">
          {refusal}
        </p>
      )}
    </div>
  )
}
