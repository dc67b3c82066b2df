/**
 * A key that tells a retry from a new request. `crypto.randomUUID` is there on secure origins only, and a phone that
 * reaches the shop's machine over plain HTTP is on none; `getRandomValues` is there always.
 */
export function retryKey(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16))
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('')
}
