import { request, type IncomingMessage } from 'node:http'
import { describe, expect, inject, it } from 'vitest'
import { call } from '../support/session'

/** A request with a Host header of one's own, which `fetch` does not send. */
function askAs(host: string, path: string): Promise<IncomingMessage> {
  const { hostname, port } = new URL(inject('stack').webUrl)
  return new Promise((resolve, reject) => {
    const asked = request({ hostname, port, path, headers: { host } }, (response) => {
      response.resume()
      resolve(response)
    })
    asked.on('error', reject)
    asked.end()
  })
}

const policyOf = async (path: string) => {
  const reply = await call('GET', path)
  return { policy: reply.headers.get('content-security-policy') ?? '', reply }
}
const nonceOf = (policy: string) => /'nonce-([^']+)'/.exec(policy)?.[1] ?? ''

describe.each(['/', '/sign-in', '/sign-up', '/forgotten', '/bench', '/no-such-page'])(
  'the page %s',
  (path) => {
    it('runs only scripts that carry the nonce of this very answer', async () => {
      const { policy, reply } = await policyOf(path)
      expect(policy).toContain("script-src 'self' 'nonce-")
      expect(policy).not.toMatch(/script-src[^;]*unsafe-(inline|eval)/)
      const nonce = nonceOf(policy)
      expect(nonce.length).toBeGreaterThan(20)
      const scripts = reply.text.match(/<script\b[^>]*>/g) ?? []
      expect(scripts.length).toBeGreaterThan(0)
      for (const script of scripts) expect(script).toContain(`nonce="${nonce}"`)
      expect(nonceOf((await policyOf(path)).policy)).not.toBe(nonce)
    })

    it('may not be framed, sniffed, or given a sensor of the machine', async () => {
      const { policy, reply } = await policyOf(path)
      expect(policy).toContain("frame-ancestors 'none'")
      expect(policy).toContain("base-uri 'self'")
      expect(policy).toContain("form-action 'self'")
      expect(policy).toContain("object-src 'none'")
      const { headers } = reply
      expect(headers.get('x-content-type-options')).toBe('nosniff')
      expect(headers.get('referrer-policy')).toBe('strict-origin-when-cross-origin')
      expect(headers.get('permissions-policy')).toContain('geolocation=()')
      expect(headers.get('x-powered-by')).toBeNull()
      // Over plain http the header would mean nothing, and a browser that took it would lock itself out.
      expect(headers.get('strict-transport-security')).toBeNull()
    })
  },
)

it('lets an answer of the API do nothing when it is opened as a page', async () => {
  const { policy, reply } = await policyOf('/api/v1/sites')
  expect(policy).toBe("default-src 'none'; frame-ancestors 'none'")
  expect(reply.headers.get('x-content-type-options')).toBe('nosniff')
})

describe('another name of this machine', () => {
  it('leads to the configured address with the same path, so that cookies fit', async () => {
    const { port, origin } = new URL(inject('stack').webUrl)
    const moved = await askAs(`localhost:${port}`, '/sign-in?next=%2Fsites')
    expect(moved.headers.refresh).toBe(`0; url=${origin}/sign-in?next=%2Fsites`)
    expect(moved.headers.location).toBeUndefined()
  })

  it('leads nowhere else: a made-up host gets no redirect to itself', async () => {
    const made = await askAs('evil.example', '/sign-in')
    expect(made.statusCode).toBe(200)
    expect([made.headers.location, made.headers.refresh]).toEqual([undefined, undefined])
  })

  it.each(['//evil.example', '//evil.example/..', '/%2f%2fevil.example'])(
    'is not led astray by %s',
    async (path) => {
      const { port, origin } = new URL(inject('stack').webUrl)
      const { location, refresh } = (await askAs(`localhost:${port}`, path)).headers
      const target = location ?? refresh?.toString().replace('0; url=', '')
      if (target !== undefined) expect(new URL(target, origin).origin).toBe(origin)
    },
  )
})

describe('a page for members', () => {
  it('sends a visitor to sign in and knows the way back', async () => {
    const asked = await call('GET', '/sites/2345678923/rooms?sort=name')
    expect([303, 307]).toContain(asked.status)
    const location = new URL(asked.headers.get('location') ?? '', inject('stack').webUrl)
    expect([location.pathname, location.searchParams.get('next')]).toEqual([
      '/sign-in',
      '/sites/2345678923/rooms?sort=name',
    ])
  })

  it('is not opened by headers that the framework sends to itself', async () => {
    const inner = {
      'x-middleware-subrequest': 'proxy:proxy:proxy:proxy:proxy',
      'x-middleware-rewrite': '/sites',
      'x-lidfast-path': 'https://evil.example',
    }
    const asked = await call('GET', '/sites', { headers: inner })
    expect([303, 307]).toContain(asked.status)
    expect(asked.headers.get('location')).toMatch(/^(http:\/\/127\.0\.0\.1:\d+)?\/sign-in\?next=%2Fsites$/)
  })

  it.each(['//evil.example', '/\\evil.example', 'https://evil.example', 'javascript:alert(1)'])(
    'does not hand %s on as the way back',
    async (next) => {
      const page = await call('GET', `/sign-in?next=${encodeURIComponent(next)}`)
      expect(page.status).toBe(200)
      expect(page.headers.get('location')).toBeNull()
      // What the form goes to afterwards stands in the page's data; the given address may stand there as a query only.
      expect(page.text).not.toMatch(/"next":"(\/\/|\/\\\\|https:|javascript:)/)
    },
  )
})
