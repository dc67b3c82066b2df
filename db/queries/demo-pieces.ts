import type { Transaction } from 'kysely'
import type { Mark, Rule } from '@/lib/notices/notice'
import type { Cover, NewPiece, PlaceCover } from '@/lib/pieces/piece'
import type { Database } from '../schema'
import { newCode, takeIds } from './counters'

/** The demo's pieces, carries and notices, each with a past. */

type PieceColumns = Omit<NewPiece, 'roomId' | 'keepRoomId' | 'fittedRoomId'>

export interface DemoPieceRow extends PieceColumns {
  keepRoomId: number | null
  fittedRoomId: number | null
  fittedAt: Date | null
  /** What its wood was at when the joint was cut, as far as the record goes back. */
  fitMcPct: number | null
  ownerUserId: string
  createdAt: Date
  places: readonly DemoPlace[]
}

/** One stay in a room; the last one lasts until now. */
export interface DemoPlace {
  roomId: number
  fromAt: Date
  cover: PlaceCover
  carryId?: number
  movedBy: string | null
}

export async function insertDemoPiece(
  trx: Transaction<Database>,
  siteId: number,
  piece: DemoPieceRow,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(trx, siteId, 'piece')
  const code = newCode()
  await trx
    .insertInto('piece')
    .values({
      site_id: siteId,
      id,
      code,
      number: piece.number,
      stage: piece.stage,
      wood: piece.wood,
      wood_kind: piece.woodKind,
      grain: piece.grain,
      spigot_on: piece.spigotOn,
      lid_form: piece.lidForm,
      joint_diameter_mm: piece.jointDiameterMm,
      wall_mm: piece.wallMm,
      spigot_mm: piece.spigotMm,
      lid_mm: piece.lidMm,
      body_wall_mm: piece.bodyWallMm,
      lid_wall_mm: piece.lidWallMm,
      blank_diameter_mm: piece.blankDiameterMm,
      ends_sealed: piece.endsSealed,
      roughed_on: piece.roughedOn,
      fit_grade: piece.fitGrade,
      clearance_mm: piece.clearanceMm,
      allowance_mm: piece.allowanceMm,
      finish: piece.finish,
      keep_room_id: piece.keepRoomId,
      fitted_room_id: piece.fittedRoomId,
      fitted_on: piece.fittedOn,
      fitted_at: piece.fittedAt,
      fit_mc_pct: piece.fitMcPct,
      note: piece.note,
      owner_user_id: piece.ownerUserId,
      is_private: piece.isPrivate,
      is_shared: piece.isShared,
      created_at: piece.createdAt,
    })
    .execute()
  await insertDemoPlaces(trx, siteId, id, piece.places)
  return { id, code }
}

export type DemoJoint = Pick<NewPiece, 'jointDiameterMm' | 'wallMm' | 'fitGrade' | 'allowanceMm'>

/** Settles how fine a joint is, once it is known what the air makes of it. */
export async function updateDemoJoint(
  trx: Transaction<Database>,
  siteId: number,
  pieceId: number,
  joint: DemoJoint,
): Promise<void> {
  await trx
    .updateTable('piece')
    .set({
      joint_diameter_mm: joint.jointDiameterMm,
      wall_mm: joint.wallMm,
      fit_grade: joint.fitGrade,
      allowance_mm: joint.allowanceMm,
    })
    .where('site_id', '=', siteId)
    .where('id', '=', pieceId)
    .execute()
}

async function insertDemoPlaces(
  trx: Transaction<Database>,
  siteId: number,
  pieceId: number,
  places: readonly DemoPlace[],
): Promise<void> {
  if (places.length === 0) return
  await trx
    .insertInto('piece_place')
    .values(
      places.map(({ roomId, fromAt, cover, carryId, movedBy }, index) => ({
        site_id: siteId,
        piece_id: pieceId,
        from_at: fromAt,
        to_at: places[index + 1]?.fromAt ?? null,
        room_id: roomId,
        cover,
        carry_id: carryId ?? null,
        moved_by: movedBy,
      })),
    )
    .execute()
}

