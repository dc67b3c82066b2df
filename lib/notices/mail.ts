import type { Rule } from './notice'

export interface NoticeMail {
  subject: string
  text: string
}

export interface MailedNotice {
  title: string
  body: string
  link: string
  siteCode: string
  siteName: string
}

/** A mail's subject is one line: a line break in a name must not become a header of its own. */
const oneLine = (text: string): string => text.replace(/\p{Cc}+/gu, ' ').trim()

/** @param baseUrl the one configured origin; never taken from a request */
export function noticeMail(notice: MailedNotice, baseUrl: string): NoticeMail {
  const subject = oneLine(notice.title)
  return {
    subject: subject.length > 180 ? `${subject.slice(0, 179)}…` : subject,
    text: [
      notice.title,
      notice.body,
      `${baseUrl}/sites/${notice.siteCode}${notice.link}`,
      `You get this because you belong to ${oneLine(notice.siteName)} on Lidfast. What you are told by mail is yours to choose, under Notices.`,
    ]
      .filter(Boolean)
      .join('\n\n'),
  }
}

/** Notices that ask for something at once: pointless, and alarming, once the piece is in again. */
const asksAtOnce: ReadonlySet<Rule> = new Set(['time-nearly-out', 'time-out', 'lock-up', 'last-call'])

const hourMs = 3_600_000

export type MailFate = { send: true } | { send: false; why: string }

/** Whether a mail that has waited is still worth sending. */
export function mailFate(
  mail: { rule: Rule; urgency: 'now' | 'soon' | 'whenever'; noticeAt: number; isOver: boolean },
  now: number,
): MailFate {
  if (mail.isOver && asksAtOnce.has(mail.rule)) return { send: false, why: 'over before it could be sent' }
  // A guess: after half a day "bring it in" is no news, and after three days nothing is.
  const patienceMs = mail.urgency === 'now' ? 12 * hourMs : 72 * hourMs
  if (now - mail.noticeAt > patienceMs) return { send: false, why: 'could not be sent in time' }
  return { send: true }
}
