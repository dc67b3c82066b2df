import { describe, expect, it } from 'vitest'
import { nextPath, safeNextPath } from './next-path'

describe('safeNextPath', () => {
  it.each(['/sites', '/sites/abc/rooms?sort=name', '/invitation/x#y', '/', '/sites/caf%C3%A9'])(
    'keeps %s, a page of our own',
    (path) => {
      expect(safeNextPath(path)).toBe(path)
    },
  )

  it.each([
    '//evil.example',
    '/\\evil.example',
    '\\\\evil.example',
    'https://evil.example',
    'javascript:alert(1)',
    'data:text/html,x',
    '/\t/evil.example',
    '/%0d%0aSet-Cookie:a=b',
    '/%5cevil.example',
    '/%09/evil.example',
    '/..//evil.example',
    '/.//evil.example',
    ' /sites',
    'sites',
    '',
    '/api/auth/sign-out',
    '/api',
    '/x/../api/v1/sites',
    '/sites\r\nx: y',
    `/${'a'.repeat(600)}`,
  ])('refuses %j', (path) => {
    expect(safeNextPath(path)).toBeUndefined()
  })

  it('falls back to the list of sites, also for a key that came twice', () => {
    expect([nextPath(undefined), nextPath(['/a', '/b']), nextPath('//evil.example')]).toEqual([
      '/sites',
      '/sites',
      '/sites',
    ])
    expect(nextPath('/bench')).toBe('/bench')
  })
})
