import { request } from 'node:http'
import { betterAuth } from 'better-auth'
import { organization } from 'better-auth/plugins'
import { afterAll, describe, expect, inject, it } from 'vitest'
import { newTextId } from '@/db/queries/sites'
import { eventually } from '../support/eventually'
import { mailsTo, mailTo } from '../support/mails'
import { call, cookieOf, openStackDatabase, signedInPerson, storePerson } from '../support/session'

const db = openStackDatabase()
afterAll(() => db.destroy())

const newAddress = () => `new.${newTextId().slice(0, 16).toLowerCase()}@example.org`
const password = 'several words do well'
const signUp = (email: string, more: Record<string, unknown> = {}) =>
  call('POST', '/api/auth/sign-up/email', { body: { name: 'Newcomer', email, password, ...more } })
const pathOf = (link: string) => link.replace(inject('stack').webUrl, '')
const isSignedIn = async (cookie: string) => (await call('GET', '/api/v1/sites', { cookie })).status === 200

describe('signing up', () => {
  it('opens nothing until the address is confirmed, and then signs in by the link', async () => {
    const email = newAddress()
    const made = await signUp(email, { callbackURL: '/verify?next=%2Fsites' })
    expect([made.status, made.cookie]).toEqual([200, ''])
    const early = await call('POST', '/api/auth/sign-in/email', { body: { email, password } })
    expect([early.status, early.json<{ code: string }>().code]).toEqual([403, 'EMAIL_NOT_VERIFIED'])

    const { link } = await mailTo(db, email, 'Confirm your address')
    expect(link.startsWith(`${inject('stack').webUrl}/api/auth/verify-email?`)).toBe(true)
    const confirmed = await call('GET', pathOf(link))
    expect([confirmed.status, confirmed.headers.get('location')]).toEqual([302, '/verify?next=%2Fsites'])
    expect(await isSignedIn(confirmed.cookie)).toBe(true)
    expect(await isSignedIn(await cookieOf(email, password))).toBe(true)
  })

  it('answers the same for an address that has an account, tells only its owner, and changes nothing', async () => {
    const known = await storePerson(db, 'Known')
    const unknown = newAddress()
    const [again, fresh] = [await signUp(known.email), await signUp(unknown)]
    expect(again.status).toBe(fresh.status)
    const keys = (text: string) => Object.keys((JSON.parse(text) as { user: object }).user)
    expect(keys(again.text)).toEqual(keys(fresh.text))
    await mailTo(db, known.email, 'You have an account already')
    expect(await isSignedIn(await cookieOf(known.email, known.password))).toBe(true)
  })

  it('refuses a name that would write mail headers, and fields that nobody may set', async () => {
    const email = newAddress()
    expect((await signUp(email, { name: 'A\r\nBcc: all@example.org' })).status).toBe(400)
    expect((await signUp(email, { emailVerified: true })).status).toBe(400)
    expect((await signUp(email, { role: 'owner' })).status).toBe(400)
    expect((await signUp(email, { password: 'short' })).json<{ code: string }>().code).toBe(
      'PASSWORD_TOO_SHORT',
    )
    expect(await db.selectFrom('user').where('email', '=', email).select('id').execute()).toEqual([])
  })

  it('shows a name as words in its mails, whatever it holds', async () => {
    const owner = await signedInPerson(db, 'Owner')
    await db
      .updateTable('user')
      .set({ name: '<img src=x onerror=alert(1)>' })
      .where('id', '=', owner.userId)
      .execute()
    const site = await call('POST', '/api/v1/sites', {
      cookie: owner.cookie,
      body: { name: '<script>alert(2)</script>', timeZone: 'Europe/London' },
    })
    const invited = newAddress()
    const address = `/api/v1/sites/${site.json<{ id: string }>().id}/invitations`
    await call('POST', address, { cookie: owner.cookie, body: { email: invited, role: 'hand' } })
    const mail = await mailTo(db, invited, 'An invitation to')
    expect(mail.html).not.toMatch(/<script|<img/)
    expect(mail.html).toContain('&lt;img')
  })
})

