'use client'

import { parseAsArrayOf, parseAsString, parseAsStringLiteral, useQueryStates } from 'nuqs'
import { RichText } from '@/app/_components/ui/rich-text'
import { SegmentedTabs } from '@/app/_components/ui/segmented-tabs'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { Sheet } from '@/app/_components/ui/sheet'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { BenchFoot } from '../../_components/bench-foot'
import { BenchSentence } from '../../_components/bench-sentence'
import { Facts } from '../../_components/facts'
import { FieldWord, Refusals } from '../../_components/field-word'
import { useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import { useUnits } from '../../_components/use-units'
import {
  benchReady,
  type BenchReady,
  knowns,
  knownWords,
  type ReadyField,
  readyFacts,
  readyFields,
  readySentence,
  readyTwins,
} from './ready-model'
import { RestingChart } from './resting-chart'
import { WeightRows } from './weight-rows'
import { datesEnding, MOST_WEIGHTS, weighingsOf } from './weighings'

const parsers = {
  spaced: parseAsStringLiteral(['every', 'dates'] as const).withDefault('every'),
  grams: parseAsArrayOf(parseAsString).withDefault(['470', '442', '427', '419', '415', '413']),
  on: parseAsArrayOf(parseAsString).withDefault([]),
  known: parseAsStringLiteral(knowns).withDefault('oven'),
}

/** From the weighings of a roughed blank: ready or not, about when, and what is missing. */
export function ReadyBench() {
  const [units] = useUnits()
  const [told, setTold] = useQueryStates(parsers, { history: 'replace' })
  const isByDate = told.spaced === 'dates'
  const grams = told.grams.slice(0, MOST_WEIGHTS)
  const form = useFields<ReadyField>(readyFields, [
    ...(isByDate ? (['everyDays'] as const) : []),
    ...(told.known === 'oven' ? [] : (['ovenDryG'] as const)),
    ...(told.known === 'meter' ? [] : (['meterPct'] as const)),
  ])
  const { values } = form
  const weights =
    values === undefined
      ? undefined
      : weighingsOf(
          grams,
          isByDate ? { kind: 'dates', on: told.on } : { kind: 'every', days: values.everyDays },
          units,
        )
  const { shown, isOld } = useLastGood(JSON.stringify([form.texts, told, units]), () =>
    values === undefined || weights?.ok !== true
      ? undefined
      : benchReady(weights.value, values, { known: told.known, isByDate }, units),
  )
  const goByDate = () => {
    const dates = datesEnding(Date.now(), grams.length, values?.everyDays ?? 28)
    void setTold({ spaced: 'dates', on: told.on.length === 0 ? dates : told.on })
  }

  return (
    <>
      <BenchSentence above="A roughed blank, from its weighings" isOld={isOld}>
        {shown === undefined ? (
          'Type the weighings, and this says whether the blank is ready.'
        ) : (
          <RichText parts={readySentence(shown)} />
        )}
      </BenchSentence>
      <Sheet>
        <SegmentedTabs
          label="How the weighings are told"
          value={told.spaced}
          onValueChange={(value) => {
            if (value === 'dates') goByDate()
            else void setTold({ spaced: 'every' })
          }}
          segments={[
            { value: 'every', label: 'Equally spaced' },
            { value: 'dates', label: 'By date' },
          ]}
        >
          <FlowingSentence>
            {isByDate ? (
              'It weighed, each on its day,'
            ) : (
              <>
                It weighed, every <FieldWord of={form} name="everyDays" />,
              </>
            )}
          </FlowingSentence>
          <WeightRows
            grams={grams}
            on={isByDate ? told.on : undefined}
            onChange={(typed, on) => {
              void setTold({ grams: [...typed], ...(on === undefined ? {} : { on: [...on] }) })
            }}
          />
          <FlowingSentence className="mt-3">
            on a scale with steps of <FieldWord of={form} name="stepG" />. It was roughed out{' '}
            <FieldWord of={form} name="roughedDays" /> before the first weighing;{' '}
            <SentenceSelect
              label="What is known of its moisture"
              value={told.known}
              onChange={(event) => {
                const known = knowns.find((candidate) => candidate === event.target.value)
                if (known !== undefined) void setTold({ known })
              }}
            >
              {knowns.map((known) => (
                <option key={known} value={known}>
                  {knownWords[known]}
                </option>
              ))}
            </SentenceSelect>
            {told.known === 'oven' ? (
              <>
                {' '}
                <FieldWord of={form} name="ovenDryG" />
              </>
            ) : null}
            {told.known === 'meter' ? (
              <>
                {' '}
                <FieldWord of={form} name="meterPct" />
              </>
            ) : null}
            . Its home holds wood at <FieldWord of={form} name="targetPct" /> over the year.
          </FlowingSentence>
          <Refusals of={[form.refusals]} more={weights?.ok === false ? weights.error : []} />
        </SegmentedTabs>
      </Sheet>
      {shown === undefined ? null : (
        <div className={isOld ? 'flex flex-col gap-7 opacity-60' : 'flex flex-col gap-7'}>
          <Sheet>
            <Facts facts={readyFacts(shown, units)} />
            <StillMissing bench={shown} />
          </Sheet>
          <Sheet ticks>
            <RestingChart bench={shown} units={units} />
          </Sheet>
        </div>
      )}
      <BenchFoot
        method="weighing"
        twins={
          shown === undefined || isOld || values === undefined
            ? []
            : readyTwins(shown, values.everyDays, values.stepG)
        }
      />
    </>
  )
}

function StillMissing({ bench: { answer } }: { bench: BenchReady }) {
  return (
    <div className="mt-4 border-t border-line pt-3">
      {answer.missing.length === 0 ? null : (
        <>
          <p className="font-semibold">What is still missing</p>
          <ul className="list-disc pl-5">
            {answer.missing.map(({ code, words }) => (
              <li key={code}>{words}</li>
            ))}
          </ul>
        </>
      )}
      <p className="mt-2 max-w-words text-label text-ink-soft">
        As of the last weighing, and as if the room’s air had held still: a damp month adds weight and a dry
        one takes it off. With a room’s own record the product takes that out.
      </p>
    </div>
  )
}
