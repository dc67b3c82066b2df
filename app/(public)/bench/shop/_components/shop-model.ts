import type { Field } from '@/lib/bench/fields'
import type { ShopQuery } from '@/lib/bench/shop'
import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { HeaterKind } from '@/lib/shop/heater'
import { warmestShopC } from '@/lib/shop/policy'
import { shopAnswer, type ShopAnswer, type ShopQuestion } from '@/lib/shop/shop'
import { warmToForEmc } from '@/lib/shop/warm-to'
import { shopWords } from '@/lib/shop/words'
import type { UnitSystem } from '@/lib/sites/site'
import { emcDoubtPct, emcFlags, type EmcFlag, TYPICAL_HUMIDITY_DOUBT_PCT } from '@/lib/wood/emc'
import type { Twin } from '../../_components/api-twin'
import type { Fact } from '../../_components/facts'
import { told } from '../../_components/use-fields'

export const shopFields = {
  volumeM3: { label: 'Volume of the shop', kind: 'volume', min: 0.001, max: 100_000, start: '40' },
  temperatureC: { label: 'Temperature in the shop', kind: 'temperature', min: -10, max: 50, start: '8' },
  humidityPct: { label: 'Humidity in the shop', kind: 'humidity', min: 0, max: 100, start: '85' },
  targetEmcPct: { label: 'Where wood in it is to end', kind: 'moisture', min: 0, max: 30, start: '9' },
  outdoorC: {
    label: 'Temperature outside',
    kind: 'temperature',
    min: -10,
    max: 50,
    start: '5',
    isOptional: true,
  },
  outdoorHumidityPct: {
    label: 'Humidity outside',
    kind: 'humidity',
    min: 0,
    max: 100,
    start: '80',
    isOptional: true,
  },
  airChangesPerH: { label: 'Air changes', kind: 'per-hour', min: 0, max: 50, start: '1', isOptional: true },
  woodKg: {
    label: 'Dry wood in the shop',
    kind: 'weight',
    min: 0,
    max: 100_000,
    start: '200',
    isOptional: true,
  },
  shellWPerK: {
    label: 'Loss of walls and roof',
    kind: 'heat-loss',
    min: 0,
    max: 10_000,
    start: '',
    isOptional: true,
  },
  surfaceC: { label: 'Coldest iron', kind: 'temperature', min: -40, max: 60, start: '', isOptional: true },
} as const satisfies Record<string, Field>

export type ShopField = keyof typeof shopFields

/** What the shop is warmed with, or that nobody has said. */
export const heaters = ['electric', 'flued', 'unflued', 'untold'] as const
export type HeaterChoice = (typeof heaters)[number]

export const heaterWords: Readonly<Record<HeaterChoice, string>> = {
  electric: 'an electric heater',
  flued: 'a stove with a flue',
  unflued: 'an unflued gas heater',
  untold: 'a heater not told',
}

export type BenchShop = {
  question: ShopQuestion
  answer: ShopAnswer
  flags: EmcFlag[]
  /** How warm it would have to be if the sensor read 3 % RH too high or too low, °C. */
  warmToDoubtC: number | undefined
}

export function shopQuery(values: Readonly<Record<ShopField, number>>, heater: HeaterChoice): ShopQuery {
  const optional = {
    outdoorC: told(values.outdoorC),
    outdoorHumidityPct: told(values.outdoorHumidityPct),
    airChangesPerH: told(values.airChangesPerH),
    woodKg: told(values.woodKg),
    shellWPerK: told(values.shellWPerK),
    surfaceC: told(values.surfaceC),
    heater: heater === 'untold' ? undefined : (heater satisfies HeaterKind),
  }
  const { volumeM3, temperatureC, humidityPct, targetEmcPct } = values
  return {
    volumeM3,
    temperatureC,
    humidityPct,
    targetEmcPct,
    ...Object.fromEntries(Object.entries(optional).filter(([, value]) => value !== undefined)),
  }
}

