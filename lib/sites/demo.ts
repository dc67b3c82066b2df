import { z } from 'zod'
import { codeSchema } from './site'
import type { Role } from './permissions'

/** The accounts of the demo, one per role. Their password is no secret, so they go away together with the demo's site. */
export const demoAccounts = [
  { email: 'owner@example.org', role: 'owner' },
  { email: 'maker@example.org', role: 'maker' },
  { email: 'house@example.org', role: 'hand' },
  { email: 'desk@example.org', role: 'onlooker' },
] as const satisfies readonly { email: string; role: Role }[]

export const demoPassword = 'saltmarsh-demo'

/** Whom "Try the demo yard" signs in. */
export const demoVisitor = 'maker@example.org'

/** A mail as the demo's inbox shows it: the plain words only, whatever a sender put into the other part. */
export const demoMailSchema = z.object({
  id: z.string(),
  at: z.iso.datetime(),
  from: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
})
export type DemoMail = z.infer<typeof demoMailSchema>

/** Where "Try the demo yard" leads to. */
export const demoSignInSchema = z.object({ site: codeSchema })