describe('a link in a mail', () => {
  it.each(['https://evil.example', '//evil.example', '/\\evil.example', 'javascript:alert(1)', '/%0d%0ax'])(
    'leads to the start page when it was asked to lead to %s',
    async (callbackURL) => {
      const email = newAddress()
      await signUp(email, { callbackURL })
      const { link } = await mailTo(db, email, 'Confirm your address')
      expect(new URL(link).searchParams.get('callbackURL')).toBe('/')
      const bent = new URL(link)
      bent.searchParams.set('callbackURL', callbackURL)
      const followed = await call('GET', pathOf(bent.href))
      expect(followed.headers.get('location')).toBe('/')
    },
  )

  it('starts with the configured address, whatever host the request claims', async () => {
    const person = await storePerson(db, 'Poisoned')
    const { webUrl } = inject('stack')
    const { hostname, port } = new URL(webUrl)
    const body = JSON.stringify({ email: person.email, redirectTo: '/reset' })
    const status = await new Promise<number>((resolve, reject) => {
      const asked = request(
        {
          hostname,
          port,
          method: 'POST',
          path: '/api/auth/request-password-reset',
          headers: {
            host: 'evil.example',
            'x-forwarded-host': 'evil.example',
            'x-forwarded-proto': 'https',
            forwarded: 'host=evil.example',
            origin: webUrl,
            'content-type': 'application/json',
          },
        },
        (response) => {
          response.resume()
          resolve(response.statusCode ?? 0)
        },
      )
      asked.on('error', reject)
      asked.end(body)
    })
    expect(status).toBe(200)
    const mail = await mailTo(db, person.email, 'Set a new password')
    expect(mail.link.startsWith(`${webUrl}/reset?token=`)).toBe(true)
    expect(mail.text + mail.html).not.toContain('evil.example')
  })
})

describe('a new password', () => {
  it('is set once by the link, ends every session, and replaces the old one', async () => {
    const person = await signedInPerson(db, 'Forgetful')
    await call('POST', '/api/auth/request-password-reset', { body: { email: person.email } })
    const { link } = await mailTo(db, person.email, 'Set a new password')
    const token = new URL(link).searchParams.get('token')
    const reset = (newPassword: string) =>
      call('POST', '/api/auth/reset-password', { body: { token, newPassword } })
    expect((await reset('another set of words')).status).toBe(200)
    expect(await isSignedIn(person.cookie)).toBe(false)
    const old = await call('POST', '/api/auth/sign-in/email', {
      body: { email: person.email, password: person.password },
    })
    expect(old.status).toBe(401)
    expect((await reset('a third set of words')).json<{ code: string }>().code).toBe('INVALID_TOKEN')
    expect(await isSignedIn(await cookieOf(person.email, 'another set of words'))).toBe(true)
  })

  it('is asked for with the same answer where there is no account, and no mail goes out', async () => {
    const person = await storePerson(db, 'Known')
    const nobody = newAddress()
    const ask = (email: string) => call('POST', '/api/auth/request-password-reset', { body: { email } })
    const [known, unknown] = [await ask(person.email), await ask(nobody)]
    expect([known.status, known.text]).toEqual([unknown.status, unknown.text])
    await mailTo(db, person.email, 'Set a new password')
    expect(await mailsTo(db, nobody)).toEqual([])
  })
})

