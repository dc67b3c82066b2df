import type { Kysely } from 'kysely'
import { assumedKeepRoom, loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { CarryRecord } from '@/db/queries/carries'
import {
  findEveningFacts,
  findYardKey,
  listReadingsIn,
  listRefusedCounts,
  listRestingPieces,
  listRoomDays,
  listRoomHourAirs,
  type RestingPiece,
} from '@/db/queries/notice-inputs'
import type { NoticeSite } from '@/db/queries/notice-state'
import { loadRestInputs } from '@/db/queries/rest-inputs'
import type { RoomRecord } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { jointOfPiece } from '@/lib/carry/joint-defaults'
import { type CarryMaterial, woodAt } from '@/lib/carry/material'
import { usedOf } from '@/lib/carry/used-at-end'
import { dayOfInstant, daysAfter, startOfDayAt } from '@/lib/climate/days'
import { mcDoubtPct } from '@/lib/follow/doubt'
import type { NoticeBlank, NoticeRoom, NoticeTub, RestingBox, Surroundings } from '@/lib/notices/surroundings'
import { restOf } from '@/lib/seasoning/rest'
import { isRuleOn, type RuleBook } from '@/lib/notices/rule-settings'
import { stripsOf } from './strips'

const hourMs = 3_600_000
/** A year and a season before it, so that a day can be held against the same weeks of the year before. */
const daysBack = 460
/** Cold iron is over after a clear day; a few more, for what began while nobody looked. */
const hoursBack = 7 * 24

type Costly = Pick<Surroundings, 'rooms' | 'boxes' | 'blanks' | 'strips'>

/** What is worked out once an hour for a site, or when its pieces or rooms change. One for a process. */
export type CostlyFacts = Map<number, { key: string; facts: Costly }>

/** Rooms, pieces at rest and the rest of the yard. */
export async function loadSurroundings(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  yard: {
    rooms: readonly RoomRecord[]
    carries: readonly CarryRecord[]
    material: CarryMaterial
    rules: RuleBook
  },
  costly: CostlyFacts,
): Promise<Surroundings> {
  const { siteId } = site
  const [key, refused, evening, tubs] = await Promise.all([
    findYardKey(db, siteId),
    listRefusedCounts(db, site, now),
    findEveningFacts(db, site, now),
    loadTubs(db, site, now, yard),
  ])
  const wantsStrips = isRuleOn(yard.rules, 'shop-unfit') || isRuleOn(yard.rules, 'good-hours')
  const hourKey = `${String(wantsStrips)} ${String(Math.floor(now.getTime() / hourMs))} ${dayOfInstant(now, site.timeZone)} ${key}`
  const known = costly.get(siteId)
  const facts =
    known?.key === hourKey ? known.facts : await loadCostly(db, site, now, yard.rooms, wantsStrips)
  costly.set(siteId, { key: hourKey, facts })
  return { ...facts, refused, evening, tubs }
}

async function loadCostly(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  rooms: readonly RoomRecord[],
  wantsStrips: boolean,
): Promise<Costly> {
  const { siteId, timeZone } = site
  const today = dayOfInstant(now, timeZone)
  const thisHour = new Date(Math.floor(now.getTime() / hourMs) * hourMs)
  const [pieces, days, hours] = await Promise.all([
    listRestingPieces(db, siteId),
    listRoomDays(db, site, daysAfter(today, -daysBack), today),
    listRoomHourAirs(db, siteId, new Date(thisHour.getTime() - hoursBack * hourMs), thisHour),
  ])
  const material = await loadCarryMaterial(
    db,
    site,
    pieces.map(({ id }) => id),
    wantsStrips ? rooms.filter(({ kind }) => kind === 'shop').map(({ id }) => id) : [],
    now,
  )
  const keepRooms = new Set([
    ...pieces.map(({ keepRoomId }) => keepRoomId),
    assumedKeepRoom(rooms)?.id ?? null,
  ])
  const restingRooms = new Set(pieces.filter(({ stage }) => stage !== 'box').map(({ roomId }) => roomId))
  return {
    rooms: rooms.map((room): NoticeRoom => ({
      code: room.code,
      name: room.name,
      kind: room.kind,
      keepsDryWork: room.keepsDryWork,
      isKeepRoom: keepRooms.has(room.id),
      hasRestingWood: restingRooms.has(room.id),
      days: days.get(room.id) ?? [],
      hours: hours.get(room.id) ?? [],
    })),
    boxes: pieces.flatMap((piece) => restingBox(piece, material, rooms) ?? []),
    blanks: await loadBlanks(db, site, now, pieces, material, rooms),
    strips: wantsStrips ? stripsOf(material, rooms, timeZone) : [],
  }
}

/** A finished box at rest whose lid can be worked out; what is out has its own rules. */
function restingBox(
  piece: RestingPiece,
  material: CarryMaterial,
  rooms: readonly RoomRecord[],
): RestingBox | undefined {
  const own = material.pieces.get(piece.id)
  const room = rooms.find(({ id }) => id === piece.roomId)
  if (own === undefined || room === undefined || piece.stage !== 'box' || piece.isOut || own.cut === null)
    return undefined
  if (piece.woodKind === 'wild' || piece.woodKind === 'stabilised' || own.facts.fitGrade === 'threaded')
    return undefined
  const joint = jointOfPiece(own.facts)
  const wood = woodAt(material, own, material.now.getTime())
  if (joint === undefined || wood === null) return undefined
  return {
    code: piece.code,
    number: piece.number,
    roomCode: room.code,
    roomName: room.name,
    used: usedOf(joint, wood, own.cut),
  }
}

async function loadBlanks(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  pieces: readonly RestingPiece[],
  material: CarryMaterial,
  rooms: readonly RoomRecord[],
): Promise<NoticeBlank[]> {
  const blanks: NoticeBlank[] = []
  for (const piece of pieces) {
    const own = material.pieces.get(piece.id)
    const room = rooms.find(({ id }) => id === piece.roomId)
    if (piece.stage === 'box' || own === undefined || room === undefined) continue
    const inputs = await loadRestInputs(db, site, piece.id, own, now)
    const wood = piece.woodKind === 'stabilised' ? null : woodAt(material, own, now.getTime())
    const rest = restOf({
      ...inputs,
      now: now.getTime(),
      timeZone: site.timeZone,
      units: 'metric',
      stage: piece.stage,
      roughedAt:
        piece.roughedOn === null ? undefined : startOfDayAt(piece.roughedOn, site.timeZone).getTime(),
      readyByWeight: piece.readyByWeight,
      createdAt: piece.createdAt.getTime(),
      followed: wood === null ? undefined : { pct: wood.ringPct, doubtPct: mcDoubtPct(wood) },
      target: inputs.target && {
        ...inputs.target,
        room: rooms.find(({ id }) => id === own.keepRoomId)?.name ?? 'its keep room',
      },
    })
    blanks.push({
      code: piece.code,
      number: piece.number,
      roomCode: room.code,
      seriesKey: rest.series.openedBy?.at ?? 'first',
      isReady: rest.state !== 'not-ready',
      isByWeightAlone: rest.state === 'ready-by-weight',
      weighingDueAt: new Date(rest.nextWeighing.at).getTime(),
    })
  }
  return blanks
}

/** Tubs with what their sensors said lately, beside the air of the shop and of the house. */
async function loadTubs(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  { rooms, carries, material }: Parameters<typeof loadSurroundings>[3],
): Promise<NoticeTub[]> {
  const tubs = rooms.filter(({ kind }) => kind === 'tub')
  if (tubs.length === 0) return []
  const isLoggedOut = carries.some(
    (carry) =>
      carry.state === 'out' &&
      carry.pieces.some((piece) => piece.cover === 'tub' && piece.outAt !== null && piece.backAt === null),
  )
  const ids = tubs.map(({ id }) => id)
  const [recent, usual] = await Promise.all([
    listReadingsIn(db, site.siteId, ids, new Date(now.getTime() - 1.25 * hourMs), now),
    listRoomHourAirs(
      db,
      site.siteId,
      new Date(now.getTime() - 3 * 24 * hourMs),
      new Date(now.getTime() - 2 * hourMs),
    ),
  ])
  const presentC = (kinds: readonly RoomRecord['kind'][]): number | null => {
    const room = rooms.find(({ id, kind }) => {
      const air = material.rooms.get(id)?.air
      return kinds.includes(kind) && air?.kind === 'fresh'
    })
    const air = room && material.rooms.get(room.id)?.air
    return air?.kind === 'fresh' ? air.temperatureC : null
  }
  return tubs.map((tub) => {
    const hours = usual.get(tub.id) ?? []
    return {
      roomCode: tub.code,
      roomName: tub.name,
      readings: recent.get(tub.id) ?? [],
      shopC: presentC(['shop']),
      houseC: presentC(['house', 'cupboard']),
      usualC:
        hours.length === 0
          ? null
          : hours.reduce((sum, { temperatureC }) => sum + temperatureC, 0) / hours.length,
      isLoggedOut,
    }
  })
}
