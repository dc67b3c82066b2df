import { emcOfReadingPct } from '@/lib/wood/emc'
import { inThousandths } from './plausible'

/**
 * A reading as whole thousandths. Sums of whole numbers don't depend on the order of adding, so the figures that
 * grow reading by reading equal those made again from the table, to the last digit.
 */
export interface ReadingFigures {
  readonly temperatureMilli: number
  readonly humidityMilli: number
  readonly emcMilli: number
}

export function readingFigures(temperatureC: number, humidityPct: number): ReadingFigures {
  const temperatureMilli = inThousandths(temperatureC)
  const humidityMilli = inThousandths(humidityPct)
  return {
    temperatureMilli,
    humidityMilli,
    emcMilli: inThousandths(emcOfReadingPct(temperatureMilli / 1000, humidityMilli / 1000)),
  }
}
