import { createTransport } from 'nodemailer'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { createTestDatabase, type TestDatabase } from '@/tests/support/database'
import { createLogger } from '@/workers/_shared/logger'
import { startMailTrap, type MailTrap } from '@/workers/mail-trap/server'
import { storeMail } from '@/workers/mail-trap/store'
import { freePort } from '@/workers/supervisor/ports'

let database: TestDatabase
let trap: MailTrap
let port: number

beforeAll(async () => {
  database = await createTestDatabase()
  port = await freePort()
  trap = await startMailTrap({
    host: '127.0.0.1',
    port,
    logger: createLogger('mail-trap', 'error'),
    keep: (mail) => storeMail(database.db, mail),
  })
})
afterAll(async () => {
  await trap.close()
  await database.drop()
})
beforeEach(async () => {
  await database.db.deleteFrom('demo_mail').execute()
})

const send = (subject: string, extra: { text?: string; html?: string; bcc?: string } = {}) =>
  createTransport({ host: '127.0.0.1', port, ignoreTLS: true }).sendMail({
    from: 'Lidfast <lidfast@example.org>',
    to: 'maker@example.org',
    subject,
    text: 'Bring it in.',
    ...extra,
  })

describe('the mail trap', () => {
  it('keeps who sent what to whom, with accents and both bodies', async () => {
    await send('Dose für „Ärmel“ – 12 mm', { html: '<p>Bring it in.</p>' })
    const mails = await database.db.selectFrom('demo_mail').selectAll().execute()
    expect(mails).toMatchObject([
      {
        sender: '"Lidfast" <lidfast@example.org>',
        recipients: ['maker@example.org'],
        subject: 'Dose für „Ärmel“ – 12 mm',
        html_body: '<p>Bring it in.</p>',
      },
    ])
    expect(mails[0]?.text_body).toContain('Bring it in.')
    expect(mails[0]?.message_id).toMatch(/^<.+@.+>$/)
  })

  it('counts a blind copy among the recipients', async () => {
    await send('Lock-up', { bcc: 'house@example.org' })
    const mail = await database.db.selectFrom('demo_mail').select('recipients').executeTakeFirstOrThrow()
    expect(mail.recipients).toEqual(['maker@example.org', 'house@example.org'])
  })

  it('holds the newest 500 and no more', async () => {
    await database.db
      .insertInto('demo_mail')
      .values(
        Array.from({ length: 500 }, (_, i) => ({
          sender: 'a@example.org',
          recipients: ['b@example.org'],
          subject: `old ${i}`,
          text_body: '',
          html_body: '',
        })),
      )
      .execute()
    await send('new')
    const subjects = await database.db.selectFrom('demo_mail').select('subject').orderBy('id').execute()
    expect(subjects).toHaveLength(500)
    expect(subjects.at(0)?.subject).toBe('old 1')
    expect(subjects.at(-1)?.subject).toBe('new')
  })
})
