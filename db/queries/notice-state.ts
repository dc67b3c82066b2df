import { type Kysely, sql, type Transaction } from 'kysely'
import { z } from 'zod'
import type { Episode, NoticeAnswer, NoticePerson, NoticeState, RoutedNotice } from '@/lib/notices/inputs'
import { roleSchema } from '@/lib/sites/permissions'
import { queueDelivery } from '../jobs'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'
import { notifySite } from './live'
import { listPeopleSettings } from './own-settings'

const severitySchema = z.enum(['fine', 'keep-short', 'unknown', 'leave'])
const holdSchema = z.object({
  held: severitySchema,
  told: severitySchema,
  other: severitySchema.nullable(),
  otherSince: z.number(),
  otherReadings: z.number(),
  otherAirAt: z.number().nullable(),
})

/** What deciding needs to know of a site itself. */
export interface NoticeSite {
  siteId: number
  siteCode: string
  timeZone: string
  quietFrom: string
  quietTo: string
  lockUpAt: string
}

export async function listNoticeSites(db: Kysely<Database>): Promise<NoticeSite[]> {
  const rows = await db
    .selectFrom('site')
    .select(['id', 'code', 'time_zone', 'quiet_from', 'quiet_to', 'lock_up_at'])
    .orderBy('id')
    .execute()
  return rows.map((row) => ({
    siteId: row.id,
    siteCode: row.code,
    timeZone: row.time_zone,
    // A time of day comes as 22:00:00.
    quietFrom: row.quiet_from.slice(0, 5),
    quietTo: row.quiet_to.slice(0, 5),
    lockUpAt: row.lock_up_at.slice(0, 5),
  }))
}

/** Keys older than this belong to occasions that are long past. */
const rememberMs = 8 * 24 * 3_600_000
/** Longer than any rule waits before it tells of the same again, but for what is told once a season. */
const rememberEpisodesMs = 100 * 24 * 3_600_000
/** An answer counts for what is out, which is days at most. */
const answersMs = 3 * 24 * 3_600_000
const answerSchema = z.enum(['in', 'going', 'cant', 'later', 'nothing'])

/**
 * Takes the site for one decision until the end of the transaction. False: somebody else is at it, who sees the same.
 * The unique key of a notice would keep it from being told twice all the same; this saves the work.
 */
export async function takeSiteForNotices(trx: Transaction<Database>, siteId: number): Promise<boolean> {
  const { rows } = await sql<{ taken: boolean }>`
    select pg_try_advisory_xact_lock(hashtext('lidfast notices'), ${siteId}) as taken`.execute(trx)
  if (rows[0]?.taken !== true) return false
  // Held before anything else is: a site that is being deleted waits for us, or we find it gone, and neither for ever.
  const site = await sql`select 1 from site where id = ${siteId} for key share`.execute(trx)
  return site.rows.length > 0
}

export async function loadNoticeState(db: Kysely<Database>, siteId: number, now: Date): Promise<NoticeState> {
  const told = await db
    .selectFrom('notice')
    .where('site_id', '=', siteId)
    .where('at', '>', new Date(now.getTime() - rememberMs))
    .select('key')
    .execute()
  const episodes = await db
    .selectFrom('episode')
    .where('site_id', '=', siteId)
    .where((eb) =>
      eb.or([
        eb('state', '<>', 'over'),
        eb('ended_at', '>', new Date(now.getTime() - rememberEpisodesMs)),
        // Occasions that are told of once for good, however long ago.
        eb('rule', '=', 'blank-ready'),
      ]),
    )
    .select(['rule', 'subject', 'key', 'state', 'began_at', 'told_at', 'ended_at', 'data'])
    .orderBy('began_at')
    .orderBy('id')
    .execute()
  return {
    told: new Set(told.map(({ key }) => key)),
    holds: new Map(
      episodes.flatMap(({ rule, subject, key, state, data }) => {
        const hold =
          rule === 'planned-carry' && state !== 'over' ? holdSchema.safeParse(data.hold) : undefined
        return hold?.success === true ? [[`${subject} ${key}`, hold.data] as const] : []
      }),
    ),
    known: episodes.map((row) => ({
      rule: row.rule,
      subject: row.subject,
      key: row.key,
      isOpen: row.state !== 'over',
      beganAt: row.began_at.getTime(),
      toldAt: row.told_at?.getTime() ?? null,
      endedAt: row.ended_at?.getTime() ?? null,
    })),
    answers: await listAnswers(db, siteId, new Date(now.getTime() - answersMs)),
  }
}

