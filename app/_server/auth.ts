import 'server-only'
import { betterAuth } from 'better-auth'
import { createAccessControl } from 'better-auth/plugins/access'
import { organization } from 'better-auth/plugins'
import { accountExistsMail, resetMail, verificationMail } from './auth-mails'
import { database } from './database'
import { serverConfig } from './env'
import { log } from './log'
import { sendMailSoon } from './mail'

// The plugin wants to know our roles. What they may do stands in lib/sites/permissions.ts and is asked by our routes
// alone: none of the plugin's own addresses is open, so here a role may do nothing.
const access = createAccessControl({ organization: [], member: [], invitation: [] } as const)
const nothing = { organization: [], member: [], invitation: [] } as const
const roles = {
  owner: access.newRole(nothing),
  maker: access.newRole(nothing),
  hand: access.newRole(nothing),
  onlooker: access.newRole(nothing),
}

const hour = 3_600
const day = 24 * hour

function createAuth() {
  const config = serverConfig()
  return betterAuth({
    appName: 'Lidfast',
    baseURL: config.baseUrl,
    basePath: '/api/auth',
    secret: config.authSecret,
    trustedOrigins: [config.baseUrl],
    database: { db: database(), type: 'postgres' },
    telemetry: { enabled: false },
    emailAndPassword: {
      enabled: true,
      requireEmailVerification: true,
      minPasswordLength: 10,
      maxPasswordLength: 128,
      resetPasswordTokenExpiresIn: hour,
      revokeSessionsOnPasswordReset: true,
      sendResetPassword: async ({ user, token }) => sendMailSoon(resetMail(user.email, token)),
      onExistingUserSignUp: async ({ user }) => sendMailSoon(accountExistsMail(user.email)),
    },
    emailVerification: {
      sendOnSignUp: true,
      autoSignInAfterVerification: true,
      expiresIn: hour,
      sendVerificationEmail: async ({ user, url }) => sendMailSoon(verificationMail(user.email, url)),
    },
    session: {
      expiresIn: 30 * day,
      updateAge: day,
      // A session is looked up at every request, so that one that was ended is ended at once.
      cookieCache: { enabled: false },
    },
    // The library counts by address alone, in one bucket for all where none is known: `rate-limit.ts` does it instead.
    rateLimit: { enabled: false },
    advanced: {
      cookiePrefix: 'lidfast',
      useSecureCookies: config.baseUrl.startsWith('https:'),
      defaultCookieAttributes: { httpOnly: true, sameSite: 'lax' },
      ipAddress: { disableIpTracking: true },
    },
    plugins: [
      organization({ ac: access, roles, creatorRole: 'owner', allowUserToCreateOrganization: false }),
    ],
    logger: {
      level: 'warn',
      log: (level, message) => log()[level === 'error' ? 'error' : 'warn']({ from: 'auth' }, message),
    },
  })
}

type Auth = ReturnType<typeof createAuth>

const kept = globalThis as typeof globalThis & { lidfastAuth?: Auth }

/** Made at the first use and not at import: a build has neither a database nor a secret. */
export function auth(): Auth {
  kept.lidfastAuth ??= createAuth()
  return kept.lidfastAuth
}
