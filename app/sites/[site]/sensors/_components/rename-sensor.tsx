'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { useAction } from '@/app/_components/use-action'
import { newSensorSchema, type SensorDetail } from '@/lib/sensors/sensor'
import type { Reader } from '@/lib/sites/reader'

const renameSchema = newSensorSchema.pick({ name: true })

export function RenameSensor({ reader, sensor }: { reader: Reader; sensor: SensorDetail }) {
  const [isOpen, setIsOpen] = useState(false)
  const form = useForm({ resolver: zodResolver(renameSchema), values: { name: sensor.name } })
  const rename = useAction<{ name: string }, unknown>({
    run: (body) =>
      apiFetch(`/sites/${reader.site}/sensors/${sensor.id}`, {
        method: 'PATCH',
        body,
        ifMatch: sensor.version,
      }),
    invalidates: [siteKey(reader.site, 'sensors'), siteKey(reader.site, 'rooms')],
    done: 'Renamed',
    onDone: () => {
      setIsOpen(false)
    },
    errors: 'inline',
  })
  return (
    <>
      <Button
        variant="link"
        onClick={() => {
          setIsOpen(true)
        }}
      >
        Rename it
      </Button>
      <Dialog open={isOpen} onOpenChange={setIsOpen} title="Rename this sensor">
        <form
          noValidate
          className="flex flex-col gap-4"
          onSubmit={form.handleSubmit((values) => {
            rename.act(values)
          })}
        >
          <Field
            label="Name"
            error={
              form.formState.errors.name?.message ?? rename.problem?.errorOf('name') ?? rename.error?.message
            }
          >
            <Input {...form.register('name')} />
          </Field>
          <Button type="submit" variant="filled" pending={rename.pending}>
            Keep the name
          </Button>
        </form>
      </Dialog>
    </>
  )
}