/** What was answered to notices since a moment, oldest first. */
async function listAnswers(db: Kysely<Database>, siteId: number, since: Date): Promise<NoticeAnswer[]> {
  const rows = await db
    .selectFrom('notice_answer as answer')
    .innerJoin('notice', (join) =>
      join.onRef('notice.site_id', '=', 'answer.site_id').onRef('notice.id', '=', 'answer.notice_id'),
    )
    .innerJoin('episode', (join) =>
      join.onRef('episode.site_id', '=', 'notice.site_id').onRef('episode.id', '=', 'notice.episode_id'),
    )
    .where('answer.site_id', '=', siteId)
    .where('answer.at', '>', since)
    .select([
      'episode.rule',
      'episode.subject',
      'episode.key',
      'answer.user_id',
      'answer.answer',
      'answer.at',
      'answer.until',
    ])
    .orderBy('answer.id')
    .execute()
  return rows.map((row) => ({
    rule: row.rule,
    subject: row.subject,
    episodeKey: row.key,
    userId: row.user_id,
    answer: answerSchema.parse(row.answer),
    at: row.at.getTime(),
    until: row.until?.getTime() ?? null,
  }))
}

export async function listNoticePeople(db: Kysely<Database>, siteId: number): Promise<NoticePerson[]> {
  const people = await listPeopleSettings(db, siteId)
  return people.map(({ userId, role, mailOn, onHouseList, wishes }) => ({
    userId,
    role: roleSchema.parse(role),
    mailOn,
    onHouseList,
    wishes,
  }))
}

/**
 * Stores what holds now: new episodes begin, known ones keep their beginning, and the others are over.
 * @returns the number of each episode that holds, by `episodeName`
 */
export async function storeEpisodes(
  trx: Transaction<Database>,
  siteId: number,
  now: Date,
  episodes: Episode[],
): Promise<Map<string, number>> {
  const open = await trx
    .selectFrom('episode')
    .where('site_id', '=', siteId)
    .where('state', '<>', 'over')
    .select(['id', 'rule', 'subject', 'key'])
    .execute()
  // What has ended by its record ended then, not now; what began and ended unseen only opens in the history.
  const lasting = episodes.filter(({ state }) => state !== 'over')
  const holding = new Set(lasting.map(episodeName))
  const over = open.filter((one) => !holding.has(episodeName(one))).map(({ id }) => id)
  if (over.length > 0) {
    await trx
      .updateTable('episode')
      .set({ state: 'over', ended_at: now })
      .where('site_id', '=', siteId)
      .where('id', 'in', over)
      .execute()
  }
  const ids = new Map(open.map((one) => [episodeName(one), one.id]))
  for (const episode of episodes) if (episode.state === 'over') await storeHistory(trx, siteId, episode)
  for (const episode of lasting) {
    const id = ids.get(episodeName(episode))
    if (id === undefined) ids.set(episodeName(episode), await beginEpisode(trx, siteId, now, episode))
    else await goOnWithEpisode(trx, siteId, now, id, episode)
  }
  return ids
}

const dataOf = (episode: Episode): string =>
  JSON.stringify(episode.hold === undefined ? {} : { hold: episode.hold })

async function goOnWithEpisode(
  trx: Transaction<Database>,
  siteId: number,
  now: Date,
  id: number,
  episode: Episode,
): Promise<void> {
  const tells = episode.state === 'telling'
  await trx
    .updateTable('episode')
    .set((eb) => ({
      // An acknowledged episode stays so until it is over.
      state: tells
        ? eb.case().when('state', '=', 'pending').then('telling').else(eb.ref('state')).end()
        : eb.ref('state'),
      told_at: tells ? eb.fn.coalesce('told_at', sql<Date>`${now}::timestamptz`) : eb.ref('told_at'),
      data: dataOf(episode),
    }))
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute()
}

