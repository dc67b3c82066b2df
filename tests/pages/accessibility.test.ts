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
      '@/carry/how-good',
      '@/lock-up',
      '@/notices',
      '@/place',
      '@/place?part=place',
      '@/place?part=doors',
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

/** Two pages at a time, one for each core; a test takes the one that is free. */
const windowsAtOnce = 2

describe.each(pages)('pages as seen by $as', { timeout: 240_000 }, ({ as, addresses }) => {
  const free: Visit[] = []
  let site = ''
  beforeAll(async () => {
    for (let n = 0; n < windowsAtOnce; n += 1) free.push(await visit(browser, { as }))
    const [first] = free
    if (as === undefined || first === undefined) return
    await first.page.goto('/sites')
    await first.page.getByRole('link', { name: /Saltmarsh Yard/ }).click()
    await first.page.waitForURL(/\/sites\/[a-z0-9]{10}$/)
    site = siteOf(first.page)
  })
  afterAll(async () => {
    for (const visitor of free) await visitor.close()
  })

  it.concurrent.each(addresses)(
    '%s: nothing serious for axe, within its width, in both themes',
    async (address) => {
      const visitor = free.pop()
      if (visitor === undefined) throw new Error('More tests at once than there are windows.')
      try {
        const { found, complaints } = await walk(visitor, address, site)
        expect(found).toEqual([])
        // A page that is not there is told so by its status, which the browser notes in its console.
        const isMissing = address.endsWith('nothing-here')
        expect(complaints.filter((complaint) => !(isMissing && complaint.includes('404')))).toEqual([])
      } finally {
        free.push(visitor)
      }
    },
  )
})

/** One address in every look. What the theme alone changes is contrast: the rest is looked at once for each width. */
async function walk({ page, complaints }: Visit, address: string, site: string) {
  complaints.length = 0
  await page.goto(await fill(page, address, site))
  await page.getByRole('heading', { level: 1 }).first().waitFor()
  const found: string[] = []
  const seen = new Set<number>()
  for (const { width, theme } of looks) {
    await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
    await page.setViewportSize({ width, height: 900 })
    await page.locator(theme === 'dark' ? 'html.dark' : 'html:not(.dark)').waitFor({ state: 'attached' })
    const findings = await seriousFindings(page, seen.has(width) ? ['color-contrast'] : undefined)
    seen.add(width)
    found.push(...findings.map((finding) => `${String(width)} ${theme}: ${finding}`))
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
    if (over > 0) found.push(`${String(width)} ${theme}: ${String(over)} px wider than the window`)
  }
  return { found, complaints: [...complaints] }
}

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
