import { z } from 'zod'
import { heaterKinds } from '@/lib/shop/heater'
import { shopAnswer as answerAboutShop, type ShopAnswer, type ShopQuestion } from '@/lib/shop/shop'
import { shopWords } from '@/lib/shop/words'
import { emcFlags, type EmcFlag } from '@/lib/wood/emc'
import { humidityPct, mcPct, numberIn, temperatureC } from './query'

export const shopQuerySchema = z
  .strictObject({
    volumeM3: numberIn(0.001, 100_000, 'm³'),
    temperatureC,
    humidityPct,
    targetEmcPct: mcPct,
    outdoorC: temperatureC.optional(),
    outdoorHumidityPct: humidityPct.optional(),
    airChangesPerH: numberIn(0, 50, 'air changes an hour').optional(),
    woodKg: numberIn(0, 100_000, 'kg').optional(),
    shellWPerK: numberIn(0, 10_000, 'W/K').optional(),
    heater: z.enum(heaterKinds, { error: 'electric, flued or unflued' }).optional(),
    surfaceC: numberIn(-40, 60, '°C').optional(),
  })
  .superRefine((query, context) => {
    if (query.outdoorHumidityPct !== undefined && query.outdoorC === undefined) {
      context.addIssue({
        code: 'custom',
        path: ['outdoorC'],
        message: 'needed with outdoorHumidityPct, in °C',
      })
    }
  })

export type ShopQuery = z.output<typeof shopQuerySchema>

export type BenchShopAnswer = Omit<Partial<ShopAnswer>, 'warmTo' | 'cautions'> & {
  emcPct: number
  isDryEnough: boolean
  /** Whether warming alone, up to 35 °C, brings it there. False also where it is not needed. */
  isReachedByWarming: boolean
  warmToC?: number
  humidityAfterWarmingPct?: number
  cautions: ShopAnswer['cautions']
  flags: EmcFlag[]
  words: string
}

/** How to make a shop fit for wood. What has no answer, or needs something that was not told, is not there. */
export function shopAnswer(query: ShopQuery): BenchShopAnswer {
  const { volumeM3, temperatureC: airC, humidityPct: airPct, ...rest } = query
  const question: ShopQuestion = { ...rest, volumeM3, air: { temperatureC: airC, humidityPct: airPct } }
  const answer = answerAboutShop(question)
  const { warmTo, ...others } = answer
  return {
    ...others,
    isReachedByWarming: warmTo !== undefined,
    ...(warmTo === undefined
      ? {}
      : { warmToC: warmTo.temperatureC, humidityAfterWarmingPct: warmTo.humidityPct }),
    flags: emcFlags(airC, airPct),
    words: shopWords(question, answer).join(' '),
  }
}