/** An episode whose end is known by its record: a new one for the history, or one that is over since. */
async function storeHistory(trx: Transaction<Database>, siteId: number, episode: Episode): Promise<void> {
  await trx
    .insertInto('episode')
    .values({
      site_id: siteId,
      id: await takeIds(trx, siteId, 'episode'),
      rule: episode.rule,
      subject: episode.subject,
      key: episode.key,
      state: 'over',
      began_at: new Date(episode.beganAt),
      told_at: null,
      ended_at: new Date(episode.endedAt ?? episode.beganAt),
      data: dataOf(episode),
    })
    .onConflict((clash) =>
      clash
        .columns(['site_id', 'rule', 'subject', 'key'])
        .doUpdateSet((eb) => ({ ended_at: eb.ref('excluded.ended_at') }))
        .where('episode.state', '=', 'over'),
    )
    .execute()
}

/** An episode of the same name that was thought over has come back, with its old beginning. */
async function beginEpisode(
  trx: Transaction<Database>,
  siteId: number,
  now: Date,
  episode: Episode,
): Promise<number> {
  const row = await trx
    .insertInto('episode')
    .values({
      site_id: siteId,
      id: await takeIds(trx, siteId, 'episode'),
      rule: episode.rule,
      subject: episode.subject,
      key: episode.key,
      state: episode.state,
      began_at: new Date(episode.beganAt),
      told_at: episode.state === 'telling' ? now : null,
      data: dataOf(episode),
    })
    .onConflict((clash) =>
      clash
        .columns(['site_id', 'rule', 'subject', 'key'])
        .doUpdateSet((eb) => ({ state: eb.ref('excluded.state'), ended_at: null })),
    )
    .returning('id')
    .executeTakeFirstOrThrow()
  return row.id
}

/**
 * Stores notices that were not told before, with the deliveries they lead to and the jobs that send them, all or nothing.
 * @returns how many were new
 */
export async function storeNotices(
  trx: Transaction<Database>,
  siteId: number,
  now: Date,
  notices: RoutedNotice[],
  episodeIds: ReadonlyMap<string, number>,
  messageIdOf: (noticeCode: string, userId: string) => string,
): Promise<number> {
  let stored = 0
  for (const notice of notices) {
    const code = newCode()
    const row = await trx
      .insertInto('notice')
      .values({
        site_id: siteId,
        id: await takeIds(trx, siteId, 'notice'),
        code,
        episode_id: episodeIds.get(episodeName(notice.episode)) ?? null,
        key: notice.key,
        rule: notice.rule,
        urgency: notice.urgency,
        mark: notice.mark,
        title: notice.title,
        body: notice.body,
        link: notice.link,
        carry_id: await findIdByCode(trx, 'carry', siteId, notice.carryCode),
        piece_id: await findIdByCode(trx, 'piece', siteId, notice.pieceCode),
        sensor_id: await findIdByCode(trx, 'sensor', siteId, notice.sensorCode),
        room_id: await findIdByCode(trx, 'room', siteId, notice.roomCode),
        at: now,
      })
      .onConflict((clash) => clash.columns(['site_id', 'key']).doNothing())
      .returning('id')
      .executeTakeFirst()
    if (row === undefined) continue
    stored += 1
    for (const { userId, channel, holdUntil } of notice.deliveries) {
      const runAt = holdUntil === null ? null : new Date(holdUntil)
      await trx
        .insertInto('delivery')
        .values({
          site_id: siteId,
          notice_id: row.id,
          user_id: userId,
          channel,
          message_id: messageIdOf(code, userId),
          state: runAt === null ? 'waiting' : 'held',
          hold_until: runAt,
        })
        .execute()
      await queueDelivery(trx, userId, channel, runAt)
    }
    await notifySite(trx, siteId, 'notice', code)
  }
  return stored
}

async function findIdByCode(
  trx: Transaction<Database>,
  table: 'carry' | 'piece' | 'sensor' | 'room',
  siteId: number,
  code: string | undefined,
): Promise<number | null> {
  if (code === undefined) return null
  const row = await trx
    .selectFrom(table)
    .where('site_id', '=', siteId)
    .where('code', '=', code)
    .select('id')
    .executeTakeFirst()
  return row?.id ?? null
}

const episodeName = (of: { rule: string; subject: string; key: string }): string =>
  `${of.rule} ${of.subject} ${of.key}`
