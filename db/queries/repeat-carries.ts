import type { Kysely } from 'kysely'
import { comingOccurrences, fallsOn, occurrenceAt } from '@/lib/carry/repeat'
import type { Database } from '../schema'
import { insertCarry, replaceCarryPieces, updateCarry } from './carry-changes'
import { listRunningRepeats, lockRepeat, type RepeatRecord } from './carry-repeats'
import { notifySite } from './live'
import { inTransaction } from './transaction'

interface Site {
  siteId: number
  timeZone: string
}

/**
 * Makes the carries of a site's repeats for the coming days, each once: one that is there already, called off or put off
 * or not, stays as it is.
 * @returns how many were made
 */
export async function makeComingCarries(db: Kysely<Database>, site: Site, now: Date): Promise<number> {
  let made = 0
  for (const { code } of await listRunningRepeats(db, site.siteId)) {
    made += await inTransaction(db, (trx) => makeCarriesOf(trx, site, code, now))
  }
  return made
}

/** As `makeComingCarries`, of one repeat. In a transaction: its row is locked, so that two workers make each once. */
export async function makeCarriesOf(
  db: Kysely<Database>,
  { siteId, timeZone }: Site,
  repeatCode: string,
  now: Date,
): Promise<number> {
  const repeat = await lockRepeat(db, siteId, repeatCode)
  if (repeat === undefined || repeat.endedAt !== null || repeat.pausedAt !== null) return 0
  const pieces = piecesThatGo(repeat)
  if (!repeat.takesWhatever && pieces.length === 0) return 0
  const coming = comingOccurrences(repeat, timeZone, now)
  const there = await daysThere(db, siteId, repeat.id)
  const missing = coming.filter(({ on }) => !there.has(on))
  for (const { on, at } of missing) {
    const carry = await insertCarry(
      db,
      siteId,
      {
        toRoomId: repeat.toRoom.roomId,
        cover: repeat.cover,
        plannedAt: at,
        stayMinutes: repeat.stayMinutes,
        note: repeat.note,
        userId: repeat.createdBy,
        takesWhatever: repeat.takesWhatever,
        repeat: { id: repeat.id, on },
        pieces,
      },
      now,
    )
    await notifySite(db, siteId, 'carry', carry.code)
  }
  return missing.length
}

/** What lives where it would go to has no need of a carry. */
const piecesThatGo = (repeat: RepeatRecord): { pieceId: number; fromRoomId: number | null }[] =>
  repeat.pieces
    .filter(({ roomId }) => roomId !== repeat.toRoom.roomId)
    .map(({ pieceId, roomId }) => ({ pieceId, fromRoomId: roomId }))

async function daysThere(db: Kysely<Database>, siteId: number, repeatId: number): Promise<Set<string>> {
  const rows = await db
    .selectFrom('carry')
    .where('site_id', '=', siteId)
    .where('repeat_id', '=', repeatId)
    .where('repeat_on', 'is not', null)
    .select('repeat_on')
    .execute()
  return new Set(rows.flatMap((row) => row.repeat_on ?? []))
}

/** Calls off what is still to come of a repeat that is paused or ended, at that very instant, by which it is found again. */
export async function callOffComing(
  db: Kysely<Database>,
  siteId: number,
  repeatId: number,
  now: Date,
): Promise<void> {
  await db
    .updateTable('carry')
    .set((eb) => ({ state: 'called-off', ended_at: now, version: eb('version', '+', 1) }))
    .where('site_id', '=', siteId)
    .where('repeat_id', '=', repeatId)
    .where('state', '=', 'planned')
    .where('planned_at', '>', now)
    .execute()
}

/** Takes that back: what was called off at that instant and has not passed meanwhile is planned again. */
export async function planAgain(
  db: Kysely<Database>,
  siteId: number,
  repeatId: number,
  calledOffAt: Date,
  now: Date,
): Promise<void> {
  await db
    .updateTable('carry')
    .set((eb) => ({ state: 'planned', ended_at: null, version: eb('version', '+', 1) }))
    .where('site_id', '=', siteId)
    .where('repeat_id', '=', repeatId)
    .where('state', '=', 'called-off')
    .where('ended_at', '=', calledOffAt)
    .where('planned_at', '>', now)
    .execute()
}

/**
 * Brings the carries that are still to come into line with a repeat that was changed: its hour (where nobody has put one
 * off), stay, cover and pieces. Those of a day that it no longer has go.
 */
export async function adjustComing(
  db: Kysely<Database>,
  { siteId, timeZone }: Site,
  repeat: RepeatRecord,
  now: Date,
): Promise<void> {
  const rows = await db
    .selectFrom('carry')
    .where('site_id', '=', siteId)
    .where('repeat_id', '=', repeat.id)
    .where('state', '=', 'planned')
    .where('planned_at', '>', now)
    .select(['id', 'repeat_on', 'put_off_from'])
    .forUpdate()
    .execute()
  for (const { id, repeat_on: on, put_off_from: putOffFrom } of rows) {
    const at = on === null ? undefined : occurrenceAt(on, repeat, timeZone)
    if (on === null || !fallsOn(on, repeat) || at === undefined || (putOffFrom === null && at <= now)) {
      await db.deleteFrom('carry_piece').where('site_id', '=', siteId).where('carry_id', '=', id).execute()
      await db.deleteFrom('carry').where('site_id', '=', siteId).where('id', '=', id).execute()
      continue
    }
    await replaceCarryPieces(db, siteId, id, repeat.cover, piecesThatGo(repeat))
    await updateCarry(db, siteId, id, {
      cover: repeat.cover,
      stayMinutes: repeat.stayMinutes,
      takesWhatever: repeat.takesWhatever,
      ...(putOffFrom === null ? { plannedAt: at } : {}),
    })
  }
}
