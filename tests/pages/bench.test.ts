import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Browser, launchBrowser, type Visit, visit } from '../support/browser'
import { eventually } from '../support/eventually'
import { answering } from './steps'

let browser: Browser
let stranger: Visit
beforeAll(async () => {
  browser = await launchBrowser()
  stranger = await visit(browser, { width: 390 })
  stranger.page.setDefaultTimeout(60_000)
})
afterAll(async () => {
  await browser.close()
})

/** Opens a page of the bench and waits until its controls answer. */
async function open(path: string): Promise<void> {
  await stranger.page.goto(path)
  await answering(stranger.page)
}
const headline = async () =>
  (await stranger.page.getByRole('heading', { level: 1 }).innerText()).replaceAll('\u00a0', ' ')
const query = (key: string) => new URL(stranger.page.url()).searchParams.get(key)

describe('the open bench', () => {
  it('is one press from the front page, without an account', async () => {
    const { page } = stranger
    await page.goto('/')
    await page.getByRole('link', { name: 'The open bench' }).click()
    await page.waitForURL('**/bench')
    await page.getByRole('main').getByRole('link', { name: 'EMC' }).last().click()
    await page.waitForURL('**/bench/emc')
    await page.getByText('wood ends at about').waitFor()
  })

  it('keeps what is typed in the address, and shows the same to whoever opens that', async () => {
    const { page } = stranger
    await open('/bench/emc')
    await page.getByLabel('Temperature of the air').fill('20')
    await page.getByLabel('Humidity of the air').fill('50')
    await page.getByText('9.3').first().waitFor()
    await eventually('the address', () => (query('humidityPct') === '50' ? true : undefined), 10_000)
    const told = await headline()
    expect(told).toBe('Left in this air, wood ends at about 9.3 % MC, give or take 0.5 % MC.')
    const address = page.url()
    await page.goto('/bench')
    await open(address)
    expect(await headline()).toBe(told)
    expect(await page.getByLabel('Temperature of the air').inputValue()).toBe('20')
  })

  it('gives by API what it gives on the page', async () => {
    const { page } = stranger
    const address = await page.getByText('/api/v1/bench/emc?').innerText()
    const answer = (await (await page.request.get(address)).json()) as { emcPct: number }
    expect(answer.emcPct).toBeCloseTo(9.2711, 3)
  })

  it('speaks Fahrenheit, and keeps it from page to page', async () => {
    const { page } = stranger
    await page.getByLabel('Units').selectOption('imperial')
    await eventually('the unit', () => (query('units') === 'imperial' ? true : undefined), 10_000)
    expect(await page.getByLabel('Temperature of the air').inputValue()).toBe('68')
    await page.getByRole('navigation', { name: 'The bench' }).getByRole('link', { name: 'Salts' }).click()
    await page.waitForURL('**/bench/salts?units=imperial')
    expect(await page.getByLabel('Temperature of the sealed box').inputValue()).toBe('68')
    await page.getByLabel('Temperature of the sealed box').fill('200')
    await page.getByText('Temperature of the sealed box: a number from 41 to 95 °F.').waitFor()
  })

  it('moves the point of the air by the arrow keys', async () => {
    const { page } = stranger
    await open('/bench/emc?temperatureC=20&humidityPct=50')
    const point = page.getByRole('slider', { name: /^The air/ })
    await point.focus()
    await page.keyboard.press('ArrowUp')
    await page.keyboard.press('ArrowRight')
    await eventually('the point', () => (query('temperatureC') === '20.5' ? true : undefined), 10_000)
    expect(query('humidityPct')).toBe('51')
    expect(await point.getAttribute('aria-valuetext')).toContain('51')
  })

  it('says by when a box is to be back, and that a matching room keeps its fit', async () => {
    await open('/bench/time-out')
    expect(await headline()).toMatch(/^Bring it in within .*more likely good until about/)
    await open('/bench/time-out?toC=20.6&toRh=45')
    expect(await headline()).toContain('no telling difference')
  })

  it('takes weighings by date, and makes no forecast too early', async () => {
    const { page } = stranger
    await open('/bench/ready?grams=470,448,430')
    expect(await headline()).toContain('no forecast can be made yet')
    await page.getByRole('tab', { name: 'By date' }).click()
    await page.getByLabel('Day 3').fill('2020-01-01')
    await page.getByText('Day 3: a day after the one before it.').waitFor()
  })

  it('warns of heaters wherever a shop is to be warmed, with nothing to put that away', async () => {
    const { page } = stranger
    await open('/bench/shop?heater=unflued')
    const caution = page.getByRole('note').filter({ hasText: 'carbon monoxide' })
    await caution.waitFor()
    expect(await caution.getByRole('button').count()).toBe(0)
    expect(stranger.complaints).toEqual([])
  })
})
