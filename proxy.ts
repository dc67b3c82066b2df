import { NextResponse, type NextRequest } from 'next/server'
import { isProduction, serverConfig } from '@/app/_server/env'
import { canonicalOrigin, dataPolicy, pagePolicy, securityHeaders } from '@/lib/api/security-headers'

/**
 * Headers that every answer gets. This is no guard: whether somebody may see or do something is asked where the data
 * is, so a request that got past here would gain nothing.
 */
export function proxy(request: NextRequest): NextResponse {
  const { baseUrl } = serverConfig()
  const isHttps = baseUrl.startsWith('https:')
  const { pathname, search } = request.nextUrl
  const isData = pathname.startsWith('/api/')

  const elsewhere = canonicalOrigin(request.headers.get('host'), baseUrl)
  if (elsewhere !== undefined && !isData && request.method === 'GET') {
    return movedTo(elsewhere + pathname + search)
  }

  const nonce = Buffer.from(crypto.randomUUID()).toString('base64')
  const policy = isData ? dataPolicy : pagePolicy(nonce, { isDevelopment: !isProduction, isHttps })
  const headers = new Headers(request.headers)
  headers.set('x-nonce', nonce)
  headers.set('x-lidfast-path', pathname + search)
  headers.set('content-security-policy', policy)
  const response = NextResponse.next({ request: { headers } })
  response.headers.set('content-security-policy', policy)
  for (const [name, value] of Object.entries(securityHeaders({ isHttps }))) response.headers.set(name, value)
  return response
}

/**
 * Sends a browser on. Next takes `localhost` and 127.0.0.1 for one and the same, and would turn a Location from one to
 * the other into a circle; a browser that is told to load another address does just that.
 */
function movedTo(address: string): NextResponse {
  const shown = address.replaceAll('&', '&amp;').replaceAll('"', '&quot;').replaceAll('<', '&lt;')
  return new NextResponse(
    `<!doctype html><meta charset="utf-8"><title>Lidfast</title><p>Lidfast is at <a href="${shown}">${shown}</a>.`,
    {
      headers: {
        refresh: `0; url=${address}`,
        'content-type': 'text/html; charset=utf-8',
        'cache-control': 'no-store',
        'content-security-policy': dataPolicy,
        'x-content-type-options': 'nosniff',
      },
    },
  )
}

export const config = { matcher: '/((?!_next/static|_next/image).*)' }
