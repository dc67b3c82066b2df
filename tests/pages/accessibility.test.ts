import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  type Browser,
  launchBrowser,
  type Page,
  seriousFindings,
  type Visit,
  visit,
} from '../support/browser'
import type { DemoRole } from '../support/sign-in'
import { siteOf } from './steps'

const looks = [
  { width: 1280, theme: 'light' },
  { width: 390, theme: 'light' },
  { width: 390, theme: 'dark' },
  { width: 1280, theme: 'dark' },
] as const

/** Addresses of a page; `{pieces}` stands for the first of that list, and `@` for the site. */
const pages: { as?: DemoRole; addresses: string[] }[] = [
  {
    addresses: [
      '/',
      '/sign-in',
      '/sign-up',
      '/forgotten',
      '/reset',
      '/verify?error=x',
      '/demo-inbox',
      '/invitation/none',
      '/bench',
      '/bench/emc',
      '/bench/emc?ask=humidity&units=imperial',
      '/bench/fit',
      '/bench/time-out',
      '/bench/ready',
      '/bench/ready?spaced=dates&on=2026-01-05,2026-02-02,2026-03-02&grams=470,448,430',
      '/bench/shop',
      '/bench/salts',
      '/bench/salts?temperatureC=80',
      '/method',
    ],
  },
  {
    as: 'owner',
    addresses: [
      '/sites',
      '/sites/new',
      '/invitation/none',
      '@',
      '@/rooms',
      '@/rooms/{rooms}',
      '@/sensors',
      '@/sensors/add',
      '@/sensors/{sensors}',
      '@/pieces',
      '@/pieces/new',
      '@/pieces/{pieces?q=214}',
      '@/pieces/{pieces?q=214}/edit',
      '@/carry',
      '@/carry/{carries}',
      '@/notices',
      '@/place',
      '@/place?part=place',
      '@/place?part=delete',
      '@/place/woods',
      '@/place/woods?q=burl',
      '@/place/woods/new',
      '@/place/woods/fraxinus-excelsior',
      '@/nothing-here',
    ],
  },
  {
    as: 'onlooker',
    addresses: ['@', '@/rooms', '@/rooms/{rooms}', '@/pieces', '@/pieces/{pieces}', '@/place'],
  },
]

let browser: Browser
beforeAll(async () => {
  browser = await launchBrowser()
})
afterAll(async () => {
  await browser.close()
})

describe.each(pages)('pages as seen by $as', { timeout: 240_000 }, ({ as, addresses }) => {
  let visitor: Visit
  let site = ''
  beforeAll(async () => {
    visitor = await visit(browser, { as })
    if (as === undefined) return
    await visitor.page.goto('/sites')
    await visitor.page.getByRole('link', { name: /Saltmarsh Yard/ }).click()
    await visitor.page.waitForURL(/\/sites\/[a-z0-9]{10}$/)
    site = siteOf(visitor.page)
  })
  afterAll(async () => {
    await visitor.close()
  })

  it.each(addresses)('%s: nothing serious for axe, within its width, in both themes', async (address) => {
    const { page } = visitor
    visitor.complaints.length = 0
    await page.goto(await fill(page, address, site))
    await page.getByRole('heading', { level: 1 }).first().waitFor()
    const found: string[] = []
    for (const { width, theme } of looks) {
      await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
      await page.setViewportSize({ width, height: 900 })
      await page.locator(theme === 'dark' ? 'html.dark' : 'html:not(.dark)').waitFor({ state: 'attached' })
      found.push(...(await seriousFindings(page)).map((finding) => `${String(width)} ${theme}: ${finding}`))
      const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
      if (over > 0) found.push(`${String(width)} ${theme}: ${String(over)} px wider than the window`)
    }
    expect(found).toEqual([])
    // A page that is not there is told so by its status, which the browser notes in its console.
    const isMissing = address.endsWith('nothing-here')
    expect(visitor.complaints.filter((complaint) => !(isMissing && complaint.includes('404')))).toEqual([])
  })
})

async function fill(page: Page, address: string, site: string): Promise<string> {
  const list = /\{(.+)\}/.exec(address)
  const path = address.replace('@', `/sites/${site}`)
  if (list === null) return path
  const answer = await page.request.get(`/api/v1/sites/${site}/${list[1] ?? ''}`)
  const { items } = (await answer.json()) as { items: { id: string }[] }
  const first = items[0]
  if (first === undefined) throw new Error(`nothing in ${list[1] ?? ''}`)
  return path.replace(list[0], first.id)
}
