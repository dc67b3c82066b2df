import type { Kysely } from 'kysely'
import type { Transporter } from 'nodemailer'
import { listWaitingMail, storeDeliveryOutcome } from '@/db/queries/deliveries'
import type { Database } from '@/db/schema'
import { mailFate, noticeMail } from '@/lib/notices/mail'

export interface MailRoute {
  /** Undefined when no mail server is configured. */
  transport: Transporter | undefined
  from: string
  baseUrl: string
}

/**
 * Sends what waits for one person, oldest first, and stops at the first that fails, so that the order is kept.
 * When the process dies between sending and setting that down, the same message goes again under the same id, and
 * mail programs fold the two into one.
 * @throws the mail server's error, so that the job queue tries again later
 */
export async function mailPerson(
  db: Kysely<Database>,
  route: MailRoute,
  userId: string,
  now: Date,
): Promise<number> {
  let sent = 0
  for (const mail of await listWaitingMail(db, userId, now)) {
    const fate = mailFate({ ...mail, noticeAt: mail.noticeAt.getTime() }, now.getTime())
    if (!fate.send || route.transport === undefined) {
      const error = fate.send ? 'no mail server is configured' : fate.why
      await storeDeliveryOutcome(db, mail.siteId, mail, { state: 'given-up', error })
      continue
    }
    const { subject, text } = noticeMail(mail, route.baseUrl)
    try {
      await route.transport.sendMail({
        from: route.from,
        to: mail.address,
        subject,
        text,
        messageId: mail.messageId,
        // Out-of-office replies to a machine help nobody.
        headers: { 'Auto-Submitted': 'auto-generated' },
      })
    } catch (error) {
      const words = error instanceof Error ? error.message : String(error)
      await storeDeliveryOutcome(db, mail.siteId, mail, { state: 'waiting', error: words })
      throw error
    }
    await storeDeliveryOutcome(db, mail.siteId, mail, { state: 'sent', at: now })
    sent += 1
  }
  return sent
}
