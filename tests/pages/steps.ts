import { execFile } from 'node:child_process'
import { promisify } from 'node:util'
import { eventually } from '../support/eventually'
import { demoPassword } from '../support/sign-in'
import type { Page } from '../support/browser'

const run = promisify(execFile)

/** Waits until the page's controls answer: what is typed before that is lost to the form. */
export async function answering(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const controls = [...document.querySelectorAll('main input, main select, main button')]
    return (
      controls.length > 0 &&
      controls.every((one) => Object.keys(one).some((key) => key.startsWith('__reactProps')))
    )
  })
}

/** Signs in as a person does, and ends on the page that leads to the sites. */
export async function signInByForm(
  page: Page,
  email: string,
  password: string = demoPassword,
): Promise<void> {
  await page.goto('/sign-in')
  await answering(page)
  const form = page.getByRole('form', { name: 'Sign in' })
  await form.getByLabel('E-mail').fill(email)
  await form.getByLabel('Password', { exact: true }).fill(password)
  await form.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL('**/sites')
}

/** The site's code, from the address that the browser stands on. */
export function siteOf(page: Page): string {
  const code = /\/sites\/([a-z0-9]{10})/.exec(page.url())?.[1]
  if (code === undefined) throw new Error(`${page.url()} is no page of a site`)
  return code
}

/** Runs the line that the page offers, in a shell, as somebody at a terminal would. */
export async function runLine(line: string): Promise<void> {
  await run('sh', ['-c', line], { timeout: 10_000 })
}

/** The same line with other figures. */
export const withReading = (line: string, temperatureC: number, humidityPct: number): string =>
  line.replace(/\{"temperatureC".*?\}/, JSON.stringify({ temperatureC, humidityPct }))

/** Waits until the demo's inbox holds a mail whose words satisfy the test, and gives its text. */
export async function mailWith(
  page: Page,
  what: string,
  words: RegExp,
  to: string,
  deadlineMs = 100_000,
): Promise<string> {
  return eventually(
    what,
    async () => {
      const answer = await page.request.get('/api/v1/demo/inbox?limit=50')
      const inbox = (await answer.json()) as { items: { to: string[]; subject: string; text: string }[] }
      return inbox.items.find((mail) => mail.to.includes(to) && words.test(`${mail.subject}\n${mail.text}`))
        ?.text
    },
    deadlineMs,
  )
}
