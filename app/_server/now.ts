import 'server-only'
import type { Kysely } from 'kysely'
import { type CarryRecord, listCarriesBackSince, listOpenCarries } from '@/db/queries/carries'
import { assumedKeepRoom, loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { SiteMember } from '@/db/queries/members'
import { listStandingPieces, type PieceRecord } from '@/db/queries/pieces'
import { loadRuleBook } from '@/db/queries/rules'
import { listSensorRecords, type SensorRecord } from '@/db/queries/sensors'
import { countPieces } from '@/db/queries/site-counts'
import { listWhateverCandidates } from '@/db/queries/whatever'
import type { Database } from '@/db/schema'
import { type Carry, hasLid } from '@/lib/carry/carry'
import { type CarryMaterial, woodAt } from '@/lib/carry/material'
import { isTooFarAhead } from '@/lib/carry/repeat'
import { hourStrip } from '@/lib/forecast/hour-strip'
import { undoBringBackMs } from '@/lib/notices/policy'
import type { RuleBook } from '@/lib/notices/rule-settings'
import { listed } from '@/lib/notices/wording'
import { nowHeadline } from '@/lib/now/headline'
import { needs, type SensorForNeeds } from '@/lib/now/needs'
import type { NowView, RuleRoom } from '@/lib/now/now-view'
import { ruleBrackets, ruleShelf, type ShelfPiece } from '@/lib/now/rule'
import { pieceOutline, pieceTitle } from '@/lib/pieces/title'
import { settledTo } from '@/lib/rooms/air'
import { sensorClock, sensorState } from '@/lib/sensors/state'
import { may } from '@/lib/sites/permissions'
import { isWhatever, pieceIdsOf, roomIdsOf, viewCarries } from './carry-view'
import { viewerOf } from './piece-view'
import { isLockUpOpen } from './lock-up'
import { isOnlooker, type SeenRoom, seenRooms } from './rooms'

/** Everything that the page Now shows. What a role may not see is not loaded for it. */
export async function getNow(db: Kysely<Database>, member: SiteMember, now: Date): Promise<NowView> {
  const { siteId } = member
  const seesCarries = may(member.role, 'carries:see')
  const [rooms, records, back, sensors, rules, pieces, pieceCount] = await Promise.all([
    seenRooms(db, member, now),
    seesCarries ? listNearCarries(db, siteId, now) : [],
    seesCarries ? listCarriesBackSince(db, siteId, new Date(now.getTime() - undoBringBackMs)) : [],
    may(member.role, 'sensors:see') ? listSensorRecords(db, siteId) : [],
    loadRuleBook(db, siteId),
    listStandingPieces(db, siteId, viewerOf(member)),
    countPieces(db, siteId, isOnlooker(member)),
  ])
  const candidates = records.some((carry) => isWhatever(carry, now))
    ? await listWhateverCandidates(db, siteId)
    : []
  const pieceIds = new Set([...pieceIdsOf(records), ...pieces.map((piece) => piece.id), ...candidates])
  const shop = may(member.role, 'rooms:forecast') ? shopOf(rooms) : undefined
  const toRoomIds = [...roomIdsOf(records), ...(shop === undefined ? [] : [shop.record.id])]
  const material = await loadCarryMaterial(db, member, [...pieceIds], toRoomIds, now)
  const carries = await viewCarries(db, member, records, now, material)
  const out = byUrgency(carries.filter((carry) => carry.state === 'out'))
  const planned = carries.filter((carry) => carry.state === 'planned')
  const ruleRooms = roomsOfRule(rooms)
  const clock = { timeZone: member.timeZone, now }
  const devices = sensors.filter((sensor) => sensor.kind === 'device').map((one) => signsOf(one, now, rules))
  const silent = devices.filter((sensor) => sensor.state === 'silent')
  return {
    at: now.toISOString(),
    headline: nowHeadline({ out, planned, rooms: ruleRooms, ...clock }),
    out,
    planned,
    rule: {
      rooms: ruleRooms,
      brackets: ruleBrackets([...out, ...planned], now),
      // Where a piece's wood stands tells which rooms it was in and when: not for onlookers.
      shelf: seesCarries ? ruleShelf(pieces.flatMap((piece) => shelfPiece(piece, material) ?? [])) : [],
    },
    strip: shop === undefined ? null : stripOf(member, shop, rooms, material, judgesOf(planned, pieces)),
    justBack: (await viewCarries(db, member, back, now, material)).flatMap((carry) =>
      justBack(carry, back, now),
    ),
    needs: needs({ sensors: devices, rooms: rooms.map((room) => room.view) }, clock),
    isLockUp: seesCarries && (await isLockUpOpen(db, member, now)),
    silent: silent.map((sensor) => ({
      id: sensor.id,
      name: sensor.name,
      roomName: sensor.roomName,
      since: sensor.heardAt?.toISOString() ?? null,
    })),
    counts: { rooms: rooms.length, sensors: devices.length, pieces: pieceCount },
    ...settledOverall(rooms, now),
  }
}

/** What is out or planned, but for days of a repeat that nobody has to think of yet. */
async function listNearCarries(db: Kysely<Database>, siteId: number, now: Date): Promise<CarryRecord[]> {
  const open = await listOpenCarries(db, siteId)
  return open.filter((carry) => !isTooFarAhead({ ...carry, isRepeated: carry.repeat !== null }, now))
}

/** The room that work is done in: the first shop that has been read. */
const shopOf = (rooms: readonly SeenRoom[]): SeenRoom | undefined =>
  rooms.find(({ record, view }) => record.kind === 'shop' && view.air.kind !== 'never')

/**
 * The boxes that are down to go: they are the ones chosen, so they judge the hours. One that should stay where it is
 * would call every hour unfit and hide what the others can do, so it is left out and named.
 */
function judgesOf(
  planned: readonly Carry[],
  pieces: readonly PieceRecord[],
): { ids: number[]; leftOut: string[] } {
  const going = planned.flatMap((carry) => carry.pieces)
  const staying = new Set(
    going.filter(({ check }) => check?.kind === 'verdict' && check.verdict === 'leave').map(({ id }) => id),
  )
  const seen = pieces.filter(({ code, isHidden }) => going.some(({ id }) => id === code) && !isHidden)
  const judges = seen.filter(({ code }) => !staying.has(code))
  return judges.length === 0
    ? { ids: seen.map(({ id }) => id), leftOut: [] }
    : {
        ids: judges.map(({ id }) => id),
        leftOut: seen.filter(({ code }) => staying.has(code)).map(({ number }) => number),
      }
}

function stripOf(
  { timeZone }: SiteMember,
  { record, view }: SeenRoom,
  rooms: readonly SeenRoom[],
  material: CarryMaterial,
  judges: ReturnType<typeof judgesOf>,
): NowView['strip'] {
  const keepRoomId = assumedKeepRoom(rooms.map((room) => room.record))?.id ?? null
  const hours = hourStrip(material, { roomId: record.id, pieceIds: judges.ids, keepRoomId, timeZone })
  const { leftOut } = judges
  const without =
    leftOut.length === 0 || hours.cells.length === 0
      ? ''
      : ` Without ${listed(leftOut)}, which should stay ${leftOut.length === 1 ? 'where it is' : 'where they are'}.`
  return { room: { id: view.id, name: view.name }, hours: { ...hours, note: `${hours.note}${without}` } }
}

const edgeOf = (carry: Carry): number =>
  Math.min(
    ...carry.pieces.map(({ check, backAt }) =>
      backAt === null && check?.kind === 'verdict' && check.earlyAt !== null
        ? new Date(check.earlyAt).getTime()
        : Infinity,
    ),
  )

/** Overdue first, then by the moment at which the first piece has to be in. */
function byUrgency(carries: readonly Carry[]): Carry[] {
  const late = (carry: Carry) => carry.pieces.some((piece) => piece.isOverdue)
  return carries.toSorted((a, b) => Number(late(b)) - Number(late(a)) || edgeOf(a) - edgeOf(b) || 0)
}

function roomsOfRule(rooms: readonly SeenRoom[]): RuleRoom[] {
  const focus = assumedKeepRoom(rooms.map((room) => room.record))
  return rooms.map(({ record, view }) => ({
    id: view.id,
    name: view.name,
    kind: view.kind,
    mark: view.mark,
    air: view.air,
    isFocus: record.id === focus?.id,
    year:
      view.year === null || record.id !== focus?.id
        ? null
        : { emcPctLow: view.year.emcPctLow, emcPctHigh: view.year.emcPctHigh, days: view.year.days },
  }))
}

/** Of what a blank was before its record nothing is known (it may have been green): told once that counts for less. */
const unknownShareMost = 0.25

/** Pieces whose wood can be placed: plain boxes, and blanks that have been followed for long enough. */
function shelfPiece(piece: PieceRecord, material: CarryMaterial): ShelfPiece | undefined {
  const own = material.pieces.get(piece.id)
  if (own === undefined || piece.isHidden || piece.woodKind !== 'plain') return undefined
  const wood = woodAt(material, own, material.now.getTime())
  if (wood === null || (piece.stage !== 'box' && wood.unknownShare > unknownShareMost)) return undefined
  return {
    number: piece.number,
    title: pieceTitle(piece),
    outline: pieceOutline(piece),
    isOut: piece.isOut,
    mcPct: wood.ringPct,
  }
}

function signsOf(sensor: SensorRecord, now: Date, rules: RuleBook): SensorForNeeds {
  return {
    id: sensor.code,
    name: sensor.name,
    roomName: sensor.room?.name ?? null,
    state: sensorState(sensor, now, rules),
    heardAt: sensor.heardAt,
    createdAt: sensor.createdAt,
    clock: sensorClock(sensor, now),
  }
}

function justBack(
  carry: Carry,
  records: Awaited<ReturnType<typeof listCarriesBackSince>>,
  now: Date,
): NowView['justBack'] {
  const record = records.find((one) => one.code === carry.id)
  const roomOfBack = new Map(record?.pieces.map((piece) => [piece.backAt?.toISOString(), piece.backRoomName]))
  return carry.pieces.flatMap((piece) =>
    piece.backAt !== null && new Date(piece.backAt).getTime() > now.getTime() - undoBringBackMs
      ? {
          carryId: carry.id,
          pieceId: piece.id,
          number: piece.number,
          roomName: roomOfBack.get(piece.backAt) ?? '',
          at: piece.backAt,
          hasLid: hasLid(piece),
          isAskSkipped: piece.isAskSkipped,
        }
      : [],
  )
}

function settledOverall(
  rooms: readonly SeenRoom[],
  now: Date,
): { completeTo: string | null; age: number | null } {
  // A room that fell silent does not hold the others back; its own page says so.
  const fresh = rooms.filter((room) => room.view.air.kind === 'fresh')
  const settled = (fresh.length > 0 ? fresh : rooms).map((room) =>
    settledTo(room.readings, room.record.kind, now),
  )
  const completeTo = settled
    .flatMap((one) => one.completeTo ?? [])
    .toSorted()
    .at(0)
  const ages = settled.flatMap((one) => one.age ?? [])
  return { completeTo: completeTo ?? null, age: ages.length === 0 ? null : Math.min(...ages) }
}