export interface DemoCarryRow {
  state: 'planned' | 'out' | 'back' | 'called-off'
  toRoomId: number
  cover: Cover
  plannedAt: Date
  stayMinutes: number
  startedAt: Date | null
  endedAt: Date | null
  againstAdvice: boolean
  note: string
  createdBy: string
  createdAt: Date
}

export async function insertDemoCarry(
  trx: Transaction<Database>,
  siteId: number,
  carry: DemoCarryRow,
): Promise<{ id: number; code: string }> {
  const id = await takeIds(trx, siteId, 'carry')
  const code = newCode()
  await trx
    .insertInto('carry')
    .values({
      site_id: siteId,
      id,
      code,
      state: carry.state,
      to_room_id: carry.toRoomId,
      cover: carry.cover,
      planned_at: carry.plannedAt,
      stay_minutes: carry.stayMinutes,
      started_at: carry.startedAt,
      ended_at: carry.endedAt,
      against_advice: carry.againstAdvice,
      note: carry.note,
      created_by: carry.createdBy,
      created_at: carry.createdAt,
    })
    .execute()
  return { id, code }
}

export async function insertDemoCarryPiece(
  trx: Transaction<Database>,
  siteId: number,
  row: {
    carryId: number
    pieceId: number
    fromRoomId: number
    cover: Cover
    outAt: Date | null
    backAt: Date | null
  },
): Promise<void> {
  await trx
    .insertInto('carry_piece')
    .values({
      site_id: siteId,
      carry_id: row.carryId,
      piece_id: row.pieceId,
      from_room_id: row.fromRoomId,
      cover: row.cover,
      out_at: row.outAt,
      back_at: row.backAt,
      back_room_id: row.backAt === null ? null : row.fromRoomId,
    })
    .execute()
}

export interface DemoNotice {
  rule: Rule
  urgency: 'now' | 'soon' | 'whenever'
  mark: Mark
  title: string
  body: string
  link: string
  at: Date
  carryId?: number
  pieceId?: number
  sensorId?: number
  acknowledged?: { at: Date; userId: string }
  /** Who has seen it, and who got it by mail. */
  seenBy: readonly string[]
  mailedTo: readonly string[]
}

export async function insertDemoNotice(
  trx: Transaction<Database>,
  siteId: number,
  notice: DemoNotice,
): Promise<void> {
  const id = await takeIds(trx, siteId, 'notice')
  const code = newCode()
  await trx
    .insertInto('notice')
    .values({
      site_id: siteId,
      id,
      code,
      episode_id: null,
      key: `demo/${code}`,
      rule: notice.rule,
      urgency: notice.urgency,
      mark: notice.mark,
      title: notice.title,
      body: notice.body,
      link: notice.link,
      carry_id: notice.carryId ?? null,
      piece_id: notice.pieceId ?? null,
      sensor_id: notice.sensorId ?? null,
      room_id: null,
      at: notice.at,
      acknowledged_at: notice.acknowledged?.at ?? null,
      acknowledged_by: notice.acknowledged?.userId ?? null,
    })
    .execute()
  for (const userId of notice.seenBy)
    await trx
      .insertInto('notice_seen')
      .values({ site_id: siteId, notice_id: id, user_id: userId, seen_at: notice.at })
      .execute()
  for (const userId of notice.mailedTo)
    await trx
      .insertInto('delivery')
      .values({
        site_id: siteId,
        notice_id: id,
        user_id: userId,
        channel: 'mail',
        message_id: `<demo-${code}-${userId}@example.org>`,
        state: 'sent',
        hold_until: null,
        tries: 1,
        sent_at: notice.at,
        last_error: null,
      })
      .execute()
}
