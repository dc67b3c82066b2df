import type { Rule } from './notice'

export interface NoticeMail {
  subject: string
  text: string
  html: string
}

export type Urgency = 'now' | 'soon' | 'whenever'

export interface MailedNotice {
  urgency: Urgency
  title: string
  body: string
  /** An address under the site, such as "/carry/abc". */
  link: string
  /** One press each. */
  answers: { words: string; url: string }[]
}

/** What surrounds the notices of a mail. */
export interface MailFrame {
  /** The one configured origin; never taken from a request. */
  baseUrl: string
  siteCode: string
  siteName: string
  /** Said only where the reader's clocks differ from the site's, by which the notices were written. */
  clockWords?: string
  unsubscribeUrl: string
}

/** Notices that are told in full, and after them those of which the title is told. The rest are counted. Guesses. */
const fullMost = 20
const titlesMost = 80

const pressing: Readonly<Record<Urgency, number>> = { now: 0, soon: 1, whenever: 2 }

/** The most pressing first; of those that press alike, the oldest. */
export const byPress = <T extends { urgency: Urgency }>(notices: readonly T[]): T[] =>
  notices.toSorted((a, b) => pressing[a.urgency] - pressing[b.urgency])

/** A line break in a name must not become a header of its own (F70). */
export const oneLine = (text: string): string => text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ').trim()

/** All that one person is told of one site at one time: one subject naming the most pressing, a paragraph for each. */
export function noticeMail(notices: readonly MailedNotice[], frame: MailFrame): NoticeMail {
  const sorted = byPress(notices)
  const full = sorted.slice(0, fullMost)
  const titles = sorted.slice(fullMost, fullMost + titlesMost).map(({ title }) => oneLine(title))
  const counted = sorted.length - full.length - titles.length
  const site = `${frame.baseUrl}/sites/${frame.siteCode}`
  const after = [
    ...(counted > 0 ? [`And ${String(counted)} more, on the page Notices: ${site}/notices`] : []),
    ...(frame.clockWords === undefined ? [] : [frame.clockWords]),
    `You get this because you belong to ${oneLine(frame.siteName)} on Lidfast. What you are told by mail is yours to choose, under Notices: ${site}/notices`,
    `No more mails like this: ${frame.unsubscribeUrl}`,
  ]
  return {
    subject: subjectOf(sorted),
    text: [...full.flatMap((notice) => textOf(notice, site)), ...titles, ...after].join('\n\n'),
    html: [
      ...full.map((notice) => htmlOf(notice, site)),
      ...titles.map((title) => `<p>${escapeHtml(title)}</p>`),
      ...after.map((line) => `<p style="color:#4b5956">${linked(line)}</p>`),
    ].join('\n'),
  }
}

function subjectOf(sorted: readonly MailedNotice[]): string {
  const more = sorted.length - 1
  const end = more < 1 ? '' : ` (and ${String(more)} more)`
  const most = 180 - end.length
  const title = oneLine(sorted[0]?.title ?? '')
  return `${title.length > most ? `${title.slice(0, most - 1)}…` : title}${end}`
}

function textOf(notice: MailedNotice, site: string): string[] {
  const answers = notice.answers.map(({ words, url }) => `${words}: ${url}`).join('\n')
  return [oneLine(notice.title), notice.body, answers, `${site}${notice.link}`].filter(Boolean)
}

function htmlOf(notice: MailedNotice, site: string): string {
  const anchor = (url: string, words: string) => `<a href="${escapeHtml(url)}">${escapeHtml(words)}</a>`
  const answers = notice.answers.map(({ words, url }) => anchor(url, words)).join(' &nbsp; ')
  const body = notice.body.split('\n').filter(Boolean).map(escapeHtml).join('<br>')
  return [
    `<p><strong>${escapeHtml(oneLine(notice.title))}</strong></p>`,
    body === '' ? '' : `<p>${body}</p>`,
    answers === '' ? '' : `<p>${answers}</p>`,
    `<p>${anchor(`${site}${notice.link}`, 'Open it in Lidfast')}</p>`,
  ].join('')
}

const escapes: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
}
const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (sign) => escapes[sign] ?? '')

/** Escaped, with the addresses in it as links. A name that looks like one leads where it says. */
const linked = (line: string): string =>
  line
    .split(/(https?:\/\/[^\s<>"']+)/)
    .map((part, index) =>
      index % 2 === 1 ? `<a href="${escapeHtml(part)}">${escapeHtml(part)}</a>` : escapeHtml(part),
    )
    .join('')

/** Notices that ask for something at once: pointless, and alarming, once the piece is in again. */
const asksAtOnce: ReadonlySet<Rule> = new Set([
  'time-nearly-out',
  'time-out',
  'lock-up',
  'last-call',
  'tub-out',
  'planned-carry',
  'verdict-worse',
])

const hourMs = 3_600_000

export type Fate =
  | { kind: 'send' }
  /** Nothing went wrong: it is not needed any more. */
  | { kind: 'let-go'; why: string }
  | { kind: 'give-up'; why: string }

/** Whether what has waited is still worth sending. `dueAt`, epoch ms: when it was to go, or to be tried again. */
export function fateOf(
  one: { rule: Rule; urgency: Urgency; dueAt: number; isOver: boolean; isTaken: boolean },
  now: number,
): Fate {
  if (one.isOver && asksAtOnce.has(one.rule)) return { kind: 'let-go', why: 'over before it could be sent' }
  if (one.isTaken) return { kind: 'let-go', why: 'in somebody’s hands before it could be sent' }
  // A guess: after half a day "bring it in" is no news, and after three days nothing is.
  const patienceMs = one.urgency === 'now' ? 12 * hourMs : 72 * hourMs
  return now - one.dueAt > patienceMs
    ? { kind: 'give-up', why: 'could not be sent in time' }
    : { kind: 'send' }
}

/** Messages that a person gets from one site in an hour, by each channel; the last few are kept for what presses. Guesses. */
const messagesPerHour = 12
const messagesPerHourUnlessNow = 8

/**
 * When the next message may go, epoch ms; null: now. What waits goes together then, so that nothing is lost (F70).
 * @param sentAt when each message of the last hour went, epoch ms
 */
export function cappedUntil(sentAt: readonly number[], urgency: Urgency, now: number): number | null {
  const most = urgency === 'now' ? messagesPerHour : messagesPerHourUnlessNow
  const recent = sentAt.filter((at) => at > now - hourMs).toSorted((a, b) => b - a)
  const frees = recent[most - 1]
  return frees === undefined ? null : frees + hourMs
}
