import { airAnswer, warmingAnswer, type WarmingAnswer } from '@/lib/bench/air'
import { emcAnswer, humidityAnswer } from '@/lib/bench/emc'
import { sensorDoubtWords, warmingWords } from '@/lib/bench/emc-words'
import type { Field } from '@/lib/bench/fields'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { err, ok, type Result } from '@/lib/result'
import type { UnitSystem } from '@/lib/sites/site'
import type { EmcFlag } from '@/lib/wood/emc'
import type { Twin } from '../../_components/api-twin'
import type { Fact } from '../../_components/facts'

/** The page opens with a cool, damp shop, and what warming it would do. */
export const emcFields = {
  temperatureC: { label: 'Temperature of the air', kind: 'temperature', min: -10, max: 50, start: '8' },
  humidityPct: { label: 'Humidity of the air', kind: 'humidity', min: 0, max: 100, start: '71' },
  emcPct: { label: 'Moisture content to hold', kind: 'moisture', min: 0, max: 30, start: '9' },
  toC: { label: 'Temperature after warming', kind: 'temperature', min: -10, max: 50, start: '15' },
} as const satisfies Record<string, Field>

export type EmcField = keyof typeof emcFields

export type BenchAir = {
  temperatureC: number
  humidityPct: number
  emcPct: number
  slope: number
  doubtPct: number
  flags: EmcFlag[]
  toC: number
  warmed: WarmingAnswer
  /** Everything else about the air. */
  more: ReturnType<typeof airAnswer>
}

/** The air that was asked about, whichever of humidity and moisture content was typed. */
export function airOf(values: Readonly<Record<EmcField, number>>, isEmc: boolean): Result<BenchAir, string> {
  const { temperatureC, toC } = values
  const found = isEmc
    ? ok({ humidityPct: values.humidityPct })
    : humidityAnswer({ temperatureC, emcPct: values.emcPct })
  if (!found.ok) return err(found.error.message)
  const { humidityPct } = found.value
  const answer = emcAnswer({ temperatureC, humidityPct })
  return ok({
    ...answer,
    emcPct: isEmc ? answer.emcPct : values.emcPct,
    temperatureC,
    humidityPct,
    toC,
    warmed: warmingAnswer({ fromC: temperatureC, fromHumidityPct: humidityPct, toC }),
    more: airAnswer({ temperatureC, humidityPct }),
  })
}

export function factsOf(air: BenchAir, isEmc: boolean, units: UnitSystem): Fact[] {
  const doubt = `±${formatEmc(air.doubtPct)}`
  const warmed = warmingWords(air.warmed)
  return [
    isEmc
      ? {
          name: 'Where wood ends',
          figure: formatEmc(air.emcPct),
          words: `${doubt} ${sensorDoubtWords(units)}`,
        }
      : {
          name: 'Air that holds it',
          figure: formatHumidity(air.humidityPct),
          words: `A sensor’s error leaves ${doubt} open, ${sensorDoubtWords(units)}`,
        },
    {
      name: 'For each % RH more',
      figure: `${air.slope.toFixed(2)} % MC more`,
      words: air.slope > 0.3 ? 'Steep: in damp air a little counts for much.' : undefined,
    },
    {
      name: `At ${formatTemperature(air.toC, units)}, no water added`,
      figure: warmed.figure,
      words: warmed.words,
    },
    dewPointFact(air, units),
  ]
}

function dewPointFact({ more }: BenchAir, units: UnitSystem): Fact {
  const water = `It holds ${more.absoluteHumidityGM3.toFixed(1)} g of water in each m³; the wet bulb would show ${formatTemperature(more.wetBulbC, units)}.`
  return more.dewPointC === undefined
    ? { name: 'Dew point', figure: 'none', words: 'There is no water in such air.' }
    : {
        name: 'Dew point',
        figure: formatTemperature(more.dewPointC, units),
        words: `Whatever is colder than that gets wet. ${water}`,
      }
}

/** Within a field's range, for a point that was dragged or stepped past its end. */
export const within = ({ min, max }: Field, value: number): number => Math.min(max, Math.max(min, value))

/** The questions of this page as the API takes them. */
export function twinsOf(air: BenchAir, isEmc: boolean): Twin[] {
  const { temperatureC, emcPct, toC } = air
  // Found from a moisture content, it has more decimals than anybody wants to read.
  const humidityPct = Math.round(air.humidityPct * 100) / 100
  return [
    isEmc
      ? { path: '/bench/emc', query: { temperatureC, humidityPct } }
      : { path: '/bench/humidity', query: { temperatureC, emcPct } },
    { path: '/bench/warming', query: { fromC: temperatureC, fromHumidityPct: humidityPct, toC } },
    { path: '/bench/air', query: { temperatureC, humidityPct } },
  ]
}
