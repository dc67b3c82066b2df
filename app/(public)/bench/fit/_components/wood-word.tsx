'use client'

import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { SPECIES } from '@/lib/wood/species'

type WoodWordProps = {
  label: string
  /** What an empty answer means here. */
  none: string
  value: string
  onChange: (slug: string) => void
}

/** A wood as a word of a sentence, by its common and its Latin name. */
export function WoodWord({ label, none, value, onChange }: WoodWordProps) {
  return (
    <SentenceSelect
      label={label}
      value={SPECIES.some(({ slug }) => slug === value) ? value : ''}
      onChange={(event) => {
        onChange(event.target.value)
      }}
    >
      <option value="">{none}</option>
      {SPECIES.map(({ slug, commonName, latinName }) => (
        <option key={slug} value={slug}>
          {commonName} ({latinName})
        </option>
      ))}
    </SentenceSelect>
  )
}

type ChoiceWordProps<Value extends string> = {
  label: string
  of: readonly Value[]
  words: Readonly<Record<Value, string>>
  value: Value
  onChange: (value: Value) => void
}

/** One of a few answers as a word of a sentence. */
export function ChoiceWord<Value extends string>({
  label,
  of,
  words,
  value,
  onChange,
}: ChoiceWordProps<Value>) {
  return (
    <SentenceSelect
      label={label}
      value={value}
      onChange={(event) => {
        const chosen = of.find((candidate) => candidate === event.target.value)
        if (chosen !== undefined) onChange(chosen)
      }}
    >
      {of.map((candidate) => (
        <option key={candidate} value={candidate}>
          {words[candidate]}
        </option>
      ))}
    </SentenceSelect>
  )
}
