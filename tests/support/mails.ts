import type { Kysely } from 'kysely'
import type { Database } from '@/db/schema'
import { eventually } from './eventually'

export interface KeptMail {
  subject: string
  text: string
  html: string
  /** The first address in the plain text. */
  link: string
}

/** The newest mail to somebody that the running installation's mail trap has kept, with these words in its subject. */
export function mailTo(db: Kysely<Database>, address: string, subject: string): Promise<KeptMail> {
  return eventually(`a mail "${subject}" to ${address}`, async () => {
    const [mail] = await mailsTo(db, address)
    return mail?.subject.includes(subject) === true ? mail : undefined
  })
}

export async function mailsTo(db: Kysely<Database>, address: string): Promise<KeptMail[]> {
  const rows = await db
    .selectFrom('demo_mail')
    .where((eb) => eb(eb.val(address), '=', eb.fn.any('recipients')))
    .select(['subject', 'text_body', 'html_body'])
    .orderBy('id', 'desc')
    .execute()
  return rows.map((row) => ({
    subject: row.subject,
    text: row.text_body,
    html: row.html_body,
    link: /https?:\/\/\S+/.exec(row.text_body)?.[0] ?? '',
  }))
}
