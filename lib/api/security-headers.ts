interface PolicyOptions {
  /** A development server evaluates code it was sent; a built one never does. */
  isDevelopment: boolean
  isHttps: boolean
}

/**
 * What a page may load and do: only what comes from here, and only scripts that carry this request's nonce.
 * Styles stay open to inline ones, as charts and toasts set theirs on the element.
 */
export function pagePolicy(nonce: string, { isDevelopment, isHttps }: PolicyOptions): string {
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${isDevelopment ? " 'unsafe-eval'" : ''}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    // The service worker that shows notices on a phone.
    "worker-src 'self'",
    "object-src 'none'",
    "base-uri 'self'",
    "form-action 'self'",
    "frame-src 'none'",
    "frame-ancestors 'none'",
    ...(isHttps ? ['upgrade-insecure-requests'] : []),
  ].join('; ')
}

/** An answer of the API is data: opened as a page it may do nothing at all. */
export const dataPolicy = "default-src 'none'; frame-ancestors 'none'"

export function securityHeaders({ isHttps }: Pick<PolicyOptions, 'isHttps'>): Record<string, string> {
  return {
    'x-content-type-options': 'nosniff',
    'x-frame-options': 'DENY',
    'referrer-policy': 'strict-origin-when-cross-origin',
    'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=(), serial=()',
    'cross-origin-opener-policy': 'same-origin',
    'cross-origin-resource-policy': 'same-origin',
    ...(isHttps ? { 'strict-transport-security': 'max-age=31536000' } : {}),
  }
}

const loopback = new Set(['localhost', '127.0.0.1', '[::1]'])

/**
 * Where a request belongs that came by another name of this same machine. Cookies and changes go by one origin, so
 * whoever types `localhost` while the address is 127.0.0.1 would sign in and still be nobody.
 * @param host the request's Host header
 */
export function canonicalOrigin(host: string | null, baseUrl: string): string | undefined {
  const base = new URL(baseUrl)
  if (host === null || host === base.host || !URL.canParse(`http://${host}`)) return undefined
  const asked = new URL(`http://${host}`)
  return loopback.has(asked.hostname) && loopback.has(base.hostname) ? base.origin : undefined
}
