import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { findDemoSiteCode } from '@/db/queries/sites'
import { storeNotices } from '@/db/queries/notice-state'
import type { RoutedNotice } from '@/lib/notices/inputs'
import type { PushMessage } from '@/lib/notices/push'
import { type Browser, launchBrowser, type Visit, visit } from '../support/browser'
import { eventually } from '../support/eventually'
import { mailTo } from '../support/mails'
import { openStackDatabase } from '../support/session'
import { demoAccounts } from '../support/sign-in'
import { answering } from './steps'

const run = Date.now().toString(36).slice(-6)
const db = openStackDatabase()
let browser: Browser
let maker: Visit
let siteCode: string
let siteId: number
let userId: string

beforeAll(async () => {
  browser = await launchBrowser()
  maker = await visit(browser, { as: 'maker' })
  maker.page.setDefaultTimeout(60_000)
  siteCode = (await findDemoSiteCode(db)) ?? ''
  siteId = (await db.selectFrom('site').where('code', '=', siteCode).select('id').executeTakeFirstOrThrow())
    .id
  const { maker: email } = demoAccounts
  userId = (await db.selectFrom('user').where('email', '=', email).select('id').executeTakeFirstOrThrow()).id
})
afterAll(async () => {
  await browser.close()
  await db.destroy()
})

/** A question to the maker alone, about nothing that is out. */
async function ask(title: string): Promise<void> {
  const notice: RoutedNotice = {
    ...{ key: `pages/${title}`, rule: 'tub-out', urgency: 'now', mark: 'unknown', title, body: '' },
    ...{ link: '/carry', episode: { rule: 'tub-out', subject: 'room of the test', key: title } },
    to: [{ userId, wakes: true }],
    deliveries: [
      { userId, channel: 'mail', holdUntil: null },
      { userId, channel: 'push', holdUntil: null },
    ],
  }
  await db
    .transaction()
    .execute((trx) =>
      storeNotices(trx, siteId, new Date(), [notice], new Map(), (code) => `<${code}.pages@example.org>`),
    )
}

describe('a notice that asks', () => {
  it('is answered by the link in its mail, with one press, once, and shows on the page', async () => {
    const title = `Is the tub of ${run} out?`
    await ask(title)
    const mail = await mailTo(db, demoAccounts.maker, title)
    const link = /Going now: (\S+)/.exec(mail.text)?.[1] ?? ''
    // Nobody is signed in where a mail is read.
    const reader = await visit(browser)
    await reader.page.goto(link)
    await answering(reader.page)
    await reader.page.getByRole('heading', { level: 1, name: title }).waitFor()
    await reader.page.getByRole('button', { name: 'Going now' }).click()
    await reader.page.getByText('It is set down.').waitFor()
    await reader.page.goto(link)
    await reader.page.getByText('It was answered already.').waitFor()
    await reader.page.getByText(/^You said they are going, /).waitFor()
    expect(reader.complaints).toEqual([])
    await reader.close()

    await maker.page.goto(`/sites/${siteCode}/notices`)
    await maker.page
      .getByText(/said they are going/)
      .first()
      .waitFor()
    expect(maker.complaints).toEqual([])
  })

  it('shows on the phone as well, and both tries stand in its log', async () => {
    const title = `Is the tub of ${run} out again?`
    await ask(title)
    await eventually('the push in the demo’s inbox', async () => {
      const rows = await db
        .selectFrom('demo_mail')
        .where('subject', '=', title)
        .where('sender', '=', 'On the phone')
        .select('text_body')
        .execute()
      return rows.length === 1 ? rows : undefined
    })
    await mailTo(db, demoAccounts.maker, title)
    const { page } = maker
    await page.goto(`/sites/${siteCode}/notices`)
    await answering(page)
    const line = page.getByRole('listitem').filter({ hasText: title }).first()
    await line.getByText('How it went out').click()
    await line.getByText(/e-mail: sent/).waitFor()
    await line.getByText(/phone: sent/).waitFor()
  })
})

describe('the service worker', () => {
  it('shows a push with its buttons and without a sound where it is told so', async () => {
    const { page, context } = await visit(browser)
    const { origin } = new URL(await page.goto('/').then((response) => response?.url() ?? ''))
    await context.grantPermissions(['notifications'], { origin })
    const devtools = await context.newCDPSession(page)
    const registered = new Promise<string>((resolve) => {
      devtools.on('ServiceWorker.workerVersionUpdated', ({ versions }) => {
        const active = versions.find(({ status }) => status === 'activated')
        if (active !== undefined) resolve(active.registrationId)
      })
    })
    await devtools.send('ServiceWorker.enable')
    await page.evaluate(async () => {
      await navigator.serviceWorker.register('/sw.js')
      await navigator.serviceWorker.ready
    })
    const message: PushMessage = {
      title: 'Bring 207 in now.',
      body: 'It was due by 15:15.',
      url: '/sites/abc/carry',
      tag: 'abc',
      silent: true,
      actions: [{ action: 'in', title: 'It’s in', token: 'made-up' }],
    }
    const registrationId = await registered
    await devtools.send('ServiceWorker.deliverPushMessage', {
      origin,
      registrationId,
      data: JSON.stringify(message),
    })
    const shown = await eventually('the notification', () =>
      page.evaluate(async () => {
        const registration = await navigator.serviceWorker.ready
        const [first] = await registration.getNotifications()
        return first === undefined
          ? undefined
          : { title: first.title, body: first.body, silent: first.silent, tag: first.tag }
      }),
    )
    expect(shown).toEqual({ title: message.title, body: message.body, silent: true, tag: 'abc' })
    await context.close()
  })
})
