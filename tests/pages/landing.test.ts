import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Browser, launchBrowser, type Visit, visit } from '../support/browser'
import { answering } from './steps'

let browser: Browser
let stranger: Visit
beforeAll(async () => {
  browser = await launchBrowser()
  stranger = await visit(browser)
  stranger.page.setDefaultTimeout(60_000)
})
afterAll(async () => {
  await browser.close()
})

const box = () => stranger.page.getByRole('slider', { name: /^The box/ }).filter({ visible: true })
const valueNow = async () => Number(await box().getAttribute('aria-valuenow'))

describe('the landing page', () => {
  it('moves the box by the arrow keys and says what that takes', async () => {
    const { page } = stranger
    await page.goto('/')
    await answering(page)
    await page.getByText('The lid should still turn').waitFor()
    const before = await valueNow()
    await box().focus()
    await page.keyboard.press('ArrowRight')
    expect(await valueNow()).toBeCloseTo(before + 0.1, 5)
    await page.keyboard.press('End')
    await page.getByText('more likely binds than turns').waitFor()
    await page.keyboard.press('Home')
    await page.getByText('It has only just come from the house.').waitFor()
  })

  it('moves the box under the mouse, and never past either room', async () => {
    const { page } = stranger
    const at = await box().boundingBox()
    if (at === null) throw new Error('the box is not in sight')
    await page.mouse.move(at.x + at.width / 2, at.y + at.height / 2)
    await page.mouse.down()
    await page.mouse.move(2000, at.y)
    await page.mouse.up()
    expect(await valueNow()).toBe(Number(await box().getAttribute('aria-valuemax')))
  })

  it('takes one’s own figures, and keeps the last good ones beside a bad one', async () => {
    const { page } = stranger
    await page.getByLabel('Humidity in the shop').fill('45')
    await page.getByLabel('Temperature in the shop').fill('20.6')
    await page.getByText('no telling difference').waitFor()
    await page.getByLabel('Humidity in the shop').fill('450')
    await page.getByText('the figure still shows what was typed before').waitFor()
    await page.getByText('no telling difference').waitFor()
  })

  it('opens the demo yard in one press', async () => {
    const { page } = stranger
    await page.getByRole('button', { name: 'Try the demo yard' }).click()
    await page.waitForURL(/\/sites\/[a-z0-9]{10}$/)
    await page.getByText('An invented place').waitFor()
    expect(stranger.complaints).toEqual([])
  })
})
