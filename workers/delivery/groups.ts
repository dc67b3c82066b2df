import type { Kysely } from 'kysely'
import {
  type DeliveryGroup,
  type DueDelivery,
  endTry,
  holdBack,
  letGo,
  listSentAt,
} from '@/db/queries/deliveries'
import type { Database } from '@/db/schema'
import type { Channel } from '@/lib/notices/inputs'
import { byPress, cappedUntil, fateOf } from '@/lib/notices/mail'

/** Deliveries that go as one message. */
export interface Message {
  group: DeliveryGroup
  messageId: string
  due: DueDelivery[]
  isRepeat: boolean
}

const groupOf = (channel: Channel, due: readonly DueDelivery[]): DeliveryGroup => ({
  siteId: due[0]?.siteId ?? 0,
  userId: due[0]?.userId ?? '',
  channel,
  noticeIds: due.map(({ noticeId }) => noticeId),
})

/** Sorts out what is not to go any more, and says so. @returns the rest */
export async function withoutStale(
  db: Kysely<Database>,
  channel: Channel,
  all: readonly DueDelivery[],
  now: Date,
): Promise<DueDelivery[]> {
  const kept: DueDelivery[] = []
  for (const one of all) {
    const fate = fateOf({ ...one, dueAt: one.dueAt.getTime() }, now.getTime())
    if (fate.kind === 'send') kept.push(one)
    else if (fate.kind === 'let-go') await letGo(db, groupOf(channel, [one]), fate.why)
    else await endTry(db, groupOf(channel, [one]), { state: 'given-up', error: fate.why }, now)
  }
  return kept
}

/**
 * The messages that what is due makes: one for each site, or as many as were begun before and did not arrive, each of
 * those with what it held then.
 * @param oneByOneMost up to so many new ones of a site go each by itself
 */
export function messagesOf(channel: Channel, due: readonly DueDelivery[], oneByOneMost: number): Message[] {
  const keyOf = (one: DueDelivery) =>
    one.tries > 0 ? `${String(one.siteId)} ${one.messageId}` : String(one.siteId)
  const byKey = new Map<string, DueDelivery[]>()
  for (const one of due) {
    const group = byKey.get(keyOf(one))
    if (group === undefined) byKey.set(keyOf(one), [one])
    else group.push(one)
  }
  const groups = [...byKey.values()]
  return groups
    .flatMap((group) => {
      const isNew = group[0]?.tries === 0
      return isNew && group.length <= oneByOneMost ? group.map((one) => [one]) : [group]
    })
    .map((group) => ({
      group: groupOf(channel, group),
      messageId: group[0]?.messageId ?? '',
      due: group,
      isRepeat: (group[0]?.tries ?? 0) > 0,
    }))
}

const hourMs = 3_600_000

/** Whether there is room for one more message within the hour. If there is not, it is held back until there is. */
export async function hasRoom(db: Kysely<Database>, message: Message, now: Date): Promise<boolean> {
  const sentAt = await listSentAt(db, message.group, new Date(now.getTime() - hourMs))
  const urgency = byPress(message.due)[0]?.urgency ?? 'whenever'
  const until = cappedUntil(
    sentAt.map((at) => at.getTime()),
    urgency,
    now.getTime(),
  )
  if (until === null) return true
  await holdBack(db, message.group, new Date(until))
  return false
}
