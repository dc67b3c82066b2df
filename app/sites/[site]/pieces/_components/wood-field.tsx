'use client'

import { useState } from 'react'
import { Button } from '@/app/_components/ui/button'
import { Combobox, type ComboboxOption } from '@/app/_components/ui/combobox'
import { Field } from '@/app/_components/ui/field'
import type { WoodKind } from '@/lib/pieces/piece'
import { findWoods, woodKindOfWords } from '@/lib/wood/find-woods'
import type { WoodChoice } from '@/lib/wood/wood'

type WoodFieldProps = {
  label: string
  hint?: string
  error: string | undefined
  /** All that may be chosen, a put-away one that the piece is made of included. */
  woods: readonly WoodChoice[]
  value: string | null
  onChange: (wood: string | null) => void
  onBlur?: () => void
  kind: WoodKind
  onKindChange: (kind: WoodKind) => void
}

type Option = ComboboxOption<string | null>

const NOT_KNOWN: Option = { key: '', value: null, label: 'Not sure, or not in this list' }

/** The wood of a piece, found by common or Latin name; words like "burl" ask whether its grain runs wild. */
export function WoodField(props: WoodFieldProps) {
  const { label, hint, error, woods, value, onChange, onBlur, kind, onKindChange } = props
  const [query, setQuery] = useState('')
  /** The kind that was in the words by which the wood was chosen. */
  const [askedKind, setAskedKind] = useState<WoodKind>()
  const found = findWoods(query, woods)
  const options: Option[] = found.woods.map((wood) => ({
    key: wood.slug,
    value: wood.slug,
    label: wood.commonName,
    detail: [wood.latinName, wood.isOwn ? 'yours' : ''].filter(Boolean).join(', '),
  }))
  const chosen = woods.find((wood) => wood.slug === value)
  const suggested = askedKind ?? (chosen && woodKindOfWords(chosen.commonName))

  return (
    <div className="flex flex-col gap-2">
      <Field label={label} error={error} hint={hint}>
        <Combobox
          options={query === '' ? [NOT_KNOWN, ...options] : options}
          chosen={chosen?.commonName ?? (value === null ? NOT_KNOWN.label : value)}
          chosenKey={value ?? ''}
          onQuery={setQuery}
          onChoose={(wood) => {
            setAskedKind(found.suggestedKind)
            setQuery('')
            onChange(wood)
          }}
          onBlur={onBlur}
          none="No wood answers to that. Leave it as not sure, or add it under Woods."
        />
      </Field>
      <KindHint suggested={suggested} kind={kind} onChange={onKindChange} />
    </div>
  )
}

const questions: Readonly<Partial<Record<WoodKind, { ask: string; does: string; taken: string }>>> = {
  wild: {
    ask: 'A burr, burl or crotch has wild grain: it moves its own way.',
    does: 'Count it as wild grain',
    taken: 'Counted as wild grain: it moves its own way, so fit it easy and test it.',
  },
  stabilised: {
    ask: 'Stabilised wood isn’t worked out to move; its plain parts do.',
    does: 'Count it as stabilised',
    taken: 'Counted as stabilised: not worked out to move.',
  },
}

type KindHintProps = {
  suggested: WoodKind | undefined
  kind: WoodKind
  onChange: (kind: WoodKind) => void
}

/** Asks, and never decides: a burr may be named for its tree and be plain all the same. */
function KindHint({ suggested, kind, onChange }: KindHintProps) {
  const words = questions[suggested ?? 'plain']
  if (suggested === undefined || words === undefined) return null
  const isTaken = kind === suggested
  return (
    <p role="status" className="flex flex-wrap items-center gap-x-3 text-label">
      <span>{isTaken ? words.taken : words.ask}</span>
      <Button
        variant="link"
        onClick={() => {
          onChange(isTaken ? 'plain' : suggested)
        }}
      >
        {isTaken ? 'It is plain wood' : words.does}
      </Button>
    </p>
  )
}
