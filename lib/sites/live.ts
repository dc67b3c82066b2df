import { z } from 'zod'

/** What the database says to those who listen: only that something changed, never what it is now. */
export const liveKindSchema = z.enum([
  'reading',
  'carry',
  'piece',
  'room',
  'sensor',
  'wood',
  'notice',
  'site',
])
export type LiveKind = z.infer<typeof liveKindSchema>

/** The channel of LISTEN and NOTIFY. */
export const liveChannel = 'lidfast'

/** Inside the database the site goes by its integer. */
export const liveMessageSchema = z.object({
  site: z.int(),
  kind: liveKindSchema,
  id: z.string().nullable(),
})
export type LiveMessage = z.infer<typeof liveMessageSchema>

/** What a browser hears. */
export const liveEventSchema = z.object({ kind: liveKindSchema, id: z.string().nullable() })
export type LiveEvent = z.infer<typeof liveEventSchema>
