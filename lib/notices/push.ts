import { z } from 'zod'
import { byPress, oneLine, type Urgency } from './mail'

/** What the service worker of a browser gets (`public/sw.js` reads it). */
export const pushMessageSchema = z.object({
  title: z.string(),
  body: z.string(),
  /** Where a press leads: an address on our own origin. */
  url: z.string(),
  /** A later message of the same tag takes the place of an earlier one on the screen. */
  tag: z.string(),
  /** During a session at work: seen, not heard. */
  silent: z.boolean(),
  /** One press each; `token` is the link by which it is answered without opening a page. */
  actions: z.array(z.object({ action: z.string(), title: z.string(), token: z.string() })),
})
export type PushMessage = z.infer<typeof pushMessageSchema>

export interface PushedNotice {
  code: string
  urgency: Urgency
  title: string
  body: string
  link: string
  actions: PushMessage['actions']
}

const shortened = (text: string, most: number): string =>
  text.length > most ? `${text.slice(0, most - 1)}…` : text

/**
 * One message for what is due to a person's phones of one site. Together with its encryption it stays below the 4,096
 * bytes that push services take (RFC 8030, section 7.2).
 */
export function pushMessage(
  notices: readonly PushedNotice[],
  frame: { siteCode: string; siteName: string; silent: boolean },
): PushMessage {
  const sorted = byPress(notices)
  const [first] = sorted
  const site = `/sites/${frame.siteCode}`
  const more = sorted.length - 1
  return {
    title: shortened(oneLine(first?.title ?? frame.siteName), 120),
    body:
      more > 0
        ? `And ${String(more)} more, on the page Notices.`
        : shortened(oneLine(first?.body ?? ''), 240),
    url: more > 0 ? `${site}/notices` : `${site}${first?.link ?? ''}`,
    tag: more > 0 ? `${frame.siteCode} notices` : (first?.code ?? frame.siteCode),
    silent: frame.silent,
    actions: more > 0 ? [] : (first?.actions ?? []),
  }
}

/** Up to so many go one by one, each with its own buttons; more go as one. A guess. */
export const pushesOneByOne = 3
