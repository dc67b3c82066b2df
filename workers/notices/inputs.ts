import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import { type CarryRecord, listOpenCarries } from '@/db/queries/carries'
import { findBatteries } from '@/db/queries/notice-inputs'
import { listNoticePeople, type NoticeSite } from '@/db/queries/notice-state'
import { listHangingSensors, listRoomRecords } from '@/db/queries/rooms'
import { loadRuleBook } from '@/db/queries/rules'
import { listWhateverCandidates } from '@/db/queries/whatever'
import type { Database } from '@/db/schema'
import { carryCheck } from '@/lib/carry/check'
import { carryCheckInput, type CarryMaterial } from '@/lib/carry/material'
import { isTooFarAhead } from '@/lib/carry/repeat'
import { whateverJudged } from '@/lib/carry/whatever'
import type { NoticeCarry, NoticeInputs, NoticePiece, NoticeSensor } from '@/lib/notices/inputs'
import { freshForMs } from '@/lib/notices/policy'
import { silentAfterOf } from '@/lib/notices/rule-settings'
import { isKeepingRoom } from '@/lib/rooms/room'
import { type CostlyFacts, loadSurroundings } from './surroundings'

/**
 * How things stand at a site, judged by the same loader and the same check as its pages.
 * @param costly what was worked out this hour already; kept by the caller from one look to the next
 */
export async function loadNoticeInputs(
  db: Kysely<Database>,
  site: NoticeSite,
  now: Date,
  costly: CostlyFacts = new Map(),
): Promise<NoticeInputs> {
  const { siteId } = site
  const carries = (await listOpenCarries(db, siteId)).filter(
    (carry) => !isTooFarAhead({ ...carry, isRepeated: carry.repeat !== null }, now),
  )
  const candidates = carries.some(isWhatever) ? await listWhateverCandidates(db, siteId) : []
  const pieceIds = [
    ...new Set([...candidates, ...carries.flatMap((carry) => carry.pieces.map((piece) => piece.pieceId))]),
  ]
  const roomIds = carries.map((carry) => carry.toRoom.roomId)
  const [material, rules, batteries, people, hanging, rooms] = await Promise.all([
    loadCarryMaterial(db, site, pieceIds, roomIds, now),
    loadRuleBook(db, siteId),
    findBatteries(db, siteId),
    listNoticePeople(db, siteId),
    listHangingSensors(db, siteId),
    listRoomRecords(db, siteId),
  ])
  const open = carries.map((carry) => ({
    roomId: carry.toRoom.roomId,
    carry: noticeCarry(material, carry, candidates),
  }))

  const sensors = hanging
    .filter((sensor) => sensor.kind === 'device')
    .map((sensor): NoticeSensor => {
      const room = rooms.find(({ id }) => id === sensor.roomId)
      const lastHeardAt = sensor.heardAt?.getTime() ?? null
      const freshMs = freshForMs({
        isKeepingRoom: isKeepingRoom(room?.kind ?? 'shop'),
        isTyped: false,
        usualGapS: sensor.usualGapS,
      })
      // Where another sensor of the room still speaks, its air is known.
      const isAirKnown = material.rooms.get(sensor.roomId)?.air.kind === 'fresh'
      const piecesOut = open
        .filter(({ roomId, carry }) => roomId === sensor.roomId && carry.state === 'out')
        .flatMap(({ carry }) => carry.pieces.map(({ number }) => number))
      return {
        code: sensor.code,
        name: sensor.name,
        roomName: room?.name ?? null,
        lastHeardAt,
        freshUntil: lastHeardAt === null ? null : lastHeardAt + freshMs,
        silentFrom: lastHeardAt === null ? null : lastHeardAt + silentAfterOf(rules, sensor.usualGapS),
        piecesOutThere: isAirKnown ? [] : piecesOut,
        batteryPct: batteries.get(sensor.sensorId) ?? null,
      }
    })
  const surroundings = await loadSurroundings(db, site, now, { rooms, carries, material, rules }, costly)
  return { site, carries: open.map(({ carry }) => carry), sensors, people, rules, surroundings }
}

const isWhatever = (carry: CarryRecord): boolean => carry.takesWhatever && carry.state === 'planned'

/** The boxes that a plan without named pieces is judged by, as if they were to go. */
function whateverParts(material: CarryMaterial, carry: CarryRecord, candidates: readonly number[]) {
  const { pieces } = whateverJudged(material, candidates, {
    toRoomId: carry.toRoom.roomId,
    startsAt: carry.plannedAt,
    stayMinutes: carry.stayMinutes,
    cover: carry.cover,
  })
  return pieces.map(({ pieceId }) => ({ pieceId, cover: carry.cover, outAt: null, backAt: null }))
}

function noticeCarry(
  material: CarryMaterial,
  carry: CarryRecord,
  candidates: readonly number[],
): NoticeCarry {
  const air = material.rooms.get(carry.toRoom.roomId)?.air
  const isOut = carry.state === 'out'
  const takesWhatever = isWhatever(carry)
  const parts = takesWhatever ? whateverParts(material, carry, candidates) : carry.pieces
  const pieces = parts
    .filter((piece) => !isOut || (piece.outAt !== null && piece.backAt === null))
    .flatMap((piece): NoticePiece[] => {
      const known = material.pieces.get(piece.pieceId)
      if (known === undefined) return []
      const input = carryCheckInput(material, {
        pieceId: piece.pieceId,
        toRoomId: carry.toRoom.roomId,
        startsAt: piece.outAt ?? carry.plannedAt,
        stayMinutes: carry.stayMinutes,
        cover: piece.cover,
      })
      return [
        {
          code: known.code,
          number: known.facts.number,
          stage: known.facts.stage,
          outAt: piece.outAt?.getTime() ?? null,
          check: input === undefined ? null : carryCheck(input),
        },
      ]
    })
  return {
    code: carry.code,
    state: isOut ? 'out' : 'planned',
    plannedAt: carry.plannedAt.getTime(),
    stayMinutes: carry.stayMinutes,
    roomName: carry.toRoom.name,
    madeBy: carry.createdBy,
    airAt: air === undefined || air.kind === 'never' ? null : new Date(air.at).getTime(),
    takesWhatever,
    pieces,
  }
}