export function benchShop(query: ShopQuery): BenchShop {
  const { temperatureC, humidityPct, ...rest } = query
  const question = { ...rest, air: { temperatureC, humidityPct } }
  return {
    question,
    answer: shopAnswer(question),
    flags: emcFlags(temperatureC, humidityPct),
    warmToDoubtC: warmToDoubtC(question),
  }
}

/** Half of what a usual sensor leaves open in the temperature to warm to; undefined where either end has none. */
function warmToDoubtC({ air, targetEmcPct }: ShopQuestion): number | undefined {
  const [drier, damper] = [-TYPICAL_HUMIDITY_DOUBT_PCT, TYPICAL_HUMIDITY_DOUBT_PCT].map((off) =>
    warmToForEmc({ ...air, humidityPct: Math.min(100, Math.max(0, air.humidityPct + off)) }, targetEmcPct),
  )
  if (drier?.ok !== true || damper?.ok !== true) return undefined
  return (damper.value.temperatureC - drier.value.temperatureC) / 2
}

/** Both are needed to tell what the air outside does: the API refuses one without the other likewise. */
export function outdoorRefusal({
  outdoorC,
  outdoorHumidityPct,
}: Readonly<Record<ShopField, number>>): string | undefined {
  return told(outdoorHumidityPct) !== undefined && told(outdoorC) === undefined
    ? 'Temperature outside: needed with the humidity outside.'
    : undefined
}

export function shopSentence({ question, answer }: BenchShop, units: UnitSystem): TextPart[] {
  const wanted = formatEmc(question.targetEmcPct)
  if (answer.dryToHumidityPct === undefined)
    return say`It is ${strong('dry enough')} as it is: wood in it ends at about ${formatEmc(answer.emcPct)}, not above ${wanted}.`
  const dry = say`dry it to about ${strong(formatHumidity(answer.dryToHumidityPct))}`
  return answer.warmTo === undefined
    ? say`To have wood end at ${wanted} here, ${dry}; warming alone would take more than ${formatTemperature(warmestShopC, units)}.`
    : say`Warm the shop to about ${strong(formatTemperature(answer.warmTo.temperatureC, units))}, or ${dry}, and wood in it ends at ${wanted}.`
}

/** A difference of temperature: "1.3 °C", "2 °F". */
const formatKelvin = (kelvin: number, units: UnitSystem): string =>
  units === 'metric' ? `${kelvin.toFixed(1)}\u00a0°C` : `${((kelvin * 9) / 5).toFixed(0)}\u00a0°F`

export function shopFacts({ question, answer, warmToDoubtC: doubtC }: BenchShop, units: UnitSystem): Fact[] {
  const { air } = question
  const now: Fact = {
    name: 'As it is',
    figure: formatEmc(answer.emcPct),
    words: `is where wood in it ends, ±${formatEmc(emcDoubtPct(air.temperatureC, air.humidityPct))} by a usual sensor.`,
  }
  const warm: Fact[] =
    answer.warmTo === undefined
      ? []
      : [
          {
            name: 'Warm it to',
            figure: formatTemperature(answer.warmTo.temperatureC, units),
            words: `It then has ${formatHumidity(answer.warmTo.humidityPct)}. ${doubtC === undefined ? '' : `Give or take ${formatKelvin(doubtC, units)} by a usual sensor. `}Walls and wood give off water as they warm, so it ends damper until they have dried.`,
          },
        ]
  const dry: Fact[] =
    answer.dryToHumidityPct === undefined
      ? []
      : [
          {
            name: 'Or dry it to',
            figure: formatHumidity(answer.dryToHumidityPct),
            words: `At the ${formatTemperature(air.temperatureC, units)} that it has, ±${String(TYPICAL_HUMIDITY_DOUBT_PCT)} % RH by a usual sensor.`,
          },
        ]
  return [now, ...warm, ...dry]
}

/** Water, airing, heat and cold surfaces, in the words of the API; the first sentence stands above already. */
export const shopRemarks = ({ question, answer }: BenchShop, units: UnitSystem): string[] =>
  shopWords(question, answer, units).slice(1)

export const shopTwin = (query: ShopQuery): Twin => ({
  path: '/bench/shop',
  query: Object.fromEntries(Object.entries(query)),
})
