import type { Kysely } from 'kysely'
import type { Transporter } from 'nodemailer'
import { beginTry, type DueDelivery, endTry, listDue } from '@/db/queries/deliveries'
import type { Database } from '@/db/schema'
import { signLink } from '@/db/signed-link'
import { noticeMail } from '@/lib/notices/mail'
import { type LinkSource, signedAnswers } from './answer-links'
import { hasRoom, type Message, messagesOf, withoutStale } from './groups'

export interface MailRoute extends LinkSource {
  /** Undefined when no mail server is configured. */
  transport: Transporter | undefined
  from: string
}

/**
 * Sends what is due to one person, all of one site as one mail, and stops at the first that fails, so that the order is
 * kept. When the process dies between sending and setting that down, the same message goes again under the same id, and
 * mail programs fold the two into one.
 * @throws the mail server's error, so that the job queue tries again later
 */
export async function mailPerson(
  db: Kysely<Database>,
  route: MailRoute,
  userId: string,
  now: Date,
): Promise<number> {
  const due = await withoutStale(db, 'mail', await listDue(db, userId, 'mail', now), now)
  let sent = 0
  for (const message of messagesOf('mail', due, 0)) {
    if (!message.isRepeat && !(await hasRoom(db, message, now))) continue
    await beginTry(db, message.group, message.messageId)
    if (route.transport === undefined) {
      await endTry(db, message.group, { state: 'given-up', error: 'no mail server is configured' }, now)
      continue
    }
    try {
      await route.transport.sendMail(mailOf(route, message))
    } catch (error) {
      const words = error instanceof Error ? error.message : String(error)
      if (isRefusedForGood(error)) {
        await endTry(db, message.group, { state: 'given-up', error: words }, now)
        continue
      }
      await endTry(db, message.group, { state: 'waiting', error: words }, now)
      throw error
    }
    const detail = message.due.length > 1 ? `with ${String(message.due.length - 1)} more, as one mail` : ''
    await endTry(db, message.group, { state: 'sent', detail }, now)
    sent += 1
  }
  return sent
}

function mailOf(route: MailRoute, { due, messageId, group }: Message) {
  const [first] = due
  const { siteId, userId } = group
  const rules = new Set(due.map(({ rule }) => rule))
  // Pressed in the mail program, it ends mails like this one; with several rules in one mail, or a test, it ends them all.
  const [only = null] = rules
  const rule = rules.size === 1 && only !== 'test' ? only : null
  const token = signLink(route.authSecret, { kind: 'unsubscribe', siteId, userId, rule })
  const mail = noticeMail(
    due.map((one) => ({
      urgency: one.urgency,
      title: one.title,
      body: one.body,
      link: one.link,
      answers: signedAnswers(route, one, 'mail').map(({ words, token: answer }) => ({
        words,
        url: `${route.baseUrl}/answer/${answer}`,
      })),
    })),
    {
      baseUrl: route.baseUrl,
      siteCode: first?.siteCode ?? '',
      siteName: first?.siteName ?? '',
      clockWords: clockWords(first),
      unsubscribeUrl: `${route.baseUrl}/unsubscribe/${token}`,
    },
  )
  return {
    ...mail,
    from: route.from,
    to: { name: '', address: first?.address ?? '' },
    messageId,
    // Names that people chose stand in mails: they must not pull in a file or an address of this machine.
    disableFileAccess: true,
    disableUrlAccess: true,
    headers: {
      // Out-of-office replies to a machine help nobody.
      'Auto-Submitted': 'auto-generated',
      // One press in the mail program (RFC 2369, RFC 8058).
      'List-Unsubscribe': `<${route.baseUrl}/api/v1/unsubscribe/${token}>`,
      'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
    },
  }
}

const clockWords = (due: DueDelivery | undefined): string | undefined =>
  due === undefined || due.ownTimeZone === null || due.ownTimeZone === due.siteTimeZone
    ? undefined
    : `Times are those of ${due.siteName.replace(/\p{Cc}+/gu, ' ')}, by the clock of ${due.siteTimeZone}.`

/** The server has refused this address or this message and will do so again (RFC 5321: a reply of 5yz). */
function isRefusedForGood(error: unknown): boolean {
  if (!(error instanceof Error) || !('code' in error) || !('responseCode' in error)) return false
  const isAboutThis = error.code === 'EENVELOPE' || error.code === 'EMESSAGE'
  return isAboutThis && typeof error.responseCode === 'number' && error.responseCode >= 500
}
