'use client'

import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { FitCheckAnswers } from '@/app/_components/charts/fit-check-answers'
import { FitCheckRule } from '@/app/_components/charts/fit-check-rule'
import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { FieldWord, Refusals } from '../../_components/field-word'
import { useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import { useUnits } from '../../_components/use-units'
import { benchCut, type CutField, cutFields, wantedGrades } from './cut-model'
import { fitWords, type FitChoices } from './fit-fields'
import { ChoiceWord } from './wood-word'

const gradeParser = parseAsStringLiteral(wantedGrades).withDefault('snug')

type CutSheetProps = { choices: FitChoices; diameterMm: number }

/** Before the joint is cut: whether the wood is where its home's year leaves the fit alone. */
export function CutSheet({ choices, diameterMm }: CutSheetProps) {
  const [units] = useUnits()
  const [grade, setGrade] = useQueryState('want', gradeParser)
  const form = useFields<CutField>(cutFields)
  const { shown, isOld } = useLastGood(JSON.stringify([form.texts, choices, diameterMm, grade, units]), () =>
    form.values === undefined ? undefined : benchCut(form.values, diameterMm, choices, grade, units),
  )
  const isTurnedRound = form.values !== undefined && form.values.yearHighPct < form.values.yearLowPct
  return (
    <Sheet id="cut" title="Not cut yet?" aside="Whether the joint may be cut today.">
      <FlowingSentence className="print:text-[16px]">
        The same wood and joint, still to be cut. It is at <FieldWord of={form} name="blankPct" />, give or
        take <FieldWord of={form} name="blankDoubtPct" />; its home goes from{' '}
        <FieldWord of={form} name="yearLowPct" /> to <FieldWord of={form} name="yearHighPct" /> in a year, and
        the lid is to fit{' '}
        <ChoiceWord
          label="How the lid is to fit"
          of={wantedGrades}
          words={fitWords}
          value={grade}
          onChange={(wanted) => void setGrade(wanted)}
        />
        .
      </FlowingSentence>
      <Refusals
        of={[form.refusals]}
        more={isTurnedRound ? ['The dampest of the year must not be drier than the driest.'] : []}
      />
      {shown === undefined ? null : (
        <div className={`mt-4 flex flex-col gap-5 print:mt-0 print:gap-1 ${isOld ? 'opacity-60' : ''}`}>
          <div aria-live="polite">
            <p className="text-verdict print:text-body">
              <RichText parts={shown.words.headline} />
            </p>
            <p className="mt-1 max-w-words text-ink-soft print:max-w-none print:text-label">
              {shown.words.second}
            </p>
          </div>
          {shown.check.kind === 'verdict' ? (
            // Paper has room for the answer in words; the rule would make a second sheet of it.
            <div className="flex flex-col gap-5 print:hidden">
              <FitCheckRule input={shown.input} check={shown.check} />
              <FitCheckAnswers answers={shown.answers} />
            </div>
          ) : null}
          {shown.words.assumed.length === 0 ? null : (
            <p className="max-w-words text-label text-ink-soft print:hidden">
              Assumed: {shown.words.assumed.join(' ')}
            </p>
          )}
        </div>
      )}
    </Sheet>
  )
}
