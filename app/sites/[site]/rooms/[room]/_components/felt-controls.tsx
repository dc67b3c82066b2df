'use client'

import { useState } from 'react'
import { Combobox, type ComboboxOption } from '@/app/_components/ui/combobox'
import { Field } from '@/app/_components/ui/field'
import { SentenceInput } from '@/app/_components/ui/sentence-control'
import { FELT_THICKNESS_MAX_MM, FELT_THICKNESS_MIN_MM } from '@/lib/follow/felt'
import { formatLength } from '@/lib/format/figures'
import { formatLengthFigure, parseLengthMm } from '@/lib/format/length-entry'
import type { UnitSystem } from '@/lib/sites/site'
import { type FindableWood, findWoods } from '@/lib/wood/find-woods'
import { type FeltAsked, isThickness } from './felt-asked'

type FeltControlsProps = {
  woods: readonly FindableWood[]
  asked: FeltAsked
  units: UnitSystem
  onWood: (wood: string | null) => void
  onThickness: (ownMm: number | null) => void
}

const MIDDLING: ComboboxOption<string | null> = {
  key: '',
  value: null,
  label: 'a middling hardwood',
}

/** "Reckoned for ash, and for 18 mm as well": the two words of it that can be changed. */
export function FeltControls({ woods, asked, units, onWood, onThickness }: FeltControlsProps) {
  const [query, setQuery] = useState('')
  const options = findWoods(query, woods).woods.map((wood) => ({
    key: wood.slug,
    value: wood.slug,
    label: wood.commonName,
    detail: [wood.latinName, wood.isOwn ? 'yours' : ''].filter(Boolean).join(', '),
  }))
  const chosen = woods.find((wood) => wood.slug === asked.wood)
  return (
    <div className="flex flex-wrap items-center gap-x-2 gap-y-3 text-[18px] leading-7 sm:text-[19px]">
      <span>Reckoned for</span>
      <Field label="Wood to reckon for" labelHidden className="w-full text-body sm:w-72">
        <Combobox
          options={query === '' ? [MIDDLING, ...options] : options}
          chosen={chosen?.commonName ?? asked.wood ?? MIDDLING.label}
          chosenKey={asked.wood ?? ''}
          onQuery={setQuery}
          onChoose={(wood) => {
            setQuery('')
            onWood(wood)
          }}
          none="No wood answers to that."
        />
      </Field>
      <OwnThickness
        key={`${units} ${String(asked.ownMm)}`}
        ownMm={asked.ownMm}
        units={units}
        onChange={onThickness}
      />
    </div>
  )
}

type OwnThicknessProps = { ownMm: number | null; units: UnitSystem; onChange: (ownMm: number | null) => void }

function OwnThickness({ ownMm, units, onChange }: OwnThicknessProps) {
  const [text, setText] = useState(formatLengthFigure(ownMm, units))
  const [isWrong, setIsWrong] = useState(false)
  const take = () => {
    const mm = parseLengthMm(text, units)
    const isGood = mm === null || isThickness(mm)
    setIsWrong(!isGood)
    if (isGood && mm !== ownMm) onChange(mm)
  }
  return (
    <form
      className="contents"
      onSubmit={(event) => {
        event.preventDefault()
        take()
      }}
    >
      <span>and, beside these,</span>
      <span className="inline-flex items-center gap-2 whitespace-nowrap">
        <SentenceInput
          label="A thickness of your own, between two open faces"
          unit={units === 'metric' ? 'mm' : 'in'}
          inputMode="decimal"
          placeholder="any"
          value={text}
          aria-invalid={isWrong || undefined}
          aria-describedby={isWrong ? 'felt-own-wrong' : undefined}
          onChange={(event) => {
            setText(event.target.value)
          }}
          onBlur={take}
        />
        <span>thick</span>
      </span>
      {isWrong ? (
        <p id="felt-own-wrong" role="alert" className="w-full text-label text-warn">
          Between {formatLength(FELT_THICKNESS_MIN_MM, units)} and{' '}
          {formatLength(FELT_THICKNESS_MAX_MM, units)}, or leave it empty.
        </p>
      ) : null}
    </form>
  )
}
