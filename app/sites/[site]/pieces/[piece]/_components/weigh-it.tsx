'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Dialog } from '@/app/_components/ui/dialog'
import { useNow } from '@/app/_components/ui/use-now'
import { useAction } from '@/app/_components/use-action'
import { formatMass } from '@/lib/format/figures'
import type { Weighing } from '@/lib/pieces/event'
import type { WeighingsPage } from '@/lib/seasoning/rest-view'
import type { Reader } from '@/lib/sites/reader'
import { useWeighings } from './use-weighings'
import { WeighForm, type WeighingInput } from './weigh-form'

type WeighItProps = {
  reader: Reader
  piece: { id: string; number: string }
  initial: WeighingsPage | null
  /** The one thing to do on the page. */
  isFilled?: boolean
}

export function WeighIt({ reader, piece, initial, isFilled = false }: WeighItProps) {
  const { data } = useWeighings(reader, piece.id, initial)
  const [isOpen, setIsOpen] = useState(false)
  const now = useNow(reader.at)
  const weigh = useAction<WeighingInput, Weighing>({
    run: (body, idempotencyKey) =>
      apiFetch(`/sites/${reader.site}/pieces/${piece.id}/weighings`, {
        method: 'POST',
        body,
        idempotencyKey,
      }),
    invalidates: [siteKey(reader.site, 'pieces'), siteKey(reader.site, 'now')],
    done: ({ grams }) => `${piece.number}: ${formatMass(grams, reader.units)} kept`,
    onDone: () => {
      setIsOpen(false)
    },
    errors: 'inline',
  })
  const rest = data?.rest
  return (
    <>
      <Button
        variant={isFilled ? 'filled' : undefined}
        className={isFilled ? 'max-sm:w-full' : 'max-sm:grow'}
        onClick={() => {
          weigh.reset()
          setIsOpen(true)
        }}
      >
        Weigh it
      </Button>
      <Dialog open={isOpen} onOpenChange={setIsOpen} title={`What does ${piece.number} weigh?`}>
        <WeighForm
          reader={reader}
          now={now}
          lastG={rest?.weighings.grams.at(-1)}
          asksStep={rest?.isStepAssumed ?? false}
          pending={weigh.pending}
          refusal={
            weigh.error
              ? (weigh.problem?.errors[0]?.message ??
                weigh.problem?.detail ??
                'No answer came. Nothing was kept; press again.')
              : undefined
          }
          onWeigh={weigh.act}
        />
      </Dialog>
    </>
  )
}
