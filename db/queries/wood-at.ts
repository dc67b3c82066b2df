import type { Kysely } from 'kysely'
import { airsOf, followHistory, type RoomRecordOf } from '@/lib/follow/record'
import type { AirFrom, WoodState } from '@/lib/follow/wood-state'
import type { Database } from '../schema'
import { beforeMs, firstMs, listSubjects, roomsOf, type Subject } from './follow-pieces'

type Site = { siteId: number; timeZone: string }

function woodOf(subject: Subject, roomOf: RoomRecordOf, at: Date): WoodState | undefined {
  const [first] = subject.stays
  if (first === undefined || at < first.fromAt) return undefined
  return followHistory({
    ...subject,
    roomOf,
    untilMs: at.getTime(),
    outAtMs: null,
    beforeMs: beforeMs(subject.row.facts.stage),
  })?.state
}

/**
 * A piece's wood at a past moment, followed there from the start of its record: for entries, never for a page view.
 * @returns undefined for a moment before its record, or where nothing is known of the air that it was in
 */
export async function findWoodAt(
  db: Kysely<Database>,
  site: Site,
  pieceId: number,
  at: Date,
  now: Date,
): Promise<WoodState | undefined> {
  const [subject] = await listSubjects(db, site.siteId, [pieceId])
  if (subject === undefined) return undefined
  const roomOf = await roomsOf(db, site, [subject], firstMs(subject, at.getTime()), at.getTime(), now)
  return woodOf(subject, roomOf, at)
}

export interface StayOnRecord {
  start: WoodState
  /** From its start on, at least one. */
  airs: AirFrom[]
}

/** A stay that is over, as it was: the piece's wood when it began, and the air that it met. */
export async function findStayOnRecord(
  db: Kysely<Database>,
  site: Site,
  pieceId: number,
  stay: { from: Date; until: Date },
  now: Date,
): Promise<StayOnRecord | undefined> {
  const [subject] = await listSubjects(db, site.siteId, [pieceId])
  if (subject === undefined) return undefined
  const untilMs = stay.until.getTime()
  const roomOf = await roomsOf(db, site, [subject], firstMs(subject, untilMs), untilMs, now)
  const start = woodOf(subject, roomOf, stay.from)
  const airs = airsOf(subject.stays, roomOf, stay.from.getTime(), untilMs)
  return start === undefined || airs.length === 0 ? undefined : { start, airs }
}
