import { z } from 'zod'
import { carrySchema } from '@/lib/carry/carry'

const instant = z.iso.datetime()
const answered = z.object({ at: instant, by: z.string().nullable() })

export const lockUpSchema = z.object({
  at: instant,
  /** The day that is being locked up, in the site's zone; the small hours belong to the evening before. */
  dayOn: z.iso.date(),
  lockUpAt: instant,
  /** Null without quiet hours in the evening. */
  lastCallAt: instant.nullable(),
  /** Until when a piece that stays out would stay at least: the end of the night. */
  morningAt: instant,
  out: z.array(carrySchema),
  /** What says that the shop was used today; null where nothing does and so nothing more is asked. */
  used: z.enum(['carried', 'warmed', 'opened']).nullable(),
  /** "No, nothing": nothing is out that is not logged. */
  nothingElse: answered.nullable(),
  closed: answered.nullable(),
  /** Today's lock-up or last-call notice, by which the house can be told. */
  noticeId: z.string().nullable(),
})
export type LockUp = z.infer<typeof lockUpSchema>

export const nothingElseSchema = z.strictObject({
  /** False takes the answer back. */
  isNothing: z.boolean(),
})
export const closeDaySchema = z.strictObject({
  /** False opens it again. */
  isClosed: z.boolean(),
  /** Pieces of which it was said that they stay out. */
  stayOutIds: z.array(z.string()).max(60).default([]),
})
export type CloseDay = z.output<typeof closeDaySchema>
