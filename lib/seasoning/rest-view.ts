import { z } from 'zod'
import { eventKindSchema, weighingSchema } from '@/lib/pieces/event'

const instant = z.iso.datetime()
const column = z.array(z.number())
const instants = z.array(instant)

/** Where a resting piece stands, as the API tells it. Masses in g, moisture in % MC, doubts the middle 8 in 10. */
export const restViewSchema = z.object({
  /** The state in a sentence. */
  words: z.string(),
  /** When to weigh it next, in a sentence. */
  next: z.string(),
  state: z.enum(['ready', 'ready-by-weight', 'not-ready']),
  missing: z.array(z.object({ code: z.string(), words: z.string() })),
  /** What the ready rule asks for and the piece has, each as a short sentence. */
  met: z.array(z.string()),
  /** When it may be ready; null where no range can be told. */
  readyFromAt: instant.nullable(),
  readyToAt: instant.nullable(),
  series: z.object({
    /** The event that began it, by ending the one before; null for the first. */
    openedBy: z.object({ kind: eventKindSchema, at: instant }).nullable(),
    weights: z.int(),
    earlierWeights: z.int(),
  }),
  stepG: z.number(),
  isStepAssumed: z.boolean(),
  forecast: z
    .object({
      direction: z.enum(['drying', 'gaining']),
      finalG: z.number(),
      finalLowG: z.number(),
      finalHighG: z.number(),
      timeConstantDays: z.number(),
      timeConstantDaysLow: z.number(),
      timeConstantDaysHigh: z.number(),
    })
    .nullable(),
  /** Why there is none. */
  noForecast: z.object({ code: z.string(), words: z.string() }).nullable(),
  mc: z
    .object({
      pct: z.number(),
      doubtPct: z.number(),
      from: z.enum(['oven-dry', 'meter', 'model']),
    })
    .nullable(),
  dryMass: z
    .object({ grams: z.number(), doubtG: z.number(), from: z.enum(['oven-dry', 'meter', 'model']) })
    .nullable(),
  /** Middle of the keep room's last twelve months, and how many days of them have a record. */
  target: z.object({ pct: z.number(), room: z.string(), days: z.int() }).nullable(),
  nextWeighing: z.object({ at: instant, isDue: z.boolean() }),
  weighings: z.object({ at: instants, grams: column, correctedG: z.array(z.number().nullable()) }),
  fit: z.object({ at: instants, grams: column }).nullable(),
  forecastCurve: z.object({ at: instants, grams: column, lowG: column, highG: column }).nullable(),
  /** The wood by its rooms alone. */
  model: z.object({ at: instants, mcPct: column }).nullable(),
})
export type RestView = z.infer<typeof restViewSchema>

/** The weighings of a piece, the newest first, with where it stands by them. */
export const weighingsPageSchema = z.object({
  items: z.array(weighingSchema),
  nextCursor: z.string().nullable(),
  rest: restViewSchema.nullable(),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type WeighingsPage = z.infer<typeof weighingsPageSchema>
