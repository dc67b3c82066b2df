/** What went wrong at the account's door, as far as a person can do something about it. */
export type AuthFailure =
  | 'wrong-pair'
  | 'not-verified'
  | 'taken'
  | 'weak-password'
  | 'long-password'
  | 'bad-link'
  | 'too-many'
  | 'no-connection'
  | 'other'

const failureOfCode: Readonly<Record<string, AuthFailure>> = {
  INVALID_EMAIL_OR_PASSWORD: 'wrong-pair',
  INVALID_PASSWORD: 'wrong-pair',
  INVALID_EMAIL: 'wrong-pair',
  EMAIL_NOT_VERIFIED: 'not-verified',
  USER_ALREADY_EXISTS: 'taken',
  USER_ALREADY_EXISTS_USE_ANOTHER_EMAIL: 'taken',
  PASSWORD_TOO_SHORT: 'weak-password',
  PASSWORD_TOO_LONG: 'long-password',
  INVALID_TOKEN: 'bad-link',
  TOKEN_EXPIRED: 'bad-link',
}

export const authFailureWords: Readonly<Record<AuthFailure, string>> = {
  'wrong-pair': 'That e-mail and password don’t go together. Try again, or ask for a new password.',
  'not-verified': 'This address hasn’t been confirmed yet. Open the link in the mail that we sent.',
  taken: 'There is an account with this address already. Sign in, or ask for a new password.',
  'weak-password': 'That password is too short: 10 letters or more.',
  'long-password': 'That password is too long: 128 letters at most.',
  'bad-link': 'That link has been used or is too old. Ask for a new one.',
  'too-many': 'Too many tries in a short time. Wait a minute, then try again.',
  'no-connection': 'The server didn’t answer. Nothing was changed; check the connection and try again.',
  other: 'That didn’t work, and nothing was changed. Try again in a minute.',
}

export type AuthResult = { ok: true } | { ok: false; failure: AuthFailure }

/** Asks one of the account addresses. The answer is a word of a closed list, never the server's own text. */
export async function authRequest(path: string, body: Record<string, unknown>): Promise<AuthResult> {
  let response: Response
  try {
    response = await fetch(`/api/auth/${path}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    })
  } catch {
    return { ok: false, failure: 'no-connection' }
  }
  if (response.ok) return { ok: true }
  if (response.status === 429) return { ok: false, failure: 'too-many' }
  const code = codeOf(await response.json().catch(() => null))
  return { ok: false, failure: failureOfCode[code] ?? (response.status === 401 ? 'wrong-pair' : 'other') }
}

function codeOf(body: unknown): string {
  return typeof body === 'object' && body !== null && 'code' in body && typeof body.code === 'string'
    ? body.code
    : ''
}
