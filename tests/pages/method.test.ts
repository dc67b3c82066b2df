import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { methodSections } from '@/app/(public)/method/_components/sections'
import { agreements } from '@/lib/method/agreement'
import { workedExamples } from '@/lib/method/examples'
import { emcTables } from '@/lib/method/table-text'
import { type Browser, launchBrowser, type Visit, visit } from '../support/browser'

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

describe('the method page', () => {
  it('is one press from the front page, without an account', async () => {
    const { page } = stranger
    await page.goto('/')
    await page.getByRole('link', { name: 'How it works things out' }).click()
    await page.waitForURL('**/method')
    await page.getByRole('heading', { level: 2, name: 'Wood and air' }).waitFor()
  })

  it('shows every formula as MathML that the browser draws, with its papers', async () => {
    const { page } = stranger
    await page.goto('/method')
    const drawn = await page.locator('article[id^="formula-"]').evaluateAll((articles) =>
      articles.map((article) => ({
        id: article.id,
        lines: [...article.querySelectorAll('math')].filter(
          (math) =>
            math.namespaceURI === 'http://www.w3.org/1998/Math/MathML' &&
            math.getBoundingClientRect().height > 10 &&
            (math.getAttribute('alttext') ?? '') !== '',
        ).length,
        papers: [...article.querySelectorAll('dt')].map((term) => term.textContent),
      })),
    )
    const papers = ['Letters', 'Source', 'Status', 'Range', 'Limits', 'Doubt']
    expect(drawn).toEqual(
      methodSections.flatMap(({ formulas }) =>
        formulas.map(({ id, lines }) => ({ id: `formula-${id}`, lines: lines.length, papers })),
      ),
    )
  })

  it('a long formula scrolls in its own box, and the page keeps to the phone', async () => {
    const { page } = stranger
    const box = page.getByRole('group', { name: 'The most water that air can hold, as a formula' })
    expect(await box.evaluate((element) => element.scrollWidth - element.clientWidth)).toBeGreaterThan(20)
    expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBe(0)
  })

  it.each(workedExamples())('works the example of $id live, as lib does', async ({ id, lines }) => {
    const section = stranger.page.locator(`section[aria-labelledby="example-${id}"]`)
    const values = await section.locator('dd').allTextContents()
    expect(values).toEqual(lines.map(({ value }) => value))
  })

  it('says how far it lies from each table, and folds the EMC table out by temperature', async () => {
    const { page } = stranger
    const summary = page.getByRole('region', { name: 'The program beside every table' })
    for (const { what, largestText } of agreements()) {
      const row = summary.getByRole('row').filter({ hasText: what }).first()
      expect(await row.textContent()).toContain(largestText)
    }
    const room = emcTables().find(({ id }) => id === 'emc-70')
    if (room === undefined) throw new Error('no row for 70 °F')
    const cell = page.getByRole('region', { name: room.title })
    expect(await cell.isVisible()).toBe(false)
    await page.getByText(room.title).first().click()
    await cell.waitFor()
    expect(await cell.getByRole('row').count()).toBe(room.rows.length + 1)
  })

  it('has a place for every link of the bench', async () => {
    const { page } = stranger
    const places: string[] = []
    for (const tool of ['emc', 'fit', 'time-out', 'ready', 'shop', 'salts']) {
      await page.goto(`/bench/${tool}`)
      const link = page.getByRole('link', {
        name: 'How these figures are worked out, with sources and limits',
      })
      places.push((await link.getAttribute('href')) ?? '')
    }
    expect(
      places.every((place) => /^\/method#[a-z-]+$/.test(place)),
      places.join(' '),
    ).toBe(true)
    await page.goto('/method')
    for (const place of [...places, '/method#air', '/method#doubt']) {
      expect(await page.locator(place.replace('/method', '')).count(), place).toBe(1)
    }
    const contents = await page.getByRole('navigation', { name: 'On this page' }).getByRole('link').all()
    expect(contents.length).toBeGreaterThan(methodSections.length)
    for (const link of contents) {
      const place = (await link.getAttribute('href')) ?? ''
      expect(await page.locator(place).count(), place).toBe(1)
    }
    expect(stranger.complaints).toEqual([])
  })
})
