'use client'

import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { SPECIES } from '@/lib/wood/species'
import { FieldWord } from '../../_components/field-word'
import type { Fields } from '../../_components/use-fields'
import {
  coverNames,
  covers,
  fits,
  lids,
  lidWords,
  type TimeOutChoices,
  type TimeOutField,
} from './time-out-model'

type TimeOutSentenceProps = {
  form: Fields<TimeOutField>
  choices: TimeOutChoices
  setChoices: (change: Partial<TimeOutChoices>) => void
}

/** The piece and its two airs as one sentence. */
export function TimeOutSentence({ form, choices, setChoices }: TimeOutSentenceProps) {
  return (
    <FlowingSentence>
      A box of{' '}
      <SentenceSelect
        label="Wood"
        value={choices.wood}
        onChange={(event) => {
          setChoices({ wood: event.target.value })
        }}
      >
        <option value="">a wood not known</option>
        {SPECIES.map(({ slug, commonName }) => (
          <option key={slug} value={slug}>
            {commonName}
          </option>
        ))}
      </SentenceSelect>
      , its joint <FieldWord of={form} name="diameterMm" /> across, the wall{' '}
      <FieldWord of={form} name="wallMm" /> at the spigot, the spigot <FieldWord of={form} name="spigotMm" />{' '}
      long, under{' '}
      <Choice
        label="Form of the lid"
        of={lids}
        words={lidWords}
        value={choices.lid}
        onChange={(lid) => {
          setChoices({ lid })
        }}
      />
      {choices.lid === 'plug' ? (
        <>
          {' '}
          <FieldWord of={form} name="lidMm" /> thick
        </>
      ) : null}
      {choices.lid === 'hollow' ? (
        <>
          {' '}
          with a wall of <FieldWord of={form} name="lidWallMm" />
        </>
      ) : null}
      , which fits{' '}
      <Choice
        label="How the lid fits"
        of={fits}
        words={fitWords}
        value={choices.fit}
        onChange={(fit) => {
          setChoices({ fit })
        }}
      />
      {choices.fit === 'own' ? (
        <>
          {' '}
          <FieldWord of={form} name="allowanceMm" />
        </>
      ) : null}
      . It lives at <FieldWord of={form} name="fromC" /> and <FieldWord of={form} name="fromRh" />, and goes{' '}
      <Choice
        label="Cover"
        of={covers}
        words={coverNames}
        value={choices.cover}
        onChange={(cover) => {
          setChoices({ cover })
        }}
      />{' '}
      to <FieldWord of={form} name="toC" /> and <FieldWord of={form} name="toRh" />.
    </FlowingSentence>
  )
}

const fitWords: Readonly<Record<TimeOutChoices['fit'], string>> = {
  suction: 'with suction',
  snap: 'with a snap',
  snug: 'snug',
  easy: 'easy',
  loose: 'loose',
  own: 'so that it may lose',
}

type ChoiceProps<Value extends string> = {
  label: string
  of: readonly Value[]
  words: Readonly<Record<Value, string>>
  value: Value
  onChange: (value: Value) => void
}

function Choice<Value extends string>({ label, of, words, value, onChange }: ChoiceProps<Value>) {
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
