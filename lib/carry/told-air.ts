import { z } from 'zod'
import { temperatureDoubtK, typedHumidityDoubtPct } from '@/lib/notices/policy'
import { EMC_TEMPERATURE_MAX_C, EMC_TEMPERATURE_MIN_C, emcDoubtPct, emcPct } from '@/lib/wood/emc'

const TEMPERATURE_WORDS = 'between −10 and 50 °C'
const HUMIDITY_WORDS = 'between 1 and 99 % RH'

/** The air of a place that is no room of the site, as somebody tells it: a show, a van, a gallery. */
export const toldAirSchema = z.strictObject({
  name: z.string().trim().min(1, 'give the place a name').max(40, '40 letters at most'),
  temperatureC: z
    .number()
    .min(EMC_TEMPERATURE_MIN_C, TEMPERATURE_WORDS)
    .max(EMC_TEMPERATURE_MAX_C, TEMPERATURE_WORDS),
  humidityPct: z.number().min(1, HUMIDITY_WORDS).max(99, HUMIDITY_WORDS),
})
export type ToldAir = z.infer<typeof toldAirSchema>

/**
 * What wood would end at in air as told, and how far that may be out.
 * @returns % MC, and ± % MC at the wide doubt of any reading that is typed (± 5 % RH)
 */
export const moistureOfToldAir = ({
  temperatureC,
  humidityPct,
}: ToldAir): { emcPct: number; emcDoubtPct: number } => ({
  emcPct: emcPct(temperatureC, humidityPct),
  emcDoubtPct: emcDoubtPct(temperatureC, humidityPct, typedHumidityDoubtPct, temperatureDoubtK),
})
