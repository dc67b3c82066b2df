'use client'

import { useRouter } from 'next/navigation'
import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ConfirmDialog } from '@/app/_components/ui/confirm-dialog'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import type { SensorDetail } from '@/lib/sensors/sensor'
import type { Reader } from '@/lib/sites/reader'

export function RetireSensor({ reader, sensor }: { reader: Reader; sensor: SensorDetail }) {
  const router = useRouter()
  const [isAsking, setIsAsking] = useState(false)
  const retire = useAction<Record<string, never>, unknown>({
    run: () =>
      apiFetch(`/sites/${reader.site}/sensors/${sensor.id}`, { method: 'DELETE', ifMatch: sensor.version }),
    invalidates: [
      siteKey(reader.site, 'sensors'),
      siteKey(reader.site, 'rooms'),
      siteKey(reader.site, 'frame'),
    ],
    done: `${sensor.name} is retired; its readings are kept`,
    onDone: () => {
      router.push(`/sites/${reader.site}/sensors`)
    },
  })
  return (
    <Sheet title="Retire it" id="retire">
      <p className="max-w-words">
        A retired sensor can’t sign in any more. Everything that it measured stays with the rooms it hung in.
      </p>
      <Button
        className="mt-4"
        onClick={() => {
          setIsAsking(true)
        }}
      >
        Retire this sensor
      </Button>
      <ConfirmDialog
        open={isAsking}
        onOpenChange={setIsAsking}
        title={`Retire ${sensor.name}?`}
        confirmLabel="Retire it"
        pending={retire.pending}
        onConfirm={() => {
          retire.act({})
        }}
      >
        <p>
          It is cut off at once and its name in the broker is never used again. Its readings stay. To use the
          device again, add it as a new sensor.
        </p>
      </ConfirmDialog>
    </Sheet>
  )
}
