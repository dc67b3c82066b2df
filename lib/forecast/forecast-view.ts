import { z } from 'zod'
import { forecastMethodSchema } from './room-forecast'
import { leadScoreSchema } from './goodness'
import { hourStripSchema } from './strip-view'

const instant = z.iso.datetime()

/** What the coming hours of a room are expected to be, and how good such forecasts have been. */
export const roomForecastViewSchema = z.object({
  room: z.object({ id: z.string(), name: z.string(), mark: z.int() }),
  /** Null while none can be made, or the last is too old: then `strip` repeats the last two days. */
  madeAt: instant.nullable(),
  /** An hour each, from `madeAt` on; as if nobody warmed the room. */
  hours: z.array(
    z.object({
      at: instant,
      temperatureC: z.number(),
      humidityPct: z.number(),
      emcPct: z.number(),
      /** The middle 8 in 10. */
      emcPctLow: z.number(),
      emcPctHigh: z.number(),
      method: forecastMethodSchema,
    }),
  ),
  /** "If you light it at 08:00", from the room's own warmings; null with fewer than three on record. */
  warmed: z
    .object({
      litAtTime: z.string(),
      warmings: z.int(),
      lengthHours: z.int(),
      hours: z.array(
        z.object({
          at: instant,
          temperatureC: z.number(),
          emcPct: z.number(),
          emcPctLow: z.number(),
          emcPctHigh: z.number(),
        }),
      ),
    })
    .nullable(),
  usesOutdoors: z.boolean(),
  usesLastYear: z.boolean(),
  /** Over how many days, and by lead how far off each way has been, % MC. */
  goodness: z.object({
    days: z.int(),
    leads: z.array(
      leadScoreSchema.extend({
        /** What is used for hours so far ahead, and its own error. */
        method: forecastMethodSchema,
        usedPct: z.number(),
      }),
    ),
    words: z.array(z.string()),
  }),
  /** What is expected, in sentences. */
  words: z.array(z.string()),
  strip: hourStripSchema,
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type RoomForecastView = z.infer<typeof roomForecastViewSchema>
