import { z } from 'zod'

const instant = z.iso.datetime()

/** Full height, half height, a low hatched band. */
export const hourStateSchema = z.enum(['fit', 'tolerable', 'unfit'])
export type HourState = z.infer<typeof hourStateSchema>

export const stripCellSchema = z.object({
  /** The hour's start. */
  at: instant,
  state: hourStateSchema,
  emcPct: z.number(),
  temperatureC: z.number(),
  /** What it would be if the room is lit at its usual hour; null where no lighting changes it. */
  ifLit: z.object({ state: hourStateSchema, emcPct: z.number(), temperatureC: z.number() }).nullable(),
})
export type StripCell = z.infer<typeof stripCellSchema>

/** The coming hours of a room, each called fit, tolerable or unfit for a stay that begins in it. */
export const hourStripSchema = z.object({
  /** `repeated`: no forecast, the last two days over again. `none`: nothing fresh is read there. */
  kind: z.enum(['forecast', 'repeated', 'none']),
  /** One after another, an hour each; empty for `none`. */
  cells: z.array(stripCellSchema),
  /** "08:00" where the record promises anything of a lit room, with the warmings on record. */
  lit: z.object({ atTime: z.string(), warmings: z.int() }).nullable(),
  /** When the room is fit, in one sentence. */
  words: z.array(z.object({ text: z.string(), strong: z.boolean() })),
  /** What it rests on: the piece that judges, the warmings, or that there is no forecast. */
  note: z.string(),
})
export type HourStrip = z.infer<typeof hourStripSchema>
