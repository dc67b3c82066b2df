import { inject } from 'vitest'

export const demoPassword = 'saltmarsh-demo'

/** The demo's accounts, one for each role. */
export const demoAccounts = {
  owner: 'owner@example.org',
  maker: 'maker@example.org',
  hand: 'house@example.org',
  onlooker: 'desk@example.org',
} as const

export type DemoRole = keyof typeof demoAccounts

/** Signs in over HTTP and gives the `Cookie` header of the session. */
export async function signIn(email: string, password: string = demoPassword): Promise<string> {
  const { webUrl } = inject('stack')
  const answer = await fetch(`${webUrl}/api/auth/sign-in/email`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: webUrl },
    body: JSON.stringify({ email, password }),
  })
  if (!answer.ok) throw new Error(`${email} could not sign in: ${answer.status} ${await answer.text()}`)
  return answer.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0])
    .join('; ')
}

const sessions = new Map<DemoRole, Promise<string>>()

/** The session of a demo account, made once for each test file. */
export function sessionOf(role: DemoRole): Promise<string> {
  const known = sessions.get(role) ?? signIn(demoAccounts[role])
  sessions.set(role, known)
  return known
}
