import 'server-only'
import type { Kysely } from 'kysely'
import { listOpenCarries } from '@/db/queries/carries'
import { assumedKeepRoom, loadCarryMaterial } from '@/db/queries/carry-inputs'
import { doorTokenHash, findOpenDoor, type OpenDoor, touchDoor } from '@/db/queries/door-links'
import type { SiteMember } from '@/db/queries/members'
import { listHangingSensors, listRoomRecords } from '@/db/queries/rooms'
import { listWhateverCandidates } from '@/db/queries/whatever'
import type { Database } from '@/db/schema'
import type { DoorView } from '@/lib/door/door'
import { doorPieces, nextPlanSentence } from '@/lib/door/door-pieces'
import { gapWords } from '@/lib/door/gap-words'
import { hourStrip } from '@/lib/forecast/hour-strip'
import { ok } from '@/lib/result'
import { roomAir, settledTo } from '@/lib/rooms/air'
import { pieceIdsOf, roomIdsOf, viewCarries } from './carry-view'
import { notThere, type Outcome } from './problem'

/** A screen sees what a helper sees of carries, and nothing that is private to somebody. */
const screenOf = ({ siteId, site }: OpenDoor): SiteMember => ({
  siteId,
  siteCode: site.id,
  organizationId: '',
  userId: '',
  role: 'hand',
  timeZone: site.timeZone,
  unitSystem: site.unitSystem,
  site,
})

/** What a screen by a door shows: what is out, the hours of its room, the gap to the house, what is planned next. */
export async function getDoorView(
  db: Kysely<Database>,
  token: string,
  now: Date,
): Promise<Outcome<DoorView>> {
  const open = await findOpenDoor(db, doorTokenHash(token))
  if (open === undefined) return notThere()
  const { siteId, door } = open
  const screen = screenOf(open)
  const [records, sensors, rooms, boxes] = await Promise.all([
    listOpenCarries(db, siteId),
    listHangingSensors(db, siteId),
    listRoomRecords(db, siteId),
    listWhateverCandidates(db, siteId),
    touchDoor(db, siteId, door.id, now),
  ])
  const pieceIds = [...new Set([...pieceIdsOf(records), ...boxes])]
  const roomIds = [...roomIdsOf(records), door.room.roomId]
  const material = await loadCarryMaterial(db, screen, pieceIds, roomIds, now)
  const carries = await viewCarries(db, screen, records, now, material)
  const kindOf = (roomId: number) => rooms.find((room) => room.id === roomId)?.kind ?? 'store'
  const readingsIn = (roomId: number) =>
    sensors.filter((sensor) => sensor.roomId === roomId).flatMap((sensor) => sensor.last ?? [])
  const airOf = (roomId: number) => roomAir(readingsIn(roomId), kindOf(roomId), now)
  const air = airOf(door.room.roomId)
  const keep = assumedKeepRoom(rooms)
  const keepAir = keep === undefined ? undefined : airOf(keep.id)
  const clock = { timeZone: screen.timeZone, now }
  return ok({
    at: now.toISOString(),
    timeZone: screen.timeZone,
    room: { name: door.room.name, mark: door.room.mark },
    heard: air.kind === 'never' ? null : { at: air.at, isFresh: air.kind === 'fresh' },
    out: doorPieces(carries, clock),
    strip: hourStrip(material, {
      roomId: door.room.roomId,
      // What is down to go judges the hours; with nothing down, a typical box.
      pieceIds: pieceIdsOf(records.filter(({ state }) => state === 'planned')),
      keepRoomId: keep?.id ?? null,
      timeZone: screen.timeZone,
    }),
    gap:
      keep === undefined || keep.id === door.room.roomId || keepAir?.kind !== 'fresh' || air.kind !== 'fresh'
        ? ''
        : gapWords({ name: keep.name, emcPct: keepAir.emcPct }, { name: door.room.name, emcPct: air.emcPct }),
    next: nextPlanSentence(carries, clock),
    ...settledTo(readingsIn(door.room.roomId), kindOf(door.room.roomId), now),
  })
}
