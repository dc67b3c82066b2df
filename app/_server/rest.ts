import 'server-only'
import type { Kysely } from 'kysely'
import { loadRestInputs } from '@/db/queries/rest-inputs'
import type { SiteMember } from '@/db/queries/members'
import type { PieceRecord } from '@/db/queries/pieces'
import { listRoomRecords } from '@/db/queries/rooms'
import type { Database } from '@/db/schema'
import { type CarryMaterial, woodAt } from '@/lib/carry/material'
import { startOfDayAt } from '@/lib/climate/days'
import { mcDoubtPct } from '@/lib/follow/doubt'
import { restOf } from '@/lib/seasoning/rest'
import type { RestView } from '@/lib/seasoning/rest-view'

/**
 * Where a resting piece stands, from its weights and its rooms.
 * @param material by `loadCarryMaterial`, with the piece in it; undefined comes back where it is not
 */
export async function restOfPiece(
  db: Kysely<Database>,
  member: SiteMember,
  piece: PieceRecord,
  material: CarryMaterial,
  now: Date,
): Promise<RestView | undefined> {
  const own = material.pieces.get(piece.id)
  if (own === undefined) return undefined
  const [inputs, rooms] = await Promise.all([
    loadRestInputs(db, member, piece.id, own, now),
    listRoomRecords(db, member.siteId),
  ])
  const wood = piece.woodKind === 'stabilised' ? null : woodAt(material, own, now.getTime())
  const keepRoom = rooms.find((room) => room.id === own.keepRoomId)
  return restOf({
    ...inputs,
    now: now.getTime(),
    timeZone: member.timeZone,
    units: member.unitSystem,
    stage: piece.stage,
    roughedAt:
      piece.roughedOn === null ? undefined : startOfDayAt(piece.roughedOn, member.timeZone).getTime(),
    readyByWeight: piece.isReadyByWeight,
    createdAt: piece.createdAt.getTime(),
    followed: wood === null ? undefined : { pct: wood.ringPct, doubtPct: mcDoubtPct(wood) },
    target: inputs.target && { ...inputs.target, room: keepRoom?.name ?? 'its keep room' },
  })
}
