'use client'

import { useState } from 'react'
import { apiFetch } from '@/app/_components/api'
import { siteKey } from '@/app/_components/live/site-keys'
import { Button } from '@/app/_components/ui/button'
import { Caution } from '@/app/_components/ui/caution'
import { useAction } from '@/app/_components/use-action'
import { carryCautions } from '@/lib/carry/cautions'
import type { NewOutcome, Outcome, Turned } from '@/lib/pieces/outcome'

const answers: readonly { turned: Turned; label: string }[] = [
  { turned: 'as-before', label: 'As before' },
  { turned: 'tighter', label: 'Tighter' },
  { turned: 'binds', label: 'It binds' },
  { turned: 'looser', label: 'Looser' },
]

type TurnedAskProps = {
  site: string
  pieceId: string
  /** The carry that it came back from; left out at any other time. */
  carryId?: string
  question: string
  /** What was answered already. */
  told?: Outcome | undefined
  /** Outcomes that were taken back elsewhere on the page. */
  undoneIds?: readonly string[]
  /** For a carry: not now. */
  onSkip?: () => void
}

/** "How did the lid turn?": one press answers it. What is answered teaches the site's figures. */
export function TurnedAsk({
  site,
  pieceId,
  carryId,
  question,
  told,
  undoneIds = [],
  onSkip,
}: TurnedAskProps) {
  const [justTold, setJustTold] = useState<Outcome>()
  const shown = told ?? (justTold && !undoneIds.includes(justTold.id) ? justTold : undefined)
  const path = `/sites/${site}/pieces/${pieceId}/outcomes`
  const invalidates = [siteKey(site, 'pieces'), siteKey(site, 'carries'), siteKey(site, 'now')]
  const tell = useAction({
    run: (body: Pick<NewOutcome, 'turned' | 'carryId'>, idempotencyKey) =>
      apiFetch<Outcome>(path, { method: 'POST', body, idempotencyKey }),
    invalidates,
    onDone: setJustTold,
  })
  const undo = useAction({
    run: ({ id }: { id: string }) => apiFetch<Outcome>(`${path}/${id}/undo`, { method: 'POST' }),
    invalidates,
    onDone: () => {
      setJustTold(undefined)
    },
  })
  if (shown !== undefined) {
    const words = answers.find(({ turned }) => turned === shown.turned)?.label.toLowerCase() ?? ''
    return (
      <div className="flex flex-col gap-2" role="status">
        <p>
          Noted: {words}.{' '}
          <Button
            variant="link"
            pending={undo.pending}
            onClick={() => {
              undo.act({ id: shown.id })
            }}
          >
            Undo
          </Button>
        </p>
        {shown.turned === 'binds' || shown.turned === 'tighter' ? (
          <Caution>{carryCautions[1]}</Caution>
        ) : null}
      </div>
    )
  }
  return (
    <fieldset>
      <legend className="mb-2 font-semibold">{question}</legend>
      <div className="flex flex-wrap gap-2">
        {answers.map(({ turned, label }) => (
          <Button
            key={turned}
            pending={tell.pending}
            className="max-sm:grow"
            onClick={() => {
              tell.act({ turned, ...(carryId === undefined ? {} : { carryId }) })
            }}
          >
            {label}
          </Button>
        ))}
        {onSkip ? (
          <Button variant="quiet" onClick={onSkip}>
            Skip
          </Button>
        ) : null}
      </div>
      <p className="mt-1 text-label text-ink-soft">Tried with the grain lined up and a quarter turn on.</p>
    </fieldset>
  )
}
