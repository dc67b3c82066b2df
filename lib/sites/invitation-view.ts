import { z } from 'zod'
import { roleSchema } from './permissions'

/** What the invited person sees before saying yes. */
export const invitationViewSchema = z.object({
  id: z.string(),
  siteName: z.string(),
  role: roleSchema,
  email: z.string(),
  expiresAt: z.iso.datetime(),
})
export type InvitationView = z.infer<typeof invitationViewSchema>

/** Ids of members and invitations are long texts of the account tables. */
export const textIdSchema = z.string().regex(/^[A-Za-z0-9_-]{1,64}$/, 'not an id')
