import { z } from 'zod'
import { answerSchema } from './answer'

const instant = z.iso.datetime()

export const ruleSchema = z.enum([
  'planned-carry',
  'verdict-worse',
  'time-nearly-out',
  'time-out',
  'lock-up',
  'last-call',
  'tub-out',
  'losing-fit',
  'shop-unfit',
  'good-hours',
  'keep-room-band',
  'damper-than-normal',
  'mould-risk',
  'too-dry',
  'cold-iron',
  'blank-ready',
  'weighing-due',
  'sensor-silent',
  'battery-low',
  'refused-messages',
  'test',
])
export type Rule = z.infer<typeof ruleSchema>

export const markSchema = z.enum(['fine', 'keep-short', 'leave', 'silent', 'weigh', 'unknown'])
export type Mark = z.infer<typeof markSchema>

export const noticeSchema = z.object({
  id: z.string(),
  at: instant,
  rule: ruleSchema,
  urgency: z.enum(['now', 'soon', 'whenever']),
  mark: markSchema,
  title: z.string(),
  body: z.string(),
  /** Where to go about it: an address under the site, such as "/carry/abc". */
  link: z.string(),
  isSeen: z.boolean(),
  acknowledgedAt: instant.nullable(),
  acknowledgedBy: z.string().nullable(),
  /** How it went out: "E-mail to the maker and the house", "held until 07:00", "on this page only", "delayed". */
  delivery: z.string(),
  /** Somebody could not be reached by some channel: it can be tried again. */
  isLost: z.boolean(),
  /** What can be answered to it now; nothing once it is over, answered or old. */
  asks: z.array(answerSchema),
  /** Each person's newest answer, the newest last. */
  answered: z.array(
    z.object({ by: z.string(), answer: answerSchema, at: instant, until: instant.nullable() }),
  ),
})
export type Notice = z.infer<typeof noticeSchema>

export const noticeListQuerySchema = z.strictObject({
  unseen: z.enum(['yes', 'no']).optional(),
  rule: ruleSchema.optional(),
  sort: z.enum(['at', '-at']).default('-at'),
})

/** PATCH of one notice, or of all with POST …/notices/seen. */
export const noticeChangeSchema = z.strictObject({
  isSeen: z.literal(true).optional(),
  isAcknowledged: z.literal(true).optional(),
})
