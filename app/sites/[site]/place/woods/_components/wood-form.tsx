'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useRouter } from 'next/navigation'
import { FormProvider, useForm } from 'react-hook-form'
import type { z } from 'zod'
import { apiFetch } from '@/app/_components/api'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Callout } from '@/app/_components/ui/callout'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { useAction } from '@/app/_components/use-action'
import type { Reader } from '@/lib/sites/reader'
import type { NewSiteWood, SiteWoodChange } from '@/lib/wood/site-wood'
import { findSpecies } from '@/lib/wood/species'
import type { Wood } from '@/lib/wood/wood'
import {
  figuresOverTable,
  ownWoodEntrySchema,
  type WoodEntry,
  woodEntryOf,
  woodFiguresEntrySchema,
} from '@/lib/wood/wood-entry'
import { tableWords } from '@/lib/wood/wood-words'
import { woodAreas } from './put-wood-away'
import { NameFields, WordFields } from './wood-text-fields'
import { MovementFields } from './wood-movement-fields'

type WoodFormProps = {
  reader: Reader
  /** Undefined for a new wood of the site's own. */
  wood: Wood | undefined
}

type Entered = z.output<typeof ownWoodEntrySchema> | z.output<typeof woodFiguresEntrySchema>

/** A wood of the site's own, or its figures for one of the table, on a page of its own. */
export function WoodForm({ reader, wood }: WoodFormProps) {
  const router = useRouter()
  const table = wood === undefined ? undefined : findSpecies(wood.slug)
  const isOwn = wood === undefined || wood.isOwn
  const back = `/sites/${reader.site}/place/woods`
  const form = useForm<WoodEntry, unknown, Entered>({
    resolver: zodResolver(isOwn ? ownWoodEntrySchema : woodFiguresEntrySchema),
    defaultValues: woodEntryOf(wood),
  })
  const save = useAction<Entered, Wood>({
    run: (entered, idempotencyKey) => {
      const body = table === undefined ? entered : figuresOverTable(entered, table)
      if (wood?.isOwn === true || wood?.isOverridden === true) {
        const change: SiteWoodChange = body
        return apiFetch(`/sites/${reader.site}/species/${wood.slug}`, {
          method: 'PATCH',
          body: change,
          ifMatch: wood.version,
        })
      }
      const made: NewSiteWood = { ...body, overrides: table?.slug ?? null }
      return apiFetch(`/sites/${reader.site}/species`, { method: 'POST', body: made, idempotencyKey })
    },
    invalidates: woodAreas(reader.site),
    done: (kept) => `${kept.commonName} is kept`,
    onDone: () => {
      router.push(back)
      router.refresh()
    },
    errors: 'inline',
  })
  const isStale = save.problem?.status === 412
  const general =
    save.error && !save.problem?.errors.length
      ? (save.problem?.detail ?? 'No answer came. Nothing was changed; press again.')
      : undefined

  return (
    <FormProvider {...form}>
      <form
        noValidate
        aria-label={wood === undefined ? 'A wood of your own' : `Figures of ${wood.commonName}`}
        className="flex flex-col gap-7"
        onSubmit={form.handleSubmit((entered) => {
          save.act(entered)
        })}
      >
        <PageSentence above={<TextLink href={back}>Woods</TextLink>}>
          {wood === undefined ? (
            'A name makes a wood of your own; the rest may be left as its class has it.'
          ) : isOwn ? (
            <>
              Put the figures of <strong>{wood.commonName}</strong> right.
            </>
          ) : (
            <>
              Your own figures for <strong>{wood.commonName}</strong> count here in place of the table’s.
            </>
          )}
        </PageSentence>
        {general ? (
          <Callout
            tone="warn"
            mark="silent"
            title={isStale ? 'Somebody changed this wood meanwhile.' : general}
            announce
            action={
              isStale ? (
                <Button
                  onClick={() => {
                    window.location.reload()
                  }}
                >
                  Load it as it is now
                </Button>
              ) : undefined
            }
          >
            {isStale ? <p>Your changes were not kept. Load it and make them again.</p> : null}
          </Callout>
        ) : null}
        {isOwn ? (
          <Sheet title="Its name" id="name">
            <NameFields problem={save.problem} />
          </Sheet>
        ) : (
          <p className="max-w-words text-ink-soft max-sm:px-4">
            {table === undefined ? '' : tableWords(table, reader.units)}
          </p>
        )}
        <Sheet title="How it moves" id="movement">
          <MovementFields problem={save.problem} isOwn={isOwn} units={reader.units} />
        </Sheet>
        <Sheet title="Where that comes from" id="source">
          <WordFields problem={save.problem} />
        </Sheet>
        <div className="flex flex-wrap gap-3 px-4 sm:px-0">
          <Button
            type="submit"
            variant="filled"
            pending={save.pending}
            notYet={form.formState.isDirty ? undefined : 'Nothing has been typed yet.'}
          >
            {wood === undefined ? 'Add this wood' : 'Keep these'}
          </Button>
          <ButtonLink href={back} variant="quiet">
            Leave it as it was
          </ButtonLink>
        </div>
      </form>
    </FormProvider>
  )
}
