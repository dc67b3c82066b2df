import type { Kysely } from 'kysely'
import { dayOfInstant, monthsBefore, startOfDayOf } from '@/lib/climate/days'
import { woodOfPiece } from '@/lib/carry/joint-defaults'
import {
  airsOf,
  type Followed,
  followHistory,
  followOn,
  HOUR_MS,
  type Measured,
  type RoomRecordOf,
  type Stay,
} from '@/lib/follow/record'
import { UNLEARNED_PACE } from '@/lib/follow/learned-pace'
import type { PieceFilter } from '@/lib/follow/wood-state'
import type { Database } from '../schema'
import { listMeasured } from './measured'
import {
  findAirKeys,
  findMoisture,
  findPaces,
  followedOf,
  keyOf,
  listRoomHours,
  type MoistureRow,
  type StoredMoisture,
  upsertMoisture,
} from './moisture'
import { type FactsRow, listOutings, listPieceFacts, listStays } from './piece-facts'
import { findRoomYears } from './room-figures'

const dayMs = 24 * HOUR_MS
/** For how long before its record a piece is taken to have been in its first room: longer for a blank's slow wood. */
export const beforeMs = (stage: FactsRow['facts']['stage']): number => (stage === 'box' ? 60 : 180) * dayMs
/** No piece remembers air from before this; the solid dense blank is the slowest. */
const memoryMs = 400 * dayMs

export interface FollowCounts {
  /** Carried on by the hours since. */
  carriedOn: number
  /** Made anew from their whole record, because it or the rooms' figures changed. */
  rebuilt: number
}

export interface Subject {
  row: FactsRow
  filter: PieceFilter
  stays: readonly Stay[]
  outAtMs: number | null
  measured: readonly Measured[]
  diffusionFactor: number
}

/** The stays up to a moment, as they were then. */
function staysUntil(stays: readonly Stay[], untilMs: number): unknown[] {
  return stays.flatMap((stay) =>
    stay.fromAt.getTime() >= untilMs
      ? []
      : [
          [
            stay.roomId,
            stay.fromAt.getTime(),
            stay.toAt === null || stay.toAt.getTime() > untilMs ? null : stay.toAt.getTime(),
            stay.cover,
          ],
        ],
  )
}

/** What a state up to a moment hangs on, besides the air. */
const pieceKeyAt = ({ filter, stays, measured, diffusionFactor }: Subject, untilMs: number): string =>
  keyOf([
    filter.ring.slowestPerM2,
    [...filter.ring.weights.open],
    filter.lid?.slowestPerM2 ?? null,
    staysUntil(stays, untilMs),
    measured.filter((one) => one.at < untilMs),
    diffusionFactor.toFixed(2),
  ])

const airKeyOf = (subject: Subject, keys: ReadonlyMap<number, string>, untilMs: number): string =>
  keyOf(
    [...new Set(subject.stays.filter((stay) => stay.fromAt.getTime() < untilMs).map((stay) => stay.roomId))]
      .toSorted((one, other) => one - other)
      .map((roomId) => [roomId, keys.get(roomId) ?? '']),
  )

/**
 * Brings the wood of pieces forward to the last whole hour: from where it was left, by the hours since; or from the start
 * of its record, where the record or the rooms' figures before that moment have changed.
 * @param pieceIds null for all pieces in use
 *
 * Run by the worker each minute for every site, and by whatever changes a piece's record.
 */
export async function followPieces(
  db: Kysely<Database>,
  site: { siteId: number; timeZone: string },
  pieceIds: readonly number[] | null,
  now: Date,
): Promise<FollowCounts> {
  const { siteId, timeZone } = site
  const untilMs = Math.floor(now.getTime() / HOUR_MS) * HOUR_MS
  const subjects = await listSubjects(db, siteId, pieceIds)
  if (subjects.length === 0) return { carriedOn: 0, rebuilt: 0 }
  const stored = await findMoisture(
    db,
    siteId,
    subjects.map(({ row }) => row.id),
  )
  // Keys are read before the hours: what arrives in between makes the key old, and the state is made anew next time.
  const keysAt = airKeysBy(db, siteId, timeZone)
  const keysNow = await keysAt(untilMs)
  const kept: { subject: Subject; followed: Followed }[] = []
  const anew: Subject[] = []
  for (const subject of subjects) {
    const before = stored.get(subject.row.id)
    const followed = before && (await stillGood(subject, before, untilMs, keysAt))
    if (followed === undefined) anew.push(subject)
    else if (followed !== 'as-is') kept.push({ subject, followed })
  }
  const rowOf = (subject: Subject, followed: Followed): MoistureRow => ({
    pieceId: subject.row.id,
    followed,
    pieceKey: pieceKeyAt(subject, untilMs),
    airKey: airKeyOf(subject, keysNow, untilMs),
  })
  const sinceMs = Math.min(
    untilMs,
    ...kept.map(({ followed }) => followed.atMs),
    ...anew.map((subject) => firstMs(subject, untilMs)),
  )
  const roomOf = await roomsOf(db, site, [...kept.map((one) => one.subject), ...anew], sinceMs, untilMs, now)
  const rows = [
    ...kept.map(({ subject, followed }) =>
      rowOf(
        subject,
        followOn(subject.filter, followed, {
          airs: airsOf(subject.stays, roomOf, followed.atMs, untilMs),
          untilMs,
          outAtMs: subject.outAtMs,
          diffusionFactor: subject.diffusionFactor,
        }),
      ),
    ),
    ...anew.flatMap((subject) => {
      const followed = followHistory({
        ...subject,
        roomOf,
        untilMs,
        beforeMs: beforeMs(subject.row.facts.stage),
      })
      return followed === undefined ? [] : [rowOf(subject, followed)]
    }),
  ]
  await upsertMoisture(db, siteId, rows)
  return { carriedOn: kept.length, rebuilt: rows.length - kept.length }
}

