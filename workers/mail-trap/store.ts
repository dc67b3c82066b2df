import type { Kysely } from 'kysely'
import type { AddressObject, ParsedMail } from 'mailparser'
import type { Database } from '@/db/schema'

const keptMails = 500
const maxBodyCharacters = 100_000

export interface TrappedMail {
  messageId: string
  sender: string
  recipients: string[]
  subject: string
  textBody: string
  htmlBody: string
}

/** The envelope's recipients count, as they do for a real server: a blind copy is in no header. */
export function trappedMail(mail: ParsedMail, recipients: readonly string[]): TrappedMail {
  return {
    messageId: plain(mail.messageId ?? ''),
    sender: plain(addressText(mail.from)),
    recipients: recipients.map(plain),
    subject: plain(mail.subject ?? ''),
    textBody: plain(mail.text ?? ''),
    htmlBody: plain(typeof mail.html === 'string' ? mail.html : ''),
  }
}

const addressText = (address: AddressObject | undefined): string => address?.text ?? ''

/** The database's text can't hold the character NUL, and the inbox is for reading, not for archives. */
const plain = (text: string): string => text.replaceAll('\0', '').slice(0, maxBodyCharacters)

/** Keeps the mail and lets go of all but the newest. */
export async function storeMail(db: Kysely<Database>, mail: TrappedMail): Promise<void> {
  await db.transaction().execute(async (trx) => {
    await trx
      .insertInto('demo_mail')
      .values({
        message_id: mail.messageId,
        sender: mail.sender,
        recipients: mail.recipients,
        subject: mail.subject,
        text_body: mail.textBody,
        html_body: mail.htmlBody,
      })
      .execute()
    const oldest = trx.selectFrom('demo_mail').select('id').orderBy('id', 'desc').offset(keptMails).limit(1)
    await trx.deleteFrom('demo_mail').where('id', '<=', oldest).execute()
  })
}
