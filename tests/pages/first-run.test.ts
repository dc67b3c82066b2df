import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Browser, launchBrowser, type Visit, visit } from '../support/browser'
import { answering, mailWith, siteOf } from './steps'

/** An address of its own each time, so that an installation may go on running between two runs. */
const EMAIL = `newcomer-${Date.now().toString(36)}@example.org`
const PASSWORD = 'a box and its lid'

let browser: Browser
let newcomer: Visit

beforeAll(async () => {
  browser = await launchBrowser()
  newcomer = await visit(browser, { width: 390 })
  newcomer.page.setDefaultTimeout(60_000)
})
afterAll(async () => {
  await browser.close()
})

describe('the first run, on a phone', () => {
  it('goes from an address to two rooms on the rule', { timeout: 180_000 }, async () => {
    const { page } = newcomer
    await page.goto('/sign-up')
    await answering(page)
    await page.getByRole('button', { name: 'Make an account' }).click()
    await page.getByText('10 letters or more', { exact: true }).waitFor()

    await page.getByLabel('Your name').fill('New comer')
    await page.getByLabel('E-mail').fill(EMAIL)
    await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
    await page.getByRole('button', { name: 'Make an account' }).click()
    await page.getByText('A mail is on its way to').waitFor()

    const mail = await mailWith(page, 'a mail to confirm the address', /Confirm your address/, EMAIL)
    const link = /https?:\/\/\S+verify-email\S+/.exec(mail)?.[0]
    if (link === undefined) throw new Error(`no link in the mail: ${mail}`)
    await page.goto(link)
    await page.getByText('Your address is confirmed.').waitFor()
    await page.getByRole('link', { name: 'Go on' }).click()

    await page.getByRole('link', { name: 'Make your site' }).click()
    await page.waitForURL('**/sites/new')
    await answering(page)
    await page.getByLabel('What it is called').fill('Corner bench')
    await page.getByLabel('Where finished boxes are kept').fill('Hall press')
    await page.getByLabel('Where you turn').fill('Hall press')
    await page.getByRole('button', { name: 'Make the site' }).click()
    await page.getByText('another room has that name').waitFor()
    await page.getByLabel('Where you turn').fill('Shed')
    await page.getByRole('button', { name: 'Make the site' }).click()
    await page.waitForURL(/\/sites\/[a-z0-9]{10}$/)

    const rooms = (await (await page.request.get(`/api/v1/sites/${siteOf(page)}/rooms`)).json()) as {
      items: { name: string; kind: string }[]
    }
    expect(rooms.items).toMatchObject([
      { name: 'Hall press', kind: 'cupboard' },
      { name: 'Shed', kind: 'shop' },
    ])
  })

  it('says what was wrong with a sign-in, and nothing of whether the address is known', async () => {
    const { page } = newcomer
    await page.context().clearCookies()
    await page.goto('/sign-in')
    await answering(page)
    const words: string[] = []
    for (const email of [EMAIL, 'nobody@example.org']) {
      await page.getByLabel('E-mail').fill(email)
      await page.getByLabel('Password', { exact: true }).fill('not the password')
      await page.getByRole('button', { name: 'Sign in' }).click()
      words.push(await page.getByRole('alert').filter({ hasText: /./ }).first().innerText())
    }
    expect(words[0]).toContain('don’t go together')
    expect(words[1]).toBe(words[0])
  })

  it('comes back to the page that was asked for, and to no other site', async () => {
    const { page } = newcomer
    await page.goto('/sign-in?next=//evil.example/x')
    await answering(page)
    await page.getByLabel('E-mail').fill(EMAIL)
    await page.getByLabel('Password', { exact: true }).fill(PASSWORD)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.waitForURL('**/sites')
  })
})
