'use client'

import { zodResolver } from '@hookform/resolvers/zod'
import { useRouter } from 'next/navigation'
import { FormProvider, useForm } from 'react-hook-form'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { ButtonLink } from '@/app/_components/ui/button-link'
import { Callout } from '@/app/_components/ui/callout'
import { PageSentence } from '@/app/_components/ui/page-sentence'
import { Sheet } from '@/app/_components/ui/sheet'
import { useAction } from '@/app/_components/use-action'
import { type PieceChange, pieceChangeSchema, type PieceDetail } from '@/lib/pieces/piece'
import type { Reader } from '@/lib/sites/reader'
import type { WoodChoice } from '@/lib/wood/wood'
import { changeOf, factsOf } from './edit-facts'
import { FitFields } from './fit-fields'
import type { RoomChoice } from './first-piece'
import { RestFields } from './rest-fields'
import { WoodFields } from './wood-fields'

type EditPieceProps = {
  reader: Reader
  piece: PieceDetail
  rooms: readonly RoomChoice[]
  woods: readonly WoodChoice[]
}

/** Every fact of a piece. Only what was changed is sent, against the version that was read. */
export function EditPiece({ reader, piece, rooms, woods }: EditPieceProps) {
  const router = useRouter()
  const back = `/sites/${reader.site}/pieces/${piece.id}`
  const form = useForm<PieceChange>({
    resolver: zodResolver(pieceChangeSchema),
    defaultValues: factsOf(piece),
  })
  const save = useAction<PieceChange, unknown>({
    run: (body) =>
      apiFetch(`/sites/${reader.site}/pieces/${piece.id}`, { method: 'PATCH', body, ifMatch: piece.version }),
    invalidates: [
      siteKey(reader.site, 'pieces'),
      siteKey(reader.site, 'now'),
      siteKey(reader.site, 'carries'),
    ],
    done: 'Kept',
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
  const fields = { reader, rooms, problem: save.problem }

  return (
    <FormProvider {...form}>
      <form
        noValidate
        aria-label={`Facts of ${piece.number}`}
        className="flex flex-col gap-7"
        onSubmit={form.handleSubmit((values) => {
          save.act(changeOf(factsOf(piece), values))
        })}
      >
        <PageSentence above={piece.title}>
          Put the facts of <strong>{piece.number}</strong> right. What is left empty is assumed, with a wider
          doubt.
        </PageSentence>
        {general ? (
          <Callout
            tone="warn"
            mark="silent"
            title={isStale ? 'Somebody changed this piece meanwhile.' : general}
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
            {isStale ? (
              <p>Your changes were not kept, so that theirs are not lost. Load it and make them again.</p>
            ) : null}
          </Callout>
        ) : null}
        <Sheet title="What it is" id="what">
          <WoodFields {...fields} woods={woods} />
        </Sheet>
        <Sheet title="Its joint and fit" id="joint">
          <FitFields {...fields} />
        </Sheet>
        <Sheet title="And the rest" id="rest">
          <RestFields {...fields} />
        </Sheet>
        <div className="flex flex-wrap gap-3 px-4 sm:px-0">
          <Button
            type="submit"
            variant="filled"
            pending={save.pending}
            notYet={form.formState.isDirty ? undefined : 'Nothing has been changed.'}
          >
            Keep these
          </Button>
          <ButtonLink href={back} variant="quiet">
            Leave it as it was
          </ButtonLink>
        </div>
      </form>
    </FormProvider>
  )
}
