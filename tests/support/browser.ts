import AxeBuilder from '@axe-core/playwright'
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core'
import { inject } from 'vitest'
import { demoAccounts, sessionOf, type DemoRole } from './sign-in'

export type { Browser, BrowserContext, Page }

/** Debian's Chromium: nothing is downloaded, and it talks to nobody by itself. */
export const launchBrowser = (): Promise<Browser> =>
  chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--disable-dev-shm-usage',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      '--no-first-run',
    ],
  })

export interface VisitOptions {
  /** Signed in as this demo account. */
  as?: DemoRole
  theme?: 'light' | 'dark'
  width?: 1280 | 390
}

export interface Visit {
  page: Page
  context: BrowserContext
  /** What went wrong on the way: console errors, failed scripts, requests that left the origin. Should be empty. */
  complaints: string[]
  close(): Promise<void>
}

/** A browser window of its own, watched: the console must stay empty and no request may leave the origin. */
export async function visit(browser: Browser, options: VisitOptions = {}): Promise<Visit> {
  const { webUrl } = inject('stack')
  const { as, theme = 'light', width = 1280 } = options
  const context = await browser.newContext({
    baseURL: webUrl,
    colorScheme: theme,
    viewport: { width, height: width === 390 ? 844 : 900 },
    reducedMotion: 'reduce',
  })
  if (as) await context.addCookies(await cookiesOf(as, webUrl))
  const page = await context.newPage()
  const complaints: string[] = []
  page.on('console', (message) => {
    const isComplaint = message.type() === 'error' || message.type() === 'warning'
    if (isComplaint) complaints.push(`${message.type()}: ${message.text()} (${message.location().url})`)
  })
  page.on('pageerror', (error) => complaints.push(`script: ${error.message}`))
  page.on('request', (request) => {
    const url = request.url()
    if (/^https?:/.test(url) && new URL(url).origin !== webUrl) complaints.push(`left the origin: ${url}`)
  })
  return { page, context, complaints, close: () => context.close() }
}

async function cookiesOf(role: DemoRole, url: string) {
  const header = await sessionOf(role)
  if (header === '') throw new Error(`${demoAccounts[role]} got no session`)
  return header.split('; ').map((pair) => {
    const at = pair.indexOf('=')
    return { name: pair.slice(0, at), value: pair.slice(at + 1), url }
  })
}

/**
 * What axe finds that is serious or worse, as short lines. Should be empty.
 * @param rules only these; all when left out
 */
export async function seriousFindings(page: Page, rules?: readonly string[]): Promise<string[]> {
  const axe = new AxeBuilder({ page }).options({
    // What passes is not gone through a second time for its report.
    resultTypes: ['violations'],
    ...(rules === undefined ? {} : { runOnly: [...rules] }),
  })
  // A formula has the colour of its sentence, and on the page of the method some ten thousand parts: once is enough.
  if (rules !== undefined) axe.exclude('math')
  const { violations } = await axe.analyze()
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, help, nodes }) => nodes.map((node) => `${id}: ${help} – ${node.target.join(' ')}`))
}
