'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { useAction } from '@/app/_components/use-action'
import type { SensorCredential, SensorDetail } from '@/lib/sensors/sensor'
import type { Reader } from '@/lib/sites/reader'
import { CredentialSentence } from './credential-sentence'

/** A new secret ends the old one at once, so it asks first. */
export function RenewSecret({ reader, sensor }: { reader: Reader; sensor: SensorDetail }) {
  const [isAsking, setIsAsking] = useState(false)
  const renew = useAction<Record<string, never>, SensorCredential>({
    run: (_input, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/sensors/${sensor.id}/credential`, { method: 'POST', idempotencyKey }),
    invalidates: [siteKey(reader.site, 'sensors')],
    onDone: () => {
      setIsAsking(false)
    },
  })
  return (
    <>
      {renew.answer ? (
        <div role="status" className="flex flex-col gap-4 border-l-[6px] border-good pl-4">
          <CredentialSentence credential={renew.answer} />
        </div>
      ) : null}
      <Button
        className="self-start"
        onClick={() => {
          setIsAsking(true)
        }}
      >
        Renew the secret
      </Button>
      <ConfirmDialog
        open={isAsking}
        onOpenChange={setIsAsking}
        title={`Renew the secret of ${sensor.name}?`}
        confirmLabel="Renew the secret"
        pending={renew.pending}
        onConfirm={() => {
          renew.act({})
        }}
      >
        <p>
          The old secret stops working at once. The sensor stays away until the new one is put into it;
          readings that it keeps meanwhile come in afterwards.
        </p>
      </ConfirmDialog>
    </>
  )
}
