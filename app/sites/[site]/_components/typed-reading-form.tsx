'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm, useWatch } from 'react-hook-form'
import { z } from 'zod'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ErrorCallout } from '@/app/_components/ui/error-callout'
import { Field } from '@/app/_components/ui/field'
import { NumberInput } from '@/app/_components/ui/number-input'
import { useAction } from '@/app/_components/use-action'
import { formatEmc } from '@/lib/format/figures'
import type { TypedReading } from '@/lib/rooms/room'
import type { UnitSystem } from '@/lib/sites/site'
import { celsiusFromFahrenheit } from '@/lib/units'
import { emcOfReadingPct } from '@/lib/wood/emc'

/** A number as people type it: a comma for a point, a space before the unit. */
const typedNumber = (min: number, max: number, unit: string) => {
  const message = `between ${String(min).replace('-', '−')} and ${String(max)} ${unit}`
  return z
    .string()
    .transform((text) =>
      text.trim() === '' ? Number.NaN : Number(text.trim().replace(',', '.').replace('−', '-')),
    )
    .refine((value) => value >= min && value <= max, message)
}

const formSchema = (units: UnitSystem) =>
  z.object({
    temperature: units === 'metric' ? typedNumber(-40, 80, '°C') : typedNumber(-40, 176, '°F'),
    humidity: typedNumber(0, 100, '% RH'),
  })
type Form = z.input<ReturnType<typeof formSchema>>
type Values = z.output<ReturnType<typeof formSchema>>

type TypedReadingFormProps = {
  site: string
  room: { id: string; name: string }
  units: UnitSystem
  submitWords?: string
  onDone?: () => void
}

/** What any hygrometer shows, typed in. It counts for a while, with a wider doubt. */
export function TypedReadingForm({
  site,
  room,
  units,
  submitWords = 'Hang it on the rule',
  onDone,
}: TypedReadingFormProps) {
  const form = useForm<Form, unknown, Values>({
    resolver: zodResolver(formSchema(units)),
    defaultValues: { temperature: '', humidity: '' },
  })
  const save = useAction({
    run: (reading: TypedReading, idempotencyKey) =>
      apiFetch(`/sites/${site}/rooms/${room.id}/readings`, { method: 'POST', body: reading, idempotencyKey }),
    invalidates: [siteKey(site, 'now'), siteKey(site, 'rooms'), siteKey(site, 'carries')],
    done: `The reading hangs in ${room.name}`,
    errors: 'inline',
    onDone: () => {
      form.reset()
      onDone?.()
    },
  })
  const celsius = (temperature: number) =>
    units === 'metric' ? temperature : celsiusFromFahrenheit(temperature)
  const typed = formSchema(units).safeParse(useWatch({ control: form.control }))
  return (
    <form
      noValidate
      className="flex flex-col gap-4"
      onSubmit={(event) => {
        void form.handleSubmit((values) => {
          save.act({ temperatureC: celsius(values.temperature), humidityPct: values.humidity })
        })(event)
      }}
    >
      <div className="grid grid-cols-2 gap-3">
        <Field label="Temperature" error={form.formState.errors.temperature?.message}>
          <NumberInput unit={units === 'metric' ? '°C' : '°F'} {...form.register('temperature')} />
        </Field>
        <Field label="Humidity" error={form.formState.errors.humidity?.message}>
          <NumberInput unit="% RH" {...form.register('humidity')} />
        </Field>
      </div>
      <p role="status" className="text-label text-ink-soft">
        {typed.success ? (
          <>
            That is{' '}
            <strong className="text-ink">
              {formatEmc(emcOfReadingPct(celsius(typed.data.temperature), typed.data.humidity))}
            </strong>{' '}
            for wood left there, give or take about 1 point of % MC.
          </>
        ) : (
          'A typed figure counts for 2 hours in a shop and for a day in the house; a sensor keeps watch at night too.'
        )}
      </p>
      {save.error ? <ErrorCallout error={save.error} /> : null}
      <div>
        <Button type="submit" variant="filled" pending={save.pending} className="max-sm:w-full">
          {submitWords}
        </Button>
      </div>
    </form>
  )
}
