'use client'

import { useState } from 'react'
import { SentenceInput } from '@/app/_components/ui/sentence-control'
import { addressText, shownText, unitOf } from '@/lib/bench/fields'
import type { Fields } from './use-fields'
import { useUnits } from './use-units'

type FieldWordProps<Key extends string> = { of: Fields<Key>; name: Key }

/** A number as a word of a sentence, in the reader's unit. What is typed stays as typed until it changes elsewhere. */
export function FieldWord<Key extends string>({
  of: { fields, texts, refusals, set },
  name,
}: FieldWordProps<Key>) {
  const [units] = useUnits()
  const { label, kind } = fields[name]
  const text = texts[name]
  const [typed, setTyped] = useState({ as: '', text: '', units })
  const isOwn = typed.text === text && typed.units === units
  const shown = isOwn && typed.as !== '' ? typed.as : shownText(text, kind, units)
  return (
    <SentenceInput
      label={label}
      unit={unitOf(kind, units)}
      inputMode="decimal"
      className="pr-1.5 text-right"
      value={shown}
      aria-invalid={refusals[name] === undefined ? undefined : true}
      onChange={(event) => {
        const kept = addressText(event.target.value, kind, units)
        setTyped({ as: event.target.value, text: kept, units })
        set({ [name]: kept } as Partial<Record<Key, string>>)
      }}
    />
  )
}

/** What is refused, under the sentence: which field, its range, its unit. */
export function Refusals({
  of,
  more = [],
}: {
  of: readonly Partial<Record<string, string>>[]
  more?: readonly string[]
}) {
  const lines = [...of.flatMap((refusals) => Object.values(refusals)), ...more].filter(
    (line) => line !== undefined,
  )
  return (
    <div role="status" className="mt-2 flex flex-col gap-1 text-label text-warn empty:hidden">
      {lines.map((line) => (
        <p key={line}>{line}</p>
      ))}
    </div>
  )
}
