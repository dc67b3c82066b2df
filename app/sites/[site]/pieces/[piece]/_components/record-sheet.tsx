'use client'

import { type FormEvent, useState } from 'react'
import { useSiteQuery } from '@/app/_components/live/use-site-query'
import { Button } from '@/app/_components/ui/button'
import { Field } from '@/app/_components/ui/field'
import { Input } from '@/app/_components/ui/input'
import { Sheet } from '@/app/_components/ui/sheet'
import { formatMoment } from '@/lib/format/times'
import type { PieceEventView } from '@/lib/pieces/event'
import { learnedWords } from '@/lib/pieces/learned-words'
import type { PieceOutcomes } from '@/lib/pieces/outcome'
import type { PieceDetail } from '@/lib/pieces/piece'
import { may } from '@/lib/sites/permissions'
import type { Reader } from '@/lib/sites/reader'
import { TurnedAsk } from '../../../_components/turned-ask'
import { type RecordLine, recordLines } from './record-lines'
import { usePieceRecord } from './use-piece-record'

export type PieceRecordView = {
  readonly events: { readonly items: PieceEventView[] }
  readonly outcomes: PieceOutcomes
}

type RecordSheetProps = { reader: Reader; piece: PieceDetail; initial: PieceRecordView }

/** What happened to the piece, and how its lid turned: newest first, each with who entered it, and an undo. */
export function RecordSheet({ reader, piece, initial }: RecordSheetProps) {
  const query = { site: reader.site, area: 'pieces' } as const
  const { data: events = initial.events } = useSiteQuery<PieceRecordView['events']>({
    ...query,
    key: ['events', piece.id],
    path: `/pieces/${piece.id}/events`,
    initial: initial.events,
  })
  const { data: outcomes = initial.outcomes } = useSiteQuery<PieceOutcomes>({
    ...query,
    key: ['outcomes', piece.id],
    path: `/pieces/${piece.id}/outcomes`,
    initial: initial.outcomes,
  })
  const { setUndone } = usePieceRecord(reader.site, piece.id)
  const lines = recordLines(events.items, outcomes.items, reader.units)
  const isAround = piece.isArchived !== true
  const mayUndo = (line: RecordLine) =>
    isAround && (line.what === 'outcomes' || line.isNote || may(reader.role, 'pieces:change'))
  return (
    <Sheet title="What happened" id="record">
      {isAround ? (
        <div className="mb-5 grid gap-x-10 gap-y-5 lg:grid-cols-2">
          {piece.stage === 'box' ? (
            <TurnedAsk
              site={reader.site}
              pieceId={piece.id}
              question="You tried the lid? How did it turn?"
              undoneIds={outcomes.items.flatMap(({ id, isUndone }) => (isUndone ? [id] : []))}
            />
          ) : null}
          <NoteForm reader={reader} pieceId={piece.id} />
        </div>
      ) : null}
      {outcomes.learned ? <p className="mb-3 max-w-words">{learnedWords(outcomes.learned)}</p> : null}
      {lines.length === 0 ? (
        <p className="text-ink-soft">Nothing has been entered yet.</p>
      ) : (
        <ol className="flex flex-col divide-y divide-line">
          {lines.map((line) => (
            <li key={`${line.what} ${line.id}`} className="flex items-start justify-between gap-4 py-2">
              <div className="min-w-0">
                <p className={line.isUndone ? 'text-ink-soft line-through' : 'font-semibold'}>{line.title}</p>
                {line.more && !line.isUndone ? <p className="max-w-words">{line.more}</p> : null}
                <p className="text-label text-ink-soft">{lineWords(line, reader)}</p>
              </div>
              {mayUndo(line) ? (
                <Button
                  variant="link"
                  pending={setUndone.pending}
                  aria-label={`${line.isUndone ? 'Put back' : 'Undo'}: ${line.title}`}
                  onClick={() => {
                    setUndone.act({ what: line.what, id: line.id, isUndone: !line.isUndone })
                  }}
                >
                  {line.isUndone ? 'Put back' : 'Undo'}
                </Button>
              ) : null}
            </li>
          ))}
        </ol>
      )}
    </Sheet>
  )
}

const lineWords = (line: RecordLine, reader: Reader): string =>
  [
    formatMoment(line.at, reader.timeZone, new Date(reader.at)),
    line.where,
    line.by === null ? '' : `by ${line.by}`,
    line.isUndone ? 'undone' : '',
  ]
    .filter(Boolean)
    .join(', ')

function NoteForm({ reader, pieceId }: { reader: Reader; pieceId: string }) {
  const [note, setNote] = useState('')
  const { enter } = usePieceRecord(reader.site, pieceId)
  const submit = (event: FormEvent) => {
    event.preventDefault()
    if (note.trim() !== '')
      enter.act(
        { kind: 'note', note },
        {
          onSuccess: () => {
            setNote('')
          },
        },
      )
  }
  return (
    <form className="flex items-end gap-3" onSubmit={submit}>
      <Field
        label="A note on it"
        className="min-w-0 grow"
        error={
          enter.error
            ? (enter.problem?.detail ?? 'No answer came. Nothing was kept; press again.')
            : undefined
        }
      >
        <Input
          value={note}
          maxLength={1000}
          onChange={(event) => {
            setNote(event.target.value)
          }}
        />
      </Field>
      <Button type="submit" pending={enter.pending}>
        Add
      </Button>
    </form>
  )
}
