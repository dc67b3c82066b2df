'use client'

import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { Cautions } from '@/app/_components/ui/caution'
import { RichText } from '@/app/_components/ui/rich-text'
import { SentenceSelect } from '@/app/_components/ui/sentence-control'
import { Sheet } from '@/app/_components/ui/sheet'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { emcFlagWords } from '@/lib/bench/emc-words'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { BenchFoot } from '../../_components/bench-foot'
import { BenchSentence } from '../../_components/bench-sentence'
import { Facts } from '../../_components/facts'
import { FieldWord, Refusals } from '../../_components/field-word'
import { type Fields, useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import { useUnits } from '../../_components/use-units'
import { AirChart } from '../../emc/_components/air-chart'
import { within } from '../../emc/_components/emc-model'
import {
  benchShop,
  type HeaterChoice,
  heaters,
  heaterWords,
  outdoorRefusal,
  type ShopField,
  shopFacts,
  shopFields,
  shopQuery,
  shopRemarks,
  shopSentence,
  shopTwin,
} from './shop-model'

const heaterParser = parseAsStringLiteral(heaters).withDefault('electric')

/** How warm or how dry a shop has to be, what that takes, and what to beware of. */
export function ShopBench() {
  const [units] = useUnits()
  const [heater, setHeater] = useQueryState('heater', heaterParser)
  const form = useFields<ShopField>(shopFields)
  const refusal = form.values === undefined ? undefined : outdoorRefusal(form.values)
  const query =
    form.values === undefined || refusal !== undefined ? undefined : shopQuery(form.values, heater)
  const { shown, isOld } = useLastGood(JSON.stringify([form.texts, heater]), () =>
    query === undefined ? undefined : benchShop(query),
  )
  const place = (temperatureC: number, humidityPct: number) => {
    form.set({
      temperatureC: String(within(shopFields.temperatureC, Math.round(temperatureC * 2) / 2)),
      humidityPct: String(within(shopFields.humidityPct, Math.round(humidityPct))),
    })
  }
  return (
    <>
      <BenchSentence above="Making the shop match" isOld={isOld}>
        {shown === undefined ? (
          'Type the shop, and this says how warm or how dry it has to be.'
        ) : (
          <RichText parts={shopSentence(shown, units)} />
        )}
      </BenchSentence>
      <Sheet>
        <ShopSentence form={form} heater={heater} setHeater={(chosen) => void setHeater(chosen)} />
        <Refusals of={[form.refusals]} more={refusal === undefined ? [] : [refusal]} />
      </Sheet>
      {shown === undefined ? null : (
        <div className={isOld ? 'flex flex-col gap-7 opacity-60' : 'flex flex-col gap-7'}>
          <div className="px-4 sm:px-0">
            <Cautions cautions={shown.answer.cautions.map(({ words }) => words)} />
          </div>
          <Sheet>
            <Facts facts={shopFacts(shown, units)} />
            <ul className="mt-4 flex flex-col gap-2 border-t border-line pt-4">
              {[...shopRemarks(shown, units), ...shown.flags.map((flag) => emcFlagWords[flag])].map(
                (words) => (
                  <li key={words}>{words}</li>
                ),
              )}
            </ul>
          </Sheet>
          <Sheet ticks>
            <AirChart
              air={shown.question.air}
              words={`${formatTemperature(shown.question.air.temperatureC, units)} and ${formatHumidity(shown.question.air.humidityPct)}: ${formatEmc(shown.answer.emcPct)}`}
              warmed={shown.answer.warmTo}
              units={units}
              onPlace={(air) => {
                place(air.temperatureC, air.humidityPct)
              }}
              onStep={(warmer, damper) => {
                const { air } = shown.question
                place(air.temperatureC + warmer / 2, Math.round(air.humidityPct) + damper)
              }}
            />
          </Sheet>
        </div>
      )}
      <BenchFoot method="shop" twins={query === undefined ? [] : [shopTwin(query)]} />
    </>
  )
}

type ShopSentenceProps = {
  form: Fields<ShopField>
  heater: HeaterChoice
  setHeater: (heater: HeaterChoice) => void
}

function ShopSentence({ form, heater, setHeater }: ShopSentenceProps) {
  const word = (name: ShopField) => <FieldWord of={form} name={name} />
  return (
    <FlowingSentence>
      The shop holds {word('volumeM3')} of air at {word('temperatureC')} and {word('humidityPct')}; wood in it
      is to end at {word('targetEmcPct')}. Outside it is {word('outdoorC')} and {word('outdoorHumidityPct')},
      and the air changes {word('airChangesPerH')}. It is warmed by{' '}
      <SentenceSelect
        label="What it is warmed by"
        value={heater}
        onChange={(event) => {
          const chosen = heaters.find((candidate) => candidate === event.target.value)
          if (chosen !== undefined) setHeater(chosen)
        }}
      >
        {heaters.map((kind) => (
          <option key={kind} value={kind}>
            {heaterWords[kind]}
          </option>
        ))}
      </SentenceSelect>
      . The wood in it would weigh {word('woodKg')} dry; walls and roof lose {word('shellWPerK')}; the coldest
      iron is at {word('surfaceC')}.
    </FlowingSentence>
  )
}
