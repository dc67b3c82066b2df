'use client'

import { parseAsString, parseAsStringLiteral, useQueryStates } from 'nuqs'
import { Cautions } from '@/app/_components/ui/caution'
import { RichText } from '@/app/_components/ui/rich-text'
import { Sheet } from '@/app/_components/ui/sheet'
import { TextLink } from '@/app/_components/ui/text-link'
import { carryCautions } from '@/lib/carry/cautions'
import { plainText } from '@/lib/format/sentence'
import { BenchFoot } from '../../_components/bench-foot'
import { BenchSentence } from '../../_components/bench-sentence'
import { Facts } from '../../_components/facts'
import { Refusals } from '../../_components/field-word'
import { useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import { useUnits, withUnits } from '../../_components/use-units'
import { TimeBar } from './time-bar'
import {
  benchTimeOut,
  covers,
  fits,
  idleFields,
  lidFitAddress,
  lids,
  type TimeOutField,
  timeOutFacts,
  timeOutFields,
  timeOutSentence,
  timeOutTwin,
} from './time-out-model'
import { TimeOutSentence } from './time-out-sentence'
import { UsedCurve } from './used-curve'

const choiceParsers = {
  wood: parseAsString.withDefault('fraxinus-excelsior'),
  fit: parseAsStringLiteral(fits).withDefault('easy'),
  cover: parseAsStringLiteral(covers).withDefault('open'),
  lid: parseAsStringLiteral(lids).withDefault('plug'),
}

/** A piece, the air it lives in and the air it goes to: by when it is to be back. */
export function TimeOutBench() {
  const [units] = useUnits()
  const [choices, setChoices] = useQueryStates(choiceParsers, { history: 'replace' })
  const form = useFields<TimeOutField>(timeOutFields, idleFields(choices))
  const { shown, isOld } = useLastGood(JSON.stringify([form.texts, choices]), () =>
    form.values === undefined ? undefined : benchTimeOut(form.values, choices),
  )
  return (
    <>
      <BenchSentence above="Time out for a finished box" isOld={isOld}>
        {shown === undefined ? (
          'Type the box and the two airs, and this says by when it is to be back.'
        ) : (
          <RichText parts={timeOutSentence(shown)} />
        )}
      </BenchSentence>
      <Sheet>
        <TimeOutSentence form={form} choices={choices} setChoices={(change) => void setChoices(change)} />
        <Refusals of={[form.refusals]} />
      </Sheet>
      {shown === undefined ? null : (
        <div className={isOld ? 'flex flex-col gap-7 opacity-60' : 'flex flex-col gap-7'}>
          <Sheet>
            <Facts facts={timeOutFacts(shown, units)} />
          </Sheet>
          {shown.answer.binds ? (
            <Sheet ticks>
              <TimeBar
                minutesEarly={shown.answer.minutesEarly}
                minutes={shown.answer.minutes}
                minutesLate={shown.answer.minutesLate}
              />
            </Sheet>
          ) : null}
          <Sheet ticks>
            <UsedCurve answer={shown.answer} sentence={plainText(timeOutSentence(shown))} />
          </Sheet>
        </div>
      )}
      {shown === undefined || isOld ? null : (
        <p className="no-print px-4 sm:px-0">
          <TextLink
            href={withUnits(lidFitAddress(form.texts, choices), units)}
            className="inline-flex min-h-11 items-center"
          >
            Turn its lid: how far round it goes there, given time, and whether a joint may be cut
          </TextLink>
        </p>
      )}
      <div className="px-4 sm:px-0">
        <Cautions cautions={carryCautions.slice(0, 2)} />
      </div>
      <BenchFoot method="time-out" twins={shown === undefined || isOld ? [] : [timeOutTwin(shown)]} />
    </>
  )
}
