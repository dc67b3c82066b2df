import 'server-only'
import type { Kysely } from 'kysely'
import { loadCarryMaterial } from '@/db/queries/carry-inputs'
import type { CarryPieceRecord, CarryRecord } from '@/db/queries/carries'
import type { SiteMember } from '@/db/queries/members'
import { listWhateverCandidates } from '@/db/queries/whatever'
import { findPiecesById, type PieceRecord } from '@/db/queries/pieces'
import type { Database } from '@/db/schema'
import type { Carry, CarryPiece } from '@/lib/carry/carry'
import type { PieceCheck } from '@/lib/carry/carry-check'
import { checkPiece } from '@/lib/carry/judge'
import type { CarryMaterial } from '@/lib/carry/material'
import { betterHourOfPlan } from '@/lib/carry/put-off'
import { isTooFarAhead, repeatWords } from '@/lib/carry/repeat'
import { carryHeadline, worstOf } from '@/lib/carry/summary'
import { type WhateverJudged, whateverJudged, whateverWords } from '@/lib/carry/whatever'
import { undoBringBackMs, undoPutOffMs } from '@/lib/notices/policy'
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
  const open = carries.filter(isOpen)
  const candidates = open.some((carry) => isWhatever(carry, now))
    ? await listWhateverCandidates(db, member.siteId)
    : []
  const pieceIds = [...new Set([...pieceIdsOf(carries), ...candidates])]
  const [pieces, material] = await Promise.all([
    findPiecesById(db, member.siteId, pieceIds, viewerOf(member)),
    loaded ?? loadCarryMaterial(db, member, [...pieceIdsOf(open), ...candidates], roomIdsOf(open), now),
  ])
  const byId = new Map(pieces.map((piece) => [piece.id, piece]))
  return carries.map((carry) => {
    const whatever = isWhatever(carry, now) ? judgeWhatever(carry, material, candidates, byId) : undefined
    return viewCarry(carry, byId, material, member, now, whatever)
  })
}

/** A plan without named pieces that is near enough to be judged. */
export const isWhatever = (carry: CarryRecord, now: Date): boolean =>
  carry.takesWhatever &&
  carry.state === 'planned' &&
  !isTooFarAhead({ ...carry, isRepeated: carry.repeat !== null }, now)

interface SeenWhatever extends WhateverJudged {
  parts: { part: CarryPieceRecord; check: PieceCheck }[]
}

function judgeWhatever(
  carry: CarryRecord,
  material: CarryMaterial,
  candidates: readonly number[],
  pieces: ReadonlyMap<number, PieceRecord>,
): SeenWhatever {
  const judged = whateverJudged(
    material,
    candidates.filter((id) => pieces.has(id)),
    {
      toRoomId: carry.toRoom.roomId,
      startsAt: startOf(carry, material.now),
      stayMinutes: carry.stayMinutes,
      cover: carry.cover,
    },
  )
  const parts = judged.pieces.map(({ pieceId, check }) => {
    const room = pieces.get(pieceId)?.room ?? null
    const { cover } = carry
    const rest = { outAt: null, backAt: null, backRoomName: null, isAskSkipped: false }
    return { part: { pieceId, cover, fromRoom: room, ...rest }, check }
  })
  return { ...judged, parts }
}

/** A plan whose hour has passed is judged as if it went now: the past can't be gone into any more. */
const startOf = (carry: CarryRecord, now: Date): Date => (carry.plannedAt < now ? now : carry.plannedAt)

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
  if (isTooFarAhead({ ...carry, isRepeated: carry.repeat !== null }, material.now)) return null
  const check = checkPiece(material, {
    pieceId: piece.pieceId,
    toRoomId: carry.toRoom.roomId,
    startsAt: piece.outAt ?? startOf(carry, material.now),
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
  check: PieceCheck | null,
  now: Date,
): CarryPiece {
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
    isAskSkipped: part.isAskSkipped,
  }
}

/** A plan that is not fine as it stands may be put off: to where the forecast sees better. */
function betterAt(
  carry: CarryRecord,
  judged: readonly { part: CarryPieceRecord; check: PieceCheck | null }[],
  material: CarryMaterial,
): Date | undefined {
  if (carry.state !== 'planned') return undefined
  const isPoor = judged.some(({ check }) => check?.kind === 'verdict' && check.verdict !== 'fine')
  if (!isPoor) return undefined
  const asked = {
    pieceIds: judged.map(({ part }) => part.pieceId),
    toRoomId: carry.toRoom.roomId,
    stayMinutes: carry.stayMinutes,
    cover: carry.cover,
  }
  return betterHourOfPlan(material, asked, carry.plannedAt)
}

function viewCarry(
  carry: CarryRecord,
  pieces: ReadonlyMap<number, PieceRecord>,
  material: CarryMaterial,
  member: SiteMember,
  now: Date,
  whatever: SeenWhatever | undefined,
): Carry {
  const judged =
    whatever?.parts ?? carry.pieces.map((part) => ({ part, check: checkOf(material, carry, part) }))
  const parts = judged.flatMap(({ part, check }) => {
    const piece = pieces.get(part.pieceId)
    return piece === undefined ? [] : [viewPiece(carry, part, piece, check, now)]
  })
  const clock = { timeZone: member.timeZone, now }
  const told =
    whatever && whateverWords({ ...whatever, pieces: parts, stayMinutes: carry.stayMinutes }, clock)
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
    takesWhatever: carry.takesWhatever && carry.state === 'planned',
    whatever: told ?? null,
    repeat: carry.repeat === null ? null : { id: carry.repeat.code, words: repeatWords(carry.repeat) },
    betterAt: betterAt(carry, judged, material)?.toISOString() ?? null,
    putOffFrom: carry.putOffFrom?.toISOString() ?? null,
    canPutBack:
      carry.state === 'planned' &&
      carry.putOffAt !== null &&
      carry.putOffAt.getTime() > now.getTime() - undoPutOffMs,
    headline: carryHeadline(
      {
        state: carry.state,
        roomName: toRoom.name,
        plannedAt,
        stayMinutes: carry.stayMinutes,
        pieces: parts.map((part) => ({ ...part, isOut: part.outAt !== null && part.backAt === null })),
        whatever: told,
      },
      clock,
    ),
    worst: worstOf(parts.flatMap((part) => part.check ?? [])),
    version: carry.version,
    canUndo: lastBackAt > now.getTime() - undoBringBackMs,
  }
}
