import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { formatEmc } from '@/lib/format/figures'
import { localFieldValue } from '@/lib/format/local-time'
import { emcPct } from '@/lib/wood/emc'
import { type Browser, launchBrowser, type Visit, visit } from '../support/browser'
import { demoAccounts } from '../support/sign-in'
import { answering, mailWith, runLine, signInByForm, siteOf, withReading } from './steps'

const IN_VIEW_WITHIN_MS = 2_000
/** A busy machine may take its time; only what the product promises is held to the clock. */
const SLOW_MS = 60_000
/** So that the story can be told again to an installation that goes on running. */
const run = Date.now().toString(36).slice(-5)
const ROOM = `Lean-to ${run}`
const SENSOR = `Lean-to wall ${run}`
const PIECE = `J-${run}`

let browser: Browser
let maker: Visit

beforeAll(async () => {
  browser = await launchBrowser()
  maker = await visit(browser)
  maker.page.setDefaultTimeout(SLOW_MS)
})
afterAll(async () => {
  await browser.close()
})

describe('the main job', () => {
  let site = ''
  let line = ''

  it('takes a new sensor from its name to its first reading, live', { timeout: 120_000 }, async () => {
    const { page } = maker
    await signInByForm(page, demoAccounts.maker)
    await page.getByRole('link', { name: /Saltmarsh Yard/ }).click()
    await page.waitForURL(/\/sites\/[a-z0-9]{10}$/)
    site = siteOf(page)

    await page.goto(`/sites/${site}/rooms`)
    await answering(page)
    await page.getByRole('button', { name: 'Add a room' }).click()
    const dialog = page.getByRole('dialog', { name: 'A new room' })
    await dialog.getByLabel('Its name').fill(ROOM)
    await dialog.getByLabel('What it is').selectOption('shop')
    await dialog.getByRole('button', { name: 'Add the room' }).click()
    await dialog.waitFor({ state: 'hidden' })

    await page.goto(`/sites/${site}/sensors/add`)
    await answering(page)
    await page.getByLabel('Name of the sensor').fill(SENSOR)
    await page.getByLabel('Room that it hangs in').selectOption({ label: ROOM })
    await page.getByRole('button', { name: 'Make it known' }).click()
    line = await page.locator('code', { hasText: 'mosquitto_pub' }).innerText()
    expect(line).toContain(`lidfast/v1/${site}/`)

    await runLine(line)
    await page.getByText('It was first heard at').waitFor()
    await page
      .getByText(formatEmc(emcPct(20.4, 53)))
      .first()
      .waitFor()
  })

  it('shows a reading on an open page within two seconds of its publish', { timeout: 60_000 }, async () => {
    const { page } = maker
    await page.goto(`/sites/${site}/rooms`)
    const room = await page.getByRole('link', { name: ROOM, exact: true }).first().getAttribute('href')
    await page.goto(room ?? '')
    await page.getByRole('heading', { level: 1 }).waitFor()
    // The best of three: the guarantee is the product's, and a busy machine may stumble once.
    let isInTime = false
    let tries = 0
    for (const humidityPct of [84, 84.7, 85.4, 86.1, 86.8, 87.5, 88.2]) {
      const damp = page.getByText(formatEmc(emcPct(9, humidityPct))).first()
      // Another room may happen to stand there already.
      if ((await damp.count()) > 0) continue
      await runLine(withReading(line, 9, humidityPct))
      isInTime = await damp.waitFor({ timeout: IN_VIEW_WITHIN_MS }).then(
        () => true,
        () => false,
      )
      await damp.waitFor()
      tries += 1
      if (isInTime || tries === 3) break
    }
    expect(isInTime).toBe(true)
  })

  it(
    'warns before a finished box goes into the damp shop, on Now and by mail',
    { timeout: 240_000 },
    async () => {
      const { page } = maker
      await page.goto(`/sites/${site}/pieces/new`)
      await answering(page)
      await page.getByLabel('Its number').fill(PIECE)
      await page.getByLabel('Its wood').fill('european ash')
      await page.getByRole('option', { name: /^Ash, European/ }).click()
      await page.getByLabel(/^Joint/).fill('88')
      await page.getByText('Snug', { exact: true }).click()
      await page.getByLabel('Where is it now?').selectOption({ label: 'Landing cupboard' })
      await page.getByRole('button', { name: 'Keep it' }).click()
      await page.waitForURL(/\/pieces\/[a-z0-9]{10}$/)

      await page.getByRole('link', { name: 'Check a carry' }).click()
      await page.waitForURL(/\/carry\?/)
      await answering(page)
      await page.getByRole('tab', { name: 'Plan' }).click()
      await page.getByLabel('The room it goes to').selectOption({ label: ROOM })
      await page.getByLabel('How long it stays').selectOption({ label: '12\u00a0h' })
      const { timeZone } = (await (await page.request.get(`/api/v1/sites/${site}`)).json()) as {
        timeZone: string
      }
      const soon = new Date(Date.now() + 25 * 60_000)
      await page.getByLabel('When it is to go').fill(localFieldValue(soon, timeZone))
      await page.getByText('Leave it where it is').first().waitFor()
      await page.getByRole('button', { name: 'Plan it as asked' }).click()
      await page.waitForURL(/\/carry\/[a-z0-9]{10}$/)

      await page.goto(`/sites/${site}`)
      const planned = page.locator('section', { hasText: `${PIECE} is down to go to ${ROOM}` })
      await planned.getByText('Leave it where it is').waitFor()
      const mail = await mailWith(
        page,
        'a mail that warns',
        new RegExp(`${PIECE}[^]*${ROOM}`),
        demoAccounts.maker,
      )
      expect(mail).toContain(`/sites/${site}/carry/`)
    },
  )

  it('asks again before it starts against the advice, and brings it back', { timeout: 120_000 }, async () => {
    const { page } = maker
    await page.goto(`/sites/${site}`)
    await answering(page)
    const planned = page.locator('section', { hasText: `${PIECE} is down to go to ${ROOM}` })
    await planned.getByRole('button', { name: 'Take it out now' }).click()
    const advice = page.getByRole('alertdialog')
    await advice.getByText(/never force it/).waitFor()
    await advice.getByRole('button', { name: 'Take it out all the same' }).click()

    const back = page.getByRole('button', { name: new RegExp(`^Back in Landing cupboard,? ${PIECE}$`) })
    await back.click()
    await back.waitFor({ state: 'hidden' })
    await page.getByText(`${PIECE} is back in`).waitFor()
    const pieces = (await (await page.request.get(`/api/v1/sites/${site}/pieces?q=${PIECE}`)).json()) as {
      items: { number: string; isOut: boolean; room: { name: string } }[]
    }
    expect(pieces.items).toMatchObject([{ number: PIECE, isOut: false, room: { name: 'Landing cupboard' } }])
  })

  it('leaves the console empty and asks nobody outside', () => {
    // The browser notes the refusal that makes the page ask again; nothing else.
    const others = maker.complaints.filter((complaint) => !/409.*\/carries\/\w+\/start/.test(complaint))
    expect(others).toEqual([])
  })
})
