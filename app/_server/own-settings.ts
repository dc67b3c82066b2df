import 'server-only'
import type { Kysely } from 'kysely'
import { releaseSession } from '@/db/queries/deliveries'
import { notifySite } from '@/db/queries/live'
import type { SiteMember } from '@/db/queries/members'
import {
  findSettings,
  listPeopleSettings,
  lockSettings,
  type PersonSettings,
  saveSettings,
  type SettingsChange,
  type SettingsRecord,
} from '@/db/queries/own-settings'
import { listPhones } from '@/db/queries/push-subscriptions'
import { inTransaction } from '@/db/queries/transaction'
import type { Database } from '@/db/schema'
import {
  type Hearing,
  type OwnSettings,
  type OwnSettingsChange,
  sessionMostMs,
} from '@/lib/notices/own-settings'
import { ok } from '@/lib/result'
import { serverConfig } from './env'
import { fail, failField, type Outcome } from './problem'

function settingsView(record: SettingsRecord, people: readonly PersonSettings[], now: Date): OwnSettings {
  const { away, sessionUntil } = record
  const cover = people.find(({ userId }) => userId === away?.coverUserId)
  return {
    ...record,
    away:
      away === null || away.until <= now
        ? null
        : {
            from: away.from.toISOString(),
            until: away.until.toISOString(),
            coverId: cover?.memberId ?? null,
          },
    sessionUntil: sessionUntil === null || sessionUntil <= now ? null : sessionUntil.toISOString(),
  }
}

export async function getOwnSettings(
  db: Kysely<Database>,
  member: SiteMember,
  now: Date,
): Promise<OwnSettings> {
  const people = await listPeopleSettings(db, member.siteId)
  return settingsView(await findSettings(db, member.siteId, member.userId), people, now)
}

/** How a member hears of things, with what they choose from. */
export async function getHearing(db: Kysely<Database>, member: SiteMember, now: Date): Promise<Hearing> {
  const people = await listPeopleSettings(db, member.siteId)
  const [settings, phones] = await Promise.all([
    findSettings(db, member.siteId, member.userId),
    listPhones(db, member.userId),
  ])
  return {
    settings: settingsView(settings, people, now),
    phones: phones.map((phone) => ({
      endpoint: phone.endpoint,
      device: phone.device,
      createdAt: phone.createdAt.toISOString(),
      lastSentAt: phone.lastSentAt?.toISOString() ?? null,
      isGone: phone.goneAt !== null,
    })),
    covers: people
      .filter((one) => mayCover(one, member))
      .map(({ memberId, name }) => ({ id: memberId, name })),
    houseList: people
      .filter(({ onHouseList, role }) => onHouseList && role !== 'onlooker')
      .map(({ name, userId }) => ({ name, isYou: userId === member.userId })),
    pushKey: serverConfig().vapid?.publicKey ?? null,
    siteId: member.siteCode,
  }
}

const mayCover = (person: PersonSettings, member: SiteMember): boolean =>
  person.userId !== member.userId && person.role !== 'onlooker'

/** Keeps what a member chose. A session that ends sooner lets go of what was held for it. */
export async function changeOwnSettings(
  db: Kysely<Database>,
  member: SiteMember,
  version: number,
  change: OwnSettingsChange,
  now: Date,
): Promise<Outcome<OwnSettings>> {
  return inTransaction(db, async (trx) => {
    await lockSettings(trx, member.siteId, member.userId)
    const before = await findSettings(trx, member.siteId, member.userId)
    const people = await listPeopleSettings(trx, member.siteId)
    if (before.version !== version)
      return fail('changed-meanwhile', 'You changed this elsewhere meanwhile. Look at it again.', {
        current: settingsView(before, people, now),
        version: before.version,
      })
    const stored = storedChange(change, people, member, now)
    if (!stored.ok) return stored
    await saveSettings(trx, member.siteId, member.userId, stored.value)
    const { sessionUntil } = before
    const endsSooner =
      sessionUntil !== null &&
      sessionUntil > now &&
      stored.value.sessionUntil !== undefined &&
      (stored.value.sessionUntil === null || stored.value.sessionUntil < sessionUntil)
    if (endsSooner) await releaseSession(trx, member.siteId, member.userId, sessionUntil, now)
    // Who is told what changes with it.
    await notifySite(trx, member.siteId, 'site')
    return ok(settingsView(await findSettings(trx, member.siteId, member.userId), people, now))
  })
}

function storedChange(
  { away, sessionUntil, ...rest }: OwnSettingsChange,
  people: readonly PersonSettings[],
  member: SiteMember,
  now: Date,
): Outcome<SettingsChange> {
  const until = sessionUntil === undefined || sessionUntil === null ? sessionUntil : new Date(sessionUntil)
  if (until instanceof Date && until.getTime() - now.getTime() > sessionMostMs)
    return failField('not-possible', 'sessionUntil', '12 hours ahead at most')
  if (away === undefined || away === null) return ok({ ...rest, away, sessionUntil: until })
  const cover = people.find((one) => one.memberId === away.coverId && mayCover(one, member))
  if (away.coverId !== null && cover === undefined)
    return failField('not-possible', 'away.coverId', 'not somebody here who can cover')
  return ok({
    ...rest,
    sessionUntil: until,
    away: { from: new Date(away.from), until: new Date(away.until), coverUserId: cover?.userId ?? null },
  })
}
