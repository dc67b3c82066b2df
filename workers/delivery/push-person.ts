import type { Kysely } from 'kysely'
import { beginTry, endTry, listDue, type TryOutcome } from '@/db/queries/deliveries'
import { listPhones, notePhoneGone, notePhoneSent, type PushPhone } from '@/db/queries/push-subscriptions'
import type { Database } from '@/db/schema'
import { byPress } from '@/lib/notices/mail'
import { pushesOneByOne, pushMessage } from '@/lib/notices/push'
import { type LinkSource, signedAnswers } from './answer-links'
import { hasRoom, type Message, messagesOf, withoutStale } from './groups'
import type { PushAnswer, PushService } from './push-service'

export interface PushRoute extends LinkSource {
  /** Undefined when there are no keys to sign with. */
  service: PushService | undefined
}

/**
 * Shows what is due on a person's phones. It counts as told when one of them takes it; a phone that is gone is asked no
 * more.
 * @throws when no phone took it and one may yet, so that the job queue tries again later
 */
export async function pushPerson(
  db: Kysely<Database>,
  route: PushRoute,
  userId: string,
  now: Date,
): Promise<number> {
  const due = await withoutStale(db, 'push', await listDue(db, userId, 'push', now), now)
  let sent = 0
  for (const message of messagesOf('push', due, pushesOneByOne)) {
    if (!message.isRepeat && !(await hasRoom(db, message, now))) continue
    await beginTry(db, message.group, message.messageId)
    const outcome = await tryPhones(db, route, message, now)
    await endTry(db, message.group, outcome, now)
    if (outcome.state === 'sent') sent += 1
    if (outcome.state === 'waiting') throw new Error(outcome.error)
  }
  return sent
}

async function tryPhones(
  db: Kysely<Database>,
  route: PushRoute,
  message: Message,
  now: Date,
): Promise<TryOutcome> {
  if (route.service === undefined)
    return { state: 'given-up', error: 'there are no keys to send to phones with' }
  const phones = (await listPhones(db, message.group.userId)).filter(({ goneAt }) => goneAt === null)
  if (phones.length === 0) return { state: 'given-up', error: 'no phone is signed up any more' }
  const text = JSON.stringify(messageOf(route, message, now))
  const urgency = byPress(message.due)[0]?.urgency ?? 'whenever'
  const answers = await Promise.all(
    phones.map(async (phone) => {
      const answer = await route.service?.send(phone, text, {
        urgency: urgency === 'now' ? 'high' : 'normal',
        ttlS: urgency === 'now' ? 12 * 3_600 : 72 * 3_600,
        topic: message.due[0]?.noticeCode ?? '',
      })
      if (answer?.kind === 'taken') await notePhoneSent(db, phone.id, now)
      if (answer?.kind === 'gone') await notePhoneGone(db, phone.id, now)
      return { phone, answer: answer ?? { kind: 'failed' as const, error: 'closed' } }
    }),
  )
  return outcomeOf(answers)
}

function outcomeOf(answers: readonly { phone: PushPhone; answer: PushAnswer }[]): TryOutcome {
  const words = answers.map(({ phone, answer }) => `${phone.device || 'a phone'}: ${wordsOf(answer)}`)
  const detail = words.join('; ')
  if (answers.some(({ answer }) => answer.kind === 'taken')) return { state: 'sent', detail }
  if (answers.some(({ answer }) => answer.kind === 'failed')) return { state: 'waiting', error: detail }
  return { state: 'given-up', error: detail }
}

const wordsOf = (answer: PushAnswer): string =>
  answer.kind === 'taken' ? 'taken' : answer.kind === 'gone' ? 'not signed up any more' : answer.error

function messageOf(route: PushRoute, { due }: Message, now: Date) {
  const [first] = due
  return pushMessage(
    due.map((one) => ({
      code: one.noticeCode,
      urgency: one.urgency,
      title: one.title,
      body: one.body,
      link: one.link,
      actions: signedAnswers(route, one, 'push')
        // Phones show two at most.
        .filter(({ answer }) => answer === 'in' || answer === 'going')
        .map(({ answer, words, token }) => ({ action: answer, title: words, token })),
    })),
    {
      siteCode: first?.siteCode ?? '',
      siteName: first?.siteName ?? '',
      // No sound in a workshop: whoever is at work may have both hands near a tool.
      silent: (first?.sessionUntil ?? now) > now,
    },
  )
}
