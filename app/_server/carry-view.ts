import 'server-only'
import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { CarryPieceRecord, CarryRecord } from '@/db/queries/carries'
import type { SiteMember } from '@/db/queries/members'
import { findPiecesById, type PieceRecord } from '@/db/queries/pieces'
import type { Database } from '@/db/schema'
import type { Carry, CarryPiece } from '@/lib/carry/carry'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { checkPiece } from '@/lib/carry/judge'
import type { CarryMaterial } from '@/lib/carry/material'
import { carryHeadline, worstOf } from '@/lib/carry/summary'
import { undoBringBackMs } from '@/lib/notices/policy'
import { pieceOutline, pieceTitle } from '@/lib/pieces/title'
import { hiddenCheck, viewerOf } from './piece-view'

const isOpen = (carry: CarryRecord): boolean => carry.state === 'planned' || carry.state === 'out'

/** Carries as a member sees them, each open one judged: a planned one as planned, one that is out from when it went. */
export async function viewCarries(
  db: Kysely<Database>,
  member: SiteMember,
  carries: readonly CarryRecord[],
  now: Date,
  loaded?: CarryMaterial,
): Promise<Carry[]> {
  const pieceIds = [...new Set(carries.flatMap((carry) => carry.pieces.map((piece) => piece.pieceId)))]
  const open = carries.filter(isOpen)
  const [pieces, material] = await Promise.all([
    findPiecesById(db, member.siteId, pieceIds, viewerOf(member)),
    loaded ?? loadCarryMaterial(db, member, pieceIdsOf(open), roomIdsOf(open), now),
  ])
  const byId = new Map(pieces.map((piece) => [piece.id, piece]))
  return carries.map((carry) => viewCarry(carry, byId, material, member, now))
}

export const pieceIdsOf = (carries: readonly CarryRecord[]): number[] => [
  ...new Set(carries.flatMap((carry) => carry.pieces.map((piece) => piece.pieceId))),
]
export const roomIdsOf = (carries: readonly CarryRecord[]): number[] => [
  ...new Set(carries.map((carry) => carry.toRoom.roomId)),
]

/** What the check says of one piece of a carry; null for one that is back. */
export function checkOf(
  material: CarryMaterial,
  carry: CarryRecord,
  piece: CarryPieceRecord,
): PieceCheck | null {
  if (!isOpen(carry) || piece.backAt !== null) return null
  const check = checkPiece(material, {
    pieceId: piece.pieceId,
    toRoomId: carry.toRoom.roomId,
    // A plan whose hour has passed is judged as if it went now: the past can't be gone into any more.
    startsAt: piece.outAt ?? (carry.plannedAt < material.now ? material.now : carry.plannedAt),
    stayMinutes: carry.stayMinutes,
    cover: piece.cover,
  })
  return check ?? null
}

/** Past its early edge; where there is no edge to go by, past the stay that was planned. */
export function isOverdue(check: PieceCheck | null, outAt: Date, stayMinutes: number, now: Date): boolean {
  // A blank follows the air over weeks: nobody has to run for it.
  if (check?.kind === 'words' && check.reason === 'blank') return false
  if (check?.kind === 'verdict') return check.earlyAt !== null && new Date(check.earlyAt) <= now
  return outAt.getTime() + stayMinutes * 60_000 <= now.getTime()
}

function viewPiece(
  carry: CarryRecord,
  part: CarryPieceRecord,
  piece: PieceRecord,
  material: CarryMaterial,
  now: Date,
): CarryPiece {
  const check = checkOf(material, carry, part)
  const isOut = part.outAt !== null && part.backAt === null
  return {
    id: piece.code,
    number: piece.number,
    title: pieceTitle(piece),
    outline: piece.isHidden ? 'round' : pieceOutline(piece),
    cover: part.cover,
    fromRoom: part.fromRoom === null ? null : { id: part.fromRoom.code, name: part.fromRoom.name },
    outAt: part.outAt?.toISOString() ?? null,
    backAt: part.backAt?.toISOString() ?? null,
    check: check !== null && piece.isHidden ? hiddenCheck(check) : check,
    isOverdue: isOut && part.outAt !== null && isOverdue(check, part.outAt, carry.stayMinutes, now),
  }
}

function viewCarry(
  carry: CarryRecord,
  pieces: ReadonlyMap<number, PieceRecord>,
  material: CarryMaterial,
  member: SiteMember,
  now: Date,
): Carry {
  const parts = carry.pieces.flatMap((part) => {
    const piece = pieces.get(part.pieceId)
    return piece === undefined ? [] : [viewPiece(carry, part, piece, material, now)]
  })
  const { toRoom } = carry
  const lastBackAt = Math.max(0, ...carry.pieces.map((piece) => piece.backAt?.getTime() ?? 0))
  const plannedAt = carry.plannedAt.toISOString()
  return {
    id: carry.code,
    state: carry.state,
    toRoom: { id: toRoom.code, name: toRoom.name, mark: toRoom.mark },
    cover: carry.cover,
    plannedAt,
    stayMinutes: carry.stayMinutes,
    startedAt: carry.startedAt?.toISOString() ?? null,
    endedAt: carry.endedAt?.toISOString() ?? null,
    againstAdvice: carry.againstAdvice,
    note: carry.note,
    by: carry.createdByName,
    pieces: parts,
    headline: carryHeadline(
      {
        state: carry.state,
        roomName: toRoom.name,
        plannedAt,
        stayMinutes: carry.stayMinutes,
        pieces: parts.map((part) => ({ ...part, isOut: part.outAt !== null && part.backAt === null })),
      },
      { timeZone: member.timeZone, now },
    ),
    worst: worstOf(parts.flatMap((part) => part.check ?? [])),
    version: carry.version,
    canUndo: lastBackAt > now.getTime() - undoBringBackMs,
  }
}
