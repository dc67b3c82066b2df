import { describe, expect, it } from 'vitest'
import { canonicalOrigin, pagePolicy, securityHeaders } from './security-headers'

describe('pagePolicy', () => {
  const policy = pagePolicy('abc', { isDevelopment: false, isHttps: false })

  it('lets no script run but those with the nonce, and no page put ours in a frame', () => {
    expect(policy).toContain("script-src 'self' 'nonce-abc' 'strict-dynamic';")
    expect(policy).not.toMatch(/script-src[^;]*unsafe/)
    expect(policy).toContain("frame-ancestors 'none'")
    expect(policy).toContain("object-src 'none'")
  })

  it('asks for https only where the address is one', () => {
    expect(policy).not.toContain('upgrade-insecure-requests')
    expect(securityHeaders({ isHttps: false })).not.toHaveProperty('strict-transport-security')
    expect(securityHeaders({ isHttps: true })).toHaveProperty('strict-transport-security')
  })
})

describe('canonicalOrigin', () => {
  it.each([
    ['localhost:3000', 'http://127.0.0.1:3000', 'http://127.0.0.1:3000'],
    ['127.0.0.1:3000', 'http://localhost:3000', 'http://localhost:3000'],
    ['[::1]:3000', 'http://127.0.0.1:3000', 'http://127.0.0.1:3000'],
    ['127.0.0.1:3000', 'http://127.0.0.1:3000', undefined],
    ['lidfast.example.org', 'https://lidfast.example.org', undefined],
    ['localhost:3000', 'https://lidfast.example.org', undefined],
    ['evil.example', 'http://127.0.0.1:3000', undefined],
    [null, 'http://127.0.0.1:3000', undefined],
    ['not a host', 'http://127.0.0.1:3000', undefined],
  ])('sends %s at %s to %s', (host, baseUrl, expected) => {
    expect(canonicalOrigin(host, baseUrl)).toBe(expected)
  })
})
