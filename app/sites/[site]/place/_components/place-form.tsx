'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useForm, useWatch } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { Choice } from '@/app/_components/ui/choice'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Select } from '@/app/_components/ui/select'
import { SentenceInput } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import { scaleSteps } from '@/lib/format/scale-steps'
import type { Reader } from '@/lib/sites/reader'
import { type Site, type SiteChange, siteChangeSchema } from '@/lib/sites/site'

const units = [
  { value: 'metric' as const, label: 'Metric', detail: '°C, mm, g' },
  { value: 'imperial' as const, label: 'Imperial', detail: '°F, inch, oz' },
]

/** The list gives texts; what was stored comes as a number, and nothing as null. */
const stepOf = (value: string | number | null): number | null =>
  value === null || value === '' ? null : Number(value)

type PlaceFormProps = { reader: Reader; site: Site; timeZones: readonly string[] }

export function PlaceForm({ reader, site, timeZones }: PlaceFormProps) {
  const { name, timeZone, unitSystem, quietFrom, quietTo, lockUpAt, scaleStepG } = site
  const form = useForm({
    resolver: zodResolver(siteChangeSchema),
    defaultValues: { name, timeZone, unitSystem, quietFrom, quietTo, lockUpAt, scaleStepG },
  })
  const values = useWatch({ control: form.control })
  const save = useAction<SiteChange, Site>({
    run: (body) => apiFetch(`/sites/${reader.site}`, { method: 'PATCH', body, ifMatch: site.version }),
    invalidates: [['site', reader.site]],
    done: 'Kept',
    errors: 'inline',
  })
  const errorOf = (field: keyof SiteChange) =>
    form.formState.errors[field]?.message ?? save.problem?.errorOf(field)
  const general =
    save.error && !save.problem?.errors.length
      ? (save.problem?.detail ?? 'No answer came. Nothing was changed; press again.')
      : undefined
  const timeError = errorOf('quietFrom') ?? errorOf('quietTo') ?? errorOf('lockUpAt')

  return (
    <Sheet title="The place" id="place">
      <form
        noValidate
        aria-label="The place"
        className="flex max-w-[40rem] flex-col gap-5"
        onSubmit={form.handleSubmit((body) => {
          save.act(body)
        })}
      >
        <Field label="Name" error={errorOf('name')}>
          <Input autoComplete="off" {...form.register('name')} />
        </Field>
        <Field
          label="Time zone"
          error={errorOf('timeZone')}
          hint="Days, quiet hours and the times that you are told go by it. A change has the daily figures made anew."
        >
          <Select {...form.register('timeZone')}>
            {[...new Set([timeZone, ...timeZones])].map((zone) => (
              <option key={zone} value={zone}>
                {zone.replaceAll('_', ' ')}
              </option>
            ))}
          </Select>
        </Field>
        <Choice
          label="Units"
          options={units}
          value={values.unitSystem}
          onChange={(unitSystem) => {
            form.setValue('unitSystem', unitSystem, { shouldDirty: true })
          }}
          hint="For those who have chosen none of their own."
        />
        <Field
          label="The smallest step that your scale shows"
          hint="Weights of resting wood are the same within it. Taken as 1 g until told."
          error={errorOf('scaleStepG')}
        >
          <Select {...form.register('scaleStepG', { setValueAs: stepOf })}>
            <option value="">Not told</option>
            {scaleSteps(reader.units, scaleStepG).map(({ stepG, words }) => (
              <option key={stepG} value={String(stepG)}>
                {words}
              </option>
            ))}
          </Select>
        </Field>
        <div>
          <FlowingSentence>
            Quiet from <SentenceInput type="time" label="Quiet hours begin" {...form.register('quietFrom')} />{' '}
            to <SentenceInput type="time" label="Quiet hours end" {...form.register('quietTo')} />; at{' '}
            <SentenceInput type="time" label="Lock-up" {...form.register('lockUpAt')} /> ask what is still
            out.{' '}
          </FlowingSentence>
          {timeError ? (
            <p role="alert" className="text-label text-warn">
              {timeError}
            </p>
          ) : (
            <p className="text-label text-ink-soft">The same time twice means no quiet hours.</p>
          )}
        </div>
        {general ? (
          <p role="alert" className="text-warn">
            {general}
          </p>
        ) : null}
        <Button type="submit" variant="filled" pending={save.pending} className="self-start max-sm:w-full">
          Keep these
        </Button>
      </form>
    </Sheet>
  )
}
