'use client'

import { parseAsStringLiteral, useQueryState } from 'nuqs'
import { RichText } from '@/app/_components/ui/rich-text'
import { SegmentedTabs } from '@/app/_components/ui/segmented-tabs'
import { Sheet } from '@/app/_components/ui/sheet'
import { FlowingSentence } from '@/app/sites/_components/flowing-sentence'
import { emcAnswer } from '@/lib/bench/emc'
import { emcFlagWords, emcSentence, humiditySentence } from '@/lib/bench/emc-words'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { BenchFoot } from '../../_components/bench-foot'
import { BenchSentence } from '../../_components/bench-sentence'
import { Facts } from '../../_components/facts'
import { FieldWord, Refusals } from '../../_components/field-word'
import { useFields } from '../../_components/use-fields'
import { useLastGood } from '../../_components/use-last-good'
import { useUnits } from '../../_components/use-units'
import { AirChart } from './air-chart'
import type { AirPoint } from './air-chart-model'
import { airOf, type EmcField, emcFields, factsOf, twinsOf, within } from './emc-model'

const asks = ['emc', 'humidity'] as const
const askParser = parseAsStringLiteral(asks).withDefault('emc')

/** Where wood ends in an air, or the air that holds it: the same chart read both ways. */
export function EmcBench() {
  const [units] = useUnits()
  const [ask, setAsk] = useQueryState('ask', askParser)
  const isEmc = ask === 'emc'
  const form = useFields<EmcField>(emcFields, [isEmc ? 'emcPct' : 'humidityPct'])
  const asked = form.values === undefined ? undefined : airOf(form.values, isEmc)
  const key = JSON.stringify([form.texts, ask])
  const { shown, isOld } = useLastGood(key, () => (asked?.ok === true ? asked.value : undefined))
  const refused = asked?.ok === false ? [asked.error] : []

  const place = ({ temperatureC, humidityPct }: AirPoint) => {
    const air = {
      temperatureC: within(emcFields.temperatureC, Math.round(temperatureC * 2) / 2),
      humidityPct: within(emcFields.humidityPct, Math.round(humidityPct)),
    }
    form.set({
      temperatureC: String(air.temperatureC),
      ...(isEmc ? { humidityPct: String(air.humidityPct) } : { emcPct: emcAnswer(air).emcPct.toFixed(1) }),
    })
  }
  const step = (warmer: number, damper: number) => {
    if (shown === undefined) return
    const temperatureC = within(emcFields.temperatureC, shown.temperatureC + warmer / 2)
    form.set({
      temperatureC: String(temperatureC),
      ...(isEmc
        ? { humidityPct: String(within(emcFields.humidityPct, Math.round(shown.humidityPct) + damper)) }
        : { emcPct: within(emcFields.emcPct, shown.emcPct + damper / 10).toFixed(1) }),
    })
  }

  return (
    <>
      <BenchSentence above={isEmc ? 'Where wood ends in this air' : 'The air that holds wood'} isOld={isOld}>
        {shown === undefined ? (
          'Type the air, and this says where wood ends in it.'
        ) : (
          <RichText
            parts={isEmc ? emcSentence(shown.emcPct, shown.doubtPct) : humiditySentence(shown, units)}
          />
        )}
      </BenchSentence>
      <Sheet>
        <SegmentedTabs
          label="What is asked"
          value={ask}
          onValueChange={(value) => {
            void setAsk(value === 'humidity' ? 'humidity' : 'emc')
          }}
          segments={[
            { value: 'emc', label: 'Where wood ends' },
            { value: 'humidity', label: 'The air for it' },
          ]}
        >
          <FlowingSentence>
            {isEmc ? (
              <>
                The air is at <FieldWord of={form} name="temperatureC" /> and{' '}
                <FieldWord of={form} name="humidityPct" />.
              </>
            ) : (
              <>
                The air is at <FieldWord of={form} name="temperatureC" />, and is to hold wood at{' '}
                <FieldWord of={form} name="emcPct" />.
              </>
            )}{' '}
            Then the same air is warmed or cooled to <FieldWord of={form} name="toC" />.
          </FlowingSentence>
          <Refusals of={[form.refusals]} more={refused} />
        </SegmentedTabs>
      </Sheet>
      {shown === undefined ? null : (
        <div className={isOld ? 'flex flex-col gap-7 opacity-60' : 'flex flex-col gap-7'}>
          <Sheet>
            <Facts facts={factsOf(shown, isEmc, units)} />
            {shown.flags.map((flag) => (
              <p key={flag} className="mt-3 text-label text-ink-soft">
                {emcFlagWords[flag]}
              </p>
            ))}
          </Sheet>
          <Sheet ticks>
            <AirChart
              air={shown}
              words={`${formatTemperature(shown.temperatureC, units)} and ${formatHumidity(shown.humidityPct)}: ${formatEmc(shown.emcPct)}`}
              warmed={
                shown.warmed.condenses
                  ? undefined
                  : { temperatureC: shown.toC, humidityPct: shown.warmed.humidityPct }
              }
              units={units}
              onPlace={place}
              onStep={step}
            />
          </Sheet>
        </div>
      )}
      <BenchFoot method="emc" twins={shown === undefined || isOld ? [] : twinsOf(shown, isEmc)} />
    </>
  )
}
