import { Agent } from 'node:https'
import { isIP } from 'node:net'
import webPush, { WebPushError } from 'web-push'
import type { PushPhone } from '@/db/queries/push-subscriptions'
import { isPublicAddress, publicAgent } from './public-address'

export type PushAnswer =
  | { kind: 'taken' }
  /** Nobody takes it there any more: 404 or 410 (RFC 8030, section 7.3). */
  | { kind: 'gone' }
  /** Not just now. */
  | { kind: 'failed'; error: string }
  /** Refused, and again next time. */
  | { kind: 'refused'; error: string }

export interface PushOptions {
  urgency: 'normal' | 'high'
  /** How long the service keeps it for a phone that is off, s. */
  ttlS: number
  /** A later message of the same topic takes its place while it waits (RFC 8030, section 5.4). */
  topic: string
}

export interface PushService {
  send(
    phone: Pick<PushPhone, 'endpoint' | 'p256dh' | 'auth'>,
    message: string,
    options: PushOptions,
  ): Promise<PushAnswer>
  close(): void
}

interface PushServiceOptions {
  /** `mailto:` or https: whom a push service may write to (RFC 8292, section 2.1). */
  contact: string
  vapid: { publicKey: string; privateKey: string }
  /** The demo's own push service: trusted by its certificate, and by nothing else. */
  trap?: { origin: string; certificate: string }
}

/** Sends to the push services of the browsers' makers, and in the demo to its own. */
export function createPushService({ contact, vapid, trap }: PushServiceOptions): PushService {
  const outside = publicAgent()
  const inside = trap === undefined ? undefined : new Agent({ ca: trap.certificate, timeout: 10_000 })
  return {
    async send(phone, message, { urgency, ttlS, topic }) {
      const { origin, hostname } = new URL(phone.endpoint)
      const isTrap = inside !== undefined && origin === trap?.origin
      // A written address is not looked up, so it is judged here.
      const written = hostname.replace(/^\[|\]$/g, '')
      if (!isTrap && isIP(written) !== 0 && !isPublicAddress(written))
        return { kind: 'refused', error: 'not the address of a push service' }
      try {
        await webPush.sendNotification(
          { endpoint: phone.endpoint, keys: { p256dh: phone.p256dh, auth: phone.auth } },
          message,
          {
            vapidDetails: { subject: contact, ...vapid },
            TTL: ttlS,
            urgency,
            topic,
            timeout: 10_000,
            agent: isTrap ? inside : outside,
          },
        )
        return { kind: 'taken' }
      } catch (error) {
        return answerOf(error)
      }
    },
    close() {
      outside.destroy()
      inside?.destroy()
    },
  }
}

function answerOf(error: unknown): PushAnswer {
  // A key that nothing can be sealed to stays so: that phone is lost, and must not hold up the others.
  if (error instanceof Error && 'code' in error && String(error.code).startsWith('ERR_CRYPTO'))
    return { kind: 'gone' }
  if (!(error instanceof WebPushError))
    return { kind: 'failed', error: error instanceof Error ? error.message : String(error) }
  const { statusCode } = error
  if (statusCode === 404 || statusCode === 410) return { kind: 'gone' }
  const words = `the push service answered ${String(statusCode)}`
  // Too many (429) and a server's own trouble pass; anything else that is wrong stays wrong.
  const passes = statusCode === 429 || statusCode >= 500
  return passes ? { kind: 'failed', error: words } : { kind: 'refused', error: words }
}
