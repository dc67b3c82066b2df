'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useRouter } from 'next/navigation'
import { useEffect } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { Callout } from '@/app/_components/ui/callout'
import { Choice } from '@/app/_components/ui/choice'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Select } from '@/app/_components/ui/select'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import { newSiteSchema, type NewSite, type Site } from '@/lib/sites/site'
import { roomKindWords } from '@/lib/rooms/room'

const units = [
  { value: 'metric' as const, label: 'Metric', detail: '°C, mm, g' },
  { value: 'imperial' as const, label: 'Imperial', detail: '°F, inch, oz' },
]

/** The first run: one page, five answers, and the moisture rule has two rooms to hang. */
export function NewSiteForm({ timeZones }: { timeZones: readonly string[] }) {
  const router = useRouter()
  const form = useForm({
    resolver: zodResolver(newSiteSchema),
    defaultValues: {
      name: '',
      timeZone: 'UTC',
      unitSystem: 'metric' as NewSite['unitSystem'],
      rooms: [
        { name: 'House cupboard', kind: 'cupboard' as NewSite['rooms'][number]['kind'] },
        { name: 'Shop', kind: 'shop' as NewSite['rooms'][number]['kind'] },
      ],
    },
  })
  const { errors } = form.formState
  const values = useWatch({ control: form.control })
  const { setValue, getFieldState } = form

  // The browser alone knows where it stands; the server's own zone would be a guess.
  useEffect(() => {
    const here = Intl.DateTimeFormat().resolvedOptions().timeZone
    if (timeZones.includes(here) && !getFieldState('timeZone').isDirty) setValue('timeZone', here)
  }, [timeZones, setValue, getFieldState])

  const make = useAction<NewSite, Site>({
    run: (body, idempotencyKey) => apiFetch('/sites', { method: 'POST', body, idempotencyKey }),
    onDone: (site) => {
      router.push(`/sites/${site.id}`)
    },
    errors: 'inline',
  })
  const general =
    make.error && !make.problem?.errors.length
      ? (make.problem?.detail ?? 'No answer came. Nothing was lost; press again.')
      : undefined
  const roomError = (index: number) =>
    errors.rooms?.[index]?.name?.message ?? make.problem?.errorOf(`rooms.${String(index)}.name`)

  return (
    <form
      noValidate
      aria-label="A new site"
      className="flex flex-col gap-7"
      onSubmit={form.handleSubmit((body) => {
        make.act(body)
      })}
    >
      <PageSentence>
        A name, where it is, and two rooms. That is enough to ask your first question.
      </PageSentence>
      {general ? <Callout tone="warn" mark="silent" title={general} announce /> : null}
      <Sheet title="The site">
        <div className="flex flex-col gap-5">
          <Field
            label="What it is called"
            hint="Your yard, your workshop, your club."
            error={errors.name?.message ?? make.problem?.errorOf('name')}
          >
            <Input autoComplete="off" {...form.register('name')} />
          </Field>
          <Choice
            label="Units"
            options={units}
            value={values.unitSystem}
            onChange={(unitSystem) => {
              form.setValue('unitSystem', unitSystem)
            }}
            hint="Each member can choose their own later."
          />
          <Field
            label="Time zone"
            hint="Times that you are told, quiet hours and days go by it."
            error={errors.timeZone?.message ?? make.problem?.errorOf('timeZone')}
          >
            <Select {...form.register('timeZone')}>
              {timeZones.map((zone) => (
                <option key={zone} value={zone}>
                  {zone.replaceAll('_', ' ')}
                </option>
              ))}
            </Select>
          </Field>
        </div>
      </Sheet>
      <Sheet title="Its first two rooms">
        <div className="flex flex-col gap-5">
          <Field
            label="Where finished boxes are kept"
            error={roomError(0)}
            hint={`A ${roomKindWords.cupboard}, say.`}
          >
            <Input autoComplete="off" {...form.register('rooms.0.name')} />
          </Field>
          <Field
            label="Where you turn"
            error={roomError(1)}
            hint="The shop: damper than the house, most of the year."
          >
            <Input autoComplete="off" {...form.register('rooms.1.name')} />
          </Field>
        </div>
      </Sheet>
      <div className="px-4 sm:px-0">
        <Button type="submit" variant="filled" pending={make.pending || make.done} className="max-sm:w-full">
          Make the site
        </Button>
      </div>
    </form>
  )
}