export async function listSubjects(
  db: Kysely<Database>,
  siteId: number,
  pieceIds: readonly number[] | null,
): Promise<Subject[]> {
  const facts = await listPieceFacts(db, siteId, pieceIds)
  const ids = facts.map((row) => row.id)
  const [stays, outings, measured, paces] = await Promise.all([
    listStays(db, siteId, ids),
    listOutings(db, siteId, ids),
    listMeasured(db, siteId, ids),
    findPaces(db, siteId),
  ])
  return facts.flatMap((row) => {
    const own = stays.get(row.id)
    if (own === undefined) return []
    return {
      row,
      filter: woodOfPiece(row.facts).filter,
      stays: own,
      outAtMs: outings.get(row.id)?.getTime() ?? null,
      measured: measured.get(row.id) ?? [],
      diffusionFactor: (paces.get(row.movementClass) ?? UNLEARNED_PACE).factor,
    }
  })
}

/** Air keys at a moment, read once for each: most pieces of a site were left at the same hour. */
function airKeysBy(db: Kysely<Database>, siteId: number, timeZone: string) {
  const read = new Map<number, Promise<Map<number, string>>>()
  return (atMs: number): Promise<Map<number, string>> => {
    const before = read.get(atMs)
    if (before !== undefined) return before
    const at = new Date(atMs)
    // An hour early: where a zone is off by half an hour, a day begins within one of the hours that are kept.
    const startsAt = new Date(startOfDayOf(at, timeZone).getTime() - HOUR_MS)
    const keys = findAirKeys(db, siteId, at, { on: dayOfInstant(at, timeZone), startsAt })
    read.set(atMs, keys)
    return keys
  }
}

/** The stored state if nothing that it was made from has changed; 'as-is' where it is at the wanted hour already. */
async function stillGood(
  subject: Subject,
  stored: StoredMoisture,
  untilMs: number,
  keysAt: (atMs: number) => Promise<Map<number, string>>,
): Promise<Followed | 'as-is' | undefined> {
  const atMs = stored.at.getTime()
  if (atMs > untilMs || stored.pieceKey !== pieceKeyAt(subject, atMs)) return undefined
  if (stored.airKey !== airKeyOf(subject, await keysAt(atMs), atMs)) return undefined
  // A measurement since then is told to the whole history, which corrects by it at its own moment.
  if (subject.measured.some((one) => one.at >= atMs && one.at < untilMs)) return undefined
  const followed = followedOf(subject.filter, stored)
  if (followed === undefined) return undefined
  const wentBefore = subject.outAtMs !== null && subject.outAtMs <= atMs
  if (wentBefore && followed.outAtMs !== subject.outAtMs) return undefined
  return atMs === untilMs ? 'as-is' : followed
}

export const firstMs = ({ stays, row }: Subject, untilMs: number): number =>
  Math.max(untilMs - memoryMs, (stays[0]?.fromAt.getTime() ?? untilMs) - beforeMs(row.facts.stage))

export async function roomsOf(
  db: Kysely<Database>,
  { siteId, timeZone }: { siteId: number; timeZone: string },
  subjects: readonly Subject[],
  sinceMs: number,
  untilMs: number,
  now: Date,
): Promise<RoomRecordOf> {
  const roomIds = new Set(subjects.flatMap(({ stays }) => stays.map((stay) => stay.roomId)))
  if (roomIds.size === 0) return () => undefined
  const todayOn = dayOfInstant(now, timeZone)
  const [hours, years] = await Promise.all([
    listRoomHours(db, siteId, roomIds, new Date(sinceMs - 3 * dayMs), new Date(untilMs)),
    findRoomYears(db, siteId, monthsBefore(todayOn, 12), todayOn),
  ])
  const none = new Map<number, { emcPct: number; temperatureC: number }>()
  return (roomId) => ({
    hours: hours.get(roomId) ?? none,
    emcPctMean: years.get(roomId)?.emcPctMean ?? null,
  })
}
