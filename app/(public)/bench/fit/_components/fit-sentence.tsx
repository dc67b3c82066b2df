'use client'

import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { FieldWord } from '../../_components/field-word'
import type { Fields } from '../../_components/use-fields'
import {
  fits,
  fitWords,
  grains,
  grainWords,
  kinds,
  kindWords,
  lidWays,
  lidWords,
  tellings,
  tellingWords,
  type FitChoices,
  type FitField,
} from './fit-fields'
import { ChoiceWord, WoodWord } from './wood-word'

type FitSentenceProps = {
  form: Fields<FitField>
  choices: FitChoices
  setChoices: (change: Partial<FitChoices>) => void
}

/** The joint, and what its wood was and is, as two sentences. */
export function FitSentence({ form, choices, setChoices }: FitSentenceProps) {
  const isAir = choices.tell === 'air'
  return (
    <FlowingSentence className="print:text-[16px]">
      A box of{' '}
      <WoodWord
        label="Wood"
        none="a wood not known"
        value={choices.wood}
        onChange={(wood) => {
          setChoices({ wood })
        }}
      />
      ,{' '}
      <ChoiceWord
        label="Kind of wood"
        of={kinds}
        words={kindWords}
        value={choices.kind}
        onChange={(kind) => {
          setChoices({ kind })
        }}
      />
      , the grain running{' '}
      <ChoiceWord
        label="Which way the grain runs"
        of={grains}
        words={grainWords}
        value={choices.grain}
        onChange={(grain) => {
          setChoices({ grain })
        }}
      />
      . Its joint is <FieldWord of={form} name="diameterMm" /> across; the lid is of{' '}
      <WoodWord
        label="Wood of the lid"
        none="the same wood"
        value={choices.lidWood}
        onChange={(lidWood) => {
          setChoices({ lidWood })
        }}
      />{' '}
      and fitted{' '}
      <ChoiceWord
        label="How the lid fitted when it was cut"
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
          <FieldWord of={form} name="clearanceMm" />
        </>
      ) : null}
      . It was cut{' '}
      <ChoiceWord
        label="How its moisture is told"
        of={tellings}
        words={tellingWords}
        value={choices.tell}
        onChange={(tell) => {
          setChoices({ tell })
        }}
      />{' '}
      {isAir ? (
        <>
          <FieldWord of={form} name="cutC" /> and <FieldWord of={form} name="cutRh" /> and has come to rest in
          air of <FieldWord of={form} name="nowC" /> and <FieldWord of={form} name="nowRh" />
        </>
      ) : (
        <>
          <FieldWord of={form} name="cutPct" /> and is now at <FieldWord of={form} name="nowPct" />, give or
          take <FieldWord of={form} name="doubtPct" />
        </>
      )}
      ; its lid{' '}
      <ChoiceWord
        label="How the lid has followed"
        of={lidWays}
        words={lidWords}
        value={choices.lid}
        onChange={(lid) => {
          setChoices({ lid })
        }}
      />
      {choices.lid === 'own' ? (
        <>
          {' '}
          <FieldWord of={form} name="lidPct" />
        </>
      ) : null}
      .
    </FlowingSentence>
  )
}
