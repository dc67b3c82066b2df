import { z } from 'zod'
import { noticeSchema } from './notice'

const instant = z.iso.datetime()

/** How a notice went out: each way to each person, with every try. */
export const deliveryLogSchema = z.object({
  items: z.array(
    z.object({
      to: z.string(),
      channel: z.enum(['mail', 'push']),
      state: z.enum(['held', 'waiting', 'sent', 'given-up', 'let-go']),
      holdUntil: instant.nullable(),
      why: z.string().nullable(),
      tries: z.array(
        z.object({ at: instant, outcome: z.enum(['sent', 'failed', 'given-up']), detail: z.string() }),
      ),
    }),
  ),
})
export type DeliveryLog = z.infer<typeof deliveryLogSchema>

/** What is asked of this person now, and whether they are at work. */
export const asksViewSchema = z.object({
  items: z.array(noticeSchema),
  /** Notices that could not be sent to somebody, in the last days. */
  lost: z.int(),
  sessionUntil: instant.nullable(),
  settingsVersion: z.int(),
})
export type AsksView = z.infer<typeof asksViewSchema>

/** A push service's address: https, by a name, as browsers give it out. */
export const newPhoneSchema = z.strictObject({
  endpoint: z
    .url({ protocol: /^https$/, error: 'an https address' })
    .max(1_000)
    .refine((text) => {
      const { hostname, username } = new URL(text)
      return (
        username === '' &&
        hostname.includes('.') &&
        !/^[\d.]+$|^\[|\.(local|internal|localhost)$/.test(hostname)
      )
    }, 'not the address of a push service'),
  keys: z.strictObject({
    p256dh: z.string().regex(/^[A-Za-z0-9_-]{87}=?$/, 'a public key in base64url'),
    auth: z.string().regex(/^[A-Za-z0-9_-]{22}(==)?$/, 'a secret in base64url'),
  }),
  device: z.string().trim().max(60).default(''),
})
export type NewPhone = z.output<typeof newPhoneSchema>

export const phoneGoneSchema = z.strictObject({ endpoint: z.string().max(1_000) })
