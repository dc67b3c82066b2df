import type { PieceEventView } from '@/lib/pieces/event'
import { eventTitle, eventWood } from '@/lib/pieces/event-words'
import { type Outcome, turnedWords } from '@/lib/pieces/outcome'
import type { UnitSystem } from '@/lib/sites/site'

/** One line of a piece's record: something that happened, or how its lid turned. */
export type RecordLine = {
  readonly what: 'events' | 'outcomes'
  readonly id: string
  readonly at: string
  readonly title: string
  /** What is known of its wood then, and the note. */
  readonly more: string
  readonly where: string
  readonly by: string | null
  readonly isUndone: boolean
  readonly isNote: boolean
}

const sentences = (...parts: readonly string[]): string => parts.filter(Boolean).join(' ')

/** Everything of a piece's record, newest first. */
export function recordLines(
  events: readonly PieceEventView[],
  outcomes: readonly Outcome[],
  units: UnitSystem,
): readonly RecordLine[] {
  const lines: RecordLine[] = [
    ...events.map((event) => ({
      what: 'events' as const,
      id: event.id,
      at: event.at,
      title: event.kind === 'note' ? event.note || 'Note' : eventTitle(event, units),
      more: sentences(eventWood(event), event.kind === 'note' ? '' : event.note),
      where: event.room === null ? '' : event.room.name,
      by: event.by,
      isUndone: event.isUndone,
      isNote: event.kind === 'note',
    })),
    ...outcomes.map((outcome) => ({
      what: 'outcomes' as const,
      id: outcome.id,
      at: outcome.at,
      title: `Its lid ${lidWords[outcome.turned]}`,
      more: outcome.note,
      where: outcome.carryId === null ? '' : 'after a carry',
      by: outcome.by,
      isUndone: outcome.isUndone,
      isNote: false,
    })),
  ]
  return lines.toSorted((one, other) => Date.parse(other.at) - Date.parse(one.at))
}

const lidWords: Readonly<Record<Outcome['turned'], string>> = {
  'as-before': turnedWords['as-before'],
  tighter: `was ${turnedWords.tighter}`,
  binds: turnedWords.binds,
  looser: `was ${turnedWords.looser}`,
}
