'use client'

import { useState } from 'react'
import { SentenceInput } from '@/app/_components/ui/sentence-control'
import { addressText, type FieldKind, shownText, unitOf } from '@/lib/bench/fields'
import type { Fields } from './use-fields'
import { useUnits } from './use-units'

type NumberWordProps = {
  label: string
  kind: FieldKind
  /** As it stands in the address. */
  text: string
  isRefused: boolean
  placeholder?: string | undefined
  onText: (text: string) => void
}

/** A number as a word of a sentence, in the reader's unit. What is typed stays as typed until it changes elsewhere. */
export function NumberWord({ label, kind, text, isRefused, placeholder, onText }: NumberWordProps) {
  const [units] = useUnits()
  const [typed, setTyped] = useState({ as: '', text: '', units })
  const isOwn = typed.text === text && typed.units === units && typed.as !== ''
  return (
    <SentenceInput
      label={label}
      unit={unitOf(kind, units)}
      inputMode="decimal"
      placeholder={placeholder}
      className="pr-1.5 text-right"
      value={isOwn ? typed.as : shownText(text, kind, units)}
      aria-invalid={isRefused ? true : undefined}
      onChange={(event) => {
        const kept = addressText(event.target.value, kind, units)
        setTyped({ as: event.target.value, text: kept, units })
        onText(kept)
      }}
    />
  )
}

type FieldWordProps<Key extends string> = { of: Fields<Key>; name: Key }

/** One of a page's numbers as a word of its sentence. */
export function FieldWord<Key extends string>({ of, name }: FieldWordProps<Key>) {
  const { label, kind, isOptional } = of.fields[name]
  return (
    <NumberWord
      label={label}
      kind={kind}
      text={of.texts[name]}
      isRefused={of.refusals[name] !== undefined}
      placeholder={isOptional === true ? 'not known' : undefined}
      onText={(text) => {
        of.set({ [name]: text } as Partial<Record<Key, string>>)
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
