import { z } from 'zod'
import { numberIn } from '@/lib/bench/query'
import { FELT_THICKNESS_MAX_MM, FELT_THICKNESS_MIN_MM } from '@/lib/follow/felt'
import { woodIdSchema } from '@/lib/wood/site-wood'

/** What wood has felt of a room, as the API gives it and the room's page shows it. */

/** A box's wall, a base, a roughed wall, mm. */
export const FELT_THICKNESSES_MM: readonly number[] = [4, 10, 25]
const THICKNESSES_MAX = 6
export const FELT_DAYS_MAX = 400
/** Long enough for a wall to turn with the weather, short enough to tell days apart. */
const DAYS_DEFAULT = 90

const thicknessMm = numberIn(FELT_THICKNESS_MIN_MM, FELT_THICKNESS_MAX_MM, 'mm')

export const feltQuerySchema = z.strictObject({
  /** One or more, with commas between them; each counts once. */
  thicknessMm: z
    .string()
    .transform((text) => text.split(','))
    .pipe(z.array(thicknessMm).max(THICKNESSES_MAX, `at most ${String(THICKNESSES_MAX)} of them`))
    .transform((all) => [...new Set(all)].toSorted((a, b) => a - b))
    .default([...FELT_THICKNESSES_MM]),
  /** A slug of the table, or `own-` and a code; left out: a middling hardwood. */
  wood: woodIdSchema.optional(),
  /** How far back the course goes. */
  days: numberIn(1, FELT_DAYS_MAX, 'days').default(DAYS_DEFAULT),
})
export type FeltQuery = z.output<typeof feltQuerySchema>

const instant = z.iso.datetime()

export const roomFeltSchema = z.object({
  wood: z.object({
    /** Null for wood that nobody named. */
    id: z.string().nullable(),
    commonName: z.string().nullable(),
    /** At 12 % MC. */
    densityKgM3: z.number(),
    isDensityAssumed: z.boolean(),
  }),
  /** The moment that the wood was followed to; null where the room was never read. */
  at: instant.nullable(),
  /** The first hour of the room that was looked at. */
  recordFrom: instant.nullable(),
  /** Thinnest first; none where the room was never read. */
  felt: z.array(
    z.object({
      thicknessMm: z.number(),
      mcPct: z.number(),
      /** ±, 8 in 10. */
      doubtPct: z.number(),
      /** How much of it rests on hours without a reading or before the record, 0 to 1. */
      unknownShare: z.number(),
      /** How far back the air still shows in it, to 1 %; 400 at most. */
      memoryDays: z.number(),
    }),
  ),
  /** Columns of equal length, 200 points at most. */
  course: z.object({
    at: z.array(instant),
    /** The room's own air, the mean since the point before; null where less than half of that was read. */
    emcPct: z.array(z.number().nullable()),
    felt: z.array(
      z.object({
        thicknessMm: z.number(),
        /** Null before the record. Over a gap they go on, with a wider doubt. */
        mcPct: z.array(z.number().nullable()),
        doubtPct: z.array(z.number().nullable()),
      }),
    ),
  }),
  completeTo: instant.nullable(),
  age: z.number().nullable(),
})
export type RoomFelt = z.infer<typeof roomFeltSchema>
