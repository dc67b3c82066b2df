'use client'

import { parseAsInteger, parseAsString, parseAsStringLiteral, useQueryState, useQueryStates } from 'nuqs'
import { LidView } from '@/app/_components/charts/lid-view'
import { Cautions } from '@/app/_components/ui/caution'
import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import { NO_RECESS } from '@/lib/bench/fit'
import { carryCautions } from '@/lib/carry/cautions'
import { BenchFoot } from '../../_components/bench-foot'
import { BenchSentence } from '../../_components/bench-sentence'
import { Facts } from '../../_components/facts'
import { Refusals } from '../../_components/field-word'
import { useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import { useUnits } from '../../_components/use-units'
import { CutSheet } from './cut-sheet'
import { fitFields, type FitField, fits, grains, idleFields, kinds, lidWays, tellings } from './fit-fields'
import { benchFit, fitFacts, fitSentence, fitTwins, hasNoRecess } from './fit-model'
import { FitSentence } from './fit-sentence'
import { GradeTable } from './grade-table'

const choiceParsers = {
  wood: parseAsString.withDefault('fraxinus-excelsior'),
  kind: parseAsStringLiteral(kinds).withDefault('plain'),
  grain: parseAsStringLiteral(grains).withDefault('end-grain'),
  fit: parseAsStringLiteral(fits).withDefault('own'),
  lidWood: parseAsString.withDefault(''),
  tell: parseAsStringLiteral(tellings).withDefault('mc'),
  lid: parseAsStringLiteral(lidWays).withDefault('same'),
}
const angleParser = parseAsInteger.withDefault(30)

/** A joint and how far its wood has gone: whether the lid still turns, and how far round. */
export function FitBench() {
  const [units] = useUnits()
  const [choices, setChoices] = useQueryStates(choiceParsers, { history: 'replace' })
  const [typedAngle, setAngle] = useQueryState('angle', angleParser)
  const angleDeg = Math.min(90, Math.max(0, typedAngle))
  const form = useFields<FitField>(fitFields, idleFields(choices))
  const { shown, isOld } = useLastGood(JSON.stringify([form.texts, choices]), () =>
    form.values === undefined || hasNoRecess(form.values, choices)
      ? undefined
      : benchFit(form.values, choices),
  )
  const noRecess =
    form.values !== undefined && hasNoRecess(form.values, choices)
      ? [`${fitFields.clearanceMm.label}: ${NO_RECESS}.`]
      : []
  return (
    <>
      <BenchSentence above="Does the lid still turn?" isOld={isOld}>
        {shown === undefined ? (
          'Type the joint and how far its wood has gone, and this says whether the lid still turns.'
        ) : (
          <RichText parts={fitSentence(shown, units)} />
        )}
      </BenchSentence>
      <Sheet>
        <FitSentence form={form} choices={choices} setChoices={(change) => void setChoices(change)} />
        <Refusals of={[form.refusals]} more={noRecess} />
      </Sheet>
      {shown === undefined ? null : (
        <div className={isOld ? 'flex flex-col gap-7 opacity-60' : 'flex flex-col gap-7'}>
          {shown.kind === 'joint' ? (
            <Sheet>
              <LidView
                joint={shown.joint}
                units={units}
                angleDeg={angleDeg}
                onTurn={(angle) => void setAngle(angle)}
              />
            </Sheet>
          ) : null}
          <Sheet>
            <Facts facts={fitFacts(shown, units)} />
          </Sheet>
          <div className="flex flex-col gap-7 print:grid print:grid-cols-[3fr_2fr] print:items-start">
            {shown.kind === 'joint' && shown.courses.length > 0 ? (
              <Sheet id="grades" title="Grade by grade" aside="From when it was cut, either way, about.">
                <GradeTable courses={shown.courses} units={units} />
              </Sheet>
            ) : null}
            <CutSheet choices={choices} diameterMm={shown.diameterMm} />
          </div>
        </div>
      )}
      <div className="px-4 sm:px-0">
        <Cautions cautions={carryCautions.slice(1, 2)} />
      </div>
      <BenchFoot method="fit" twins={shown === undefined || isOld ? [] : fitTwins(shown, angleDeg)} />
    </>
  )
}
