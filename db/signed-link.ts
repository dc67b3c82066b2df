import { createHash, createHmac, hkdfSync, timingSafeEqual } from 'node:crypto'
import { z } from 'zod'
import { answerSchema } from '@/lib/notices/answer'
import { laterSchema } from '@/lib/notices/answers'
import { ruleSchema } from '@/lib/notices/notice'

/** What a link in a mail stands for. Whoever holds the link may do this one thing in that person's name. */
const signedLinkSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('answer'),
    siteId: z.int(),
    noticeId: z.int(),
    userId: z.string(),
    answer: answerSchema,
    later: laterSchema.optional(),
    via: z.enum(['mail', 'push']),
    /** Epoch ms. */
    expiresAt: z.int(),
  }),
  z.strictObject({
    kind: z.literal('unsubscribe'),
    siteId: z.int(),
    userId: z.string(),
    /** Null: every mail of the site. */
    rule: ruleSchema.nullable(),
  }),
])
export type SignedLink = z.infer<typeof signedLinkSchema>
export type AnswerLink = Extract<SignedLink, { kind: 'answer' }>

/** Longer than any that is signed here. */
const mostCharacters = 1_000

/** The text of a link: what it stands for and its HMAC-SHA256 by a key of its own, both base64url. */
export function signLink(authSecret: string, link: SignedLink): string {
  const payload = Buffer.from(JSON.stringify(link)).toString('base64url')
  return `${payload}.${markOf(authSecret, payload)}`
}

/** What a link stands for; `undefined` for whatever was not signed here. Whether it has run out is for the caller. */
export function readLink(authSecret: string, text: string): SignedLink | undefined {
  const [payload, mark, more] = text.length > mostCharacters ? [] : text.split('.')
  if (payload === undefined || mark === undefined || more !== undefined) return undefined
  const expected = Buffer.from(markOf(authSecret, payload))
  const given = Buffer.from(mark)
  if (expected.length !== given.length || !timingSafeEqual(expected, given)) return undefined
  // Signed here, so it parses; but it may come from an older version.
  const parsed = signedLinkSchema.safeParse(JSON.parse(Buffer.from(payload, 'base64url').toString('utf8')))
  return parsed.success ? parsed.data : undefined
}

/** The name under which a used link is remembered. The link itself is not kept. */
export const linkId = (text: string): string => createHash('sha256').update(text).digest('base64url')

const markOf = (authSecret: string, payload: string): string => {
  const key = Buffer.from(hkdfSync('sha256', authSecret, '', 'links in mails', 32))
  return createHmac('sha256', key).update(payload).digest('base64url')
}