describe('a session', () => {
  it('gets a new token at every sign-in, also in a browser that brings one along', async () => {
    const person = await signedInPerson(db, 'Fixed')
    const again = await call('POST', '/api/auth/sign-in/email', {
      cookie: person.cookie,
      body: { email: person.email, password: person.password },
    })
    const tokenOf = (cookie: string) => /lidfast\.session_token=([^;]+)/.exec(cookie)?.[1]
    expect(tokenOf(again.cookie)).toBeDefined()
    expect(tokenOf(again.cookie)).not.toBe(tokenOf(person.cookie))
  })

  it('is kept from scripts and other sites, and its token stands in no answer', async () => {
    const person = await storePerson(db, 'Careful')
    const reply = await call('POST', '/api/auth/sign-in/email', {
      body: { email: person.email, password: person.password },
    })
    const cookie = reply.headers.getSetCookie().find((set) => set.startsWith('lidfast.session_token='))
    expect(cookie).toMatch(/HttpOnly/i)
    expect(cookie).toMatch(/SameSite=Lax/i)
    const { token } = await db
      .selectFrom('session')
      .where('userId', '=', person.userId)
      .select('token')
      .executeTakeFirstOrThrow()
    expect(reply.text).not.toContain(token)
    const shown = await call('GET', '/api/auth/get-session', { cookie: reply.cookie })
    expect(shown.json()).toEqual({ user: { id: person.userId, name: person.name, email: person.email } })
  })

  it('is over for good after signing out, and nothing of it was allowed into a cache', async () => {
    const person = await signedInPerson(db, 'Leaver')
    const seen = await call('GET', '/api/v1/sites', { cookie: person.cookie })
    expect(seen.headers.get('cache-control')).toBe('no-store')
    const out = await call('POST', '/api/auth/sign-out', { cookie: person.cookie, body: {} })
    expect(out.status).toBe(200)
    expect(await isSignedIn(person.cookie)).toBe(false)
    await eventually('the session is gone from the database', async () => {
      const left = await db.selectFrom('session').where('userId', '=', person.userId).select('id').execute()
      return left.length === 0
    })
  })

  it('can not be opened from another site', async () => {
    const person = await storePerson(db, 'Victim')
    const body = { email: person.email, password: person.password }
    for (const origin of ['https://evil.example', 'null', null]) {
      const reply = await call('POST', '/api/auth/sign-in/email', { body, headers: { origin } })
      expect([reply.status, reply.cookie]).toEqual([403, ''])
    }
  })

  it('is refused with the same words for a wrong password and for an unknown person', async () => {
    const person = await storePerson(db, 'Known')
    const signIn = (email: string) =>
      call('POST', '/api/auth/sign-in/email', { body: { email, password: 'not the password' } })
    const [wrong, unknown] = [await signIn(person.email), await signIn(newAddress())]
    expect(wrong.status).toBe(401)
    expect([wrong.status, wrong.text]).toEqual([unknown.status, unknown.text])
  })
})

describe('the account library', () => {
  const open = new Set([
    ...['POST /sign-in/email', 'POST /sign-up/email', 'POST /sign-out', 'GET /get-session'],
    ...['GET /verify-email', 'POST /send-verification-email', 'POST /request-password-reset'],
    'POST /reset-password',
  ])
  const library = betterAuth({
    baseURL: 'http://127.0.0.1',
    secret: 'x'.repeat(32),
    plugins: [organization()],
    telemetry: { enabled: false },
  })
  const paths = Object.values(library.api as Record<string, { path?: string }>).flatMap(({ path }) =>
    path === undefined ? [] : [path],
  )

  it('offers many more addresses, which are all closed', async () => {
    expect(paths.filter((path) => path.startsWith('/organization/')).length).toBeGreaterThan(20)
    const { cookie } = await signedInPerson(db, 'Prober')
    for (const path of new Set(paths)) {
      for (const method of ['GET', 'POST']) {
        if (open.has(`${method} ${path}`)) continue
        const reply = await call(method, `/api/auth${path.replace(/:\w+/g, 'x')}`, {
          cookie,
          body: method === 'POST' ? {} : undefined,
        })
        expect(reply.status, `${method} ${path}`).toBe(404)
      }
    }
  })

  it.each([
    '/%6frganization/create',
    '/sign-in/email/',
    '//organization/create',
    '/organization/../organization/list',
  ])('is not reached by the odd spelling %s', async (path) => {
    const { cookie } = await signedInPerson(db, 'Prober')
    const reply = await call('POST', `/api/auth${path}`, { cookie, body: { name: 'x', slug: 'x' } })
    expect([308, 404]).toContain(reply.status)
  })
})
