import 'server-only'
import { betterAuth } from 'better-auth'
import { database } from './database'
import { serverConfig } from './env'

function createAuth() {
  const config = serverConfig()
  return betterAuth({
    appName: 'Lidfast',
    baseURL: config.baseUrl,
    secret: config.authSecret,
    trustedOrigins: [config.baseUrl],
    database: { db: database(), type: 'postgres' },
    telemetry: { enabled: false },
    emailAndPassword: { enabled: true, requireEmailVerification: true },
    session: { expiresIn: 30 * 86_400, updateAge: 86_400, cookieCache: { enabled: false } },
  })
}

type Auth = ReturnType<typeof createAuth>

const kept = globalThis as typeof globalThis & { lidfastAuth?: Auth }

/** Made at the first use and not at import: a build has neither a database nor a secret. */
export function auth(): Auth {
  kept.lidfastAuth ??= createAuth()
  return kept.lidfastAuth
}
