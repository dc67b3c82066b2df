import { formatEmc, formatHumidity, formatTemperature } from '@/lib/format/figures'
import { say, strong, type TextPart } from '@/lib/format/sentence'
import type { UnitSystem } from '@/lib/sites/site'
import type { EmcFlag } from '@/lib/wood/emc'
import { TYPICAL_HUMIDITY_DOUBT_PCT, TYPICAL_TEMPERATURE_DOUBT_C } from '@/lib/wood/emc'
import type { WarmingAnswer } from './air'

/** What a flag means for the figure beside it. */
export const emcFlagWords: Readonly<Record<EmcFlag, string>> = {
  'below-zero': 'Below freezing the curve is not confirmed: the figure for 0 °C (32 °F) stands.',
  'below-5-rh': 'Below 5 % RH the curve is not confirmed, and few sensors can tell.',
  'above-95-rh':
    'Above 95 % RH the curve is not confirmed: a small error of the sensor is a large one of the wood.',
}

/** "Left in this air, wood ends at about 13.6 % MC, give or take 0.7 % MC." */
export function emcSentence(emcPct: number, doubtPct: number): TextPart[] {
  return say`Left in this air, wood ends at about ${strong(formatEmc(emcPct))}, give or take ${formatEmc(doubtPct)}.`
}

/** "To hold wood at 9.0 % MC, keep air of 8.0 °C at about 47 % RH." */
export function humiditySentence(
  air: { temperatureC: number; humidityPct: number; emcPct: number },
  units: UnitSystem,
): TextPart[] {
  return say`To hold wood at ${formatEmc(air.emcPct)}, keep air of ${formatTemperature(air.temperatureC, units)} at about ${strong(formatHumidity(air.humidityPct))}.`
}

/** What the doubt of an EMC covers: the sensor, by its usual data sheet. */
export function sensorDoubtWords(units: UnitSystem): string {
  const kelvin = units === 'metric' ? `${String(TYPICAL_TEMPERATURE_DOUBT_C)} °C` : '0.5 °F'
  return `for a sensor within ±${String(TYPICAL_HUMIDITY_DOUBT_PCT)} % RH and ±${kelvin}. The curve is the mean of many woods: any one of them may lie 1 % MC off it, though the difference between two rooms is better known.`
}

/** What becomes of the same air at another temperature, in words that stand after its figures. */
export function warmingWords(answer: WarmingAnswer): { figure: string; words: string } {
  if (answer.condenses || answer.emcPct === undefined) {
    return {
      figure: 'water falls out',
      words: 'The air holds more water than that; it condenses on whatever is that cold, iron first.',
    }
  }
  return {
    figure: `${formatHumidity(answer.humidityPct)}, ${formatEmc(answer.emcPct)}`,
    words: 'The air changes within minutes, wood in days and weeks.',
  }
}
