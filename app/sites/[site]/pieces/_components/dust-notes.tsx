import { Caution } from '@/app/_components/ui/caution'
import { DUST_ALWAYS, dustNote } from '@/lib/wood/dust'

/** What is published about a wood's dust, with where it stands. It can't be put away. */
export function DustNotes({ wood }: { wood: string | null }) {
  const note = wood === null ? undefined : dustNote(wood)
  return (
    <Caution>
      {note ? (
        <>
          <strong>Dust of this wood:</strong> {note.effect} ({note.kind}). Source: {note.source};{' '}
          {note.status}.{' '}
        </>
      ) : null}
      {DUST_ALWAYS} Not medical advice. Guidance on wood dust: HSE, OSHA.
    </Caution>
  )
}
